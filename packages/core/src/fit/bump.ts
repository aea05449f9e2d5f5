import type { Curve } from "../curve/curve.js";
import { requireBand } from "../ground/domain.js";
import { OutOfDomainError } from "../ground/errors.js";
import { polyline } from "../spectrum/polyline.js";
import type { Spectrum } from "../spectrum/spectrum.js";
import { spliceSpectrum } from "../spectrum/splice-spectrum.js";

/** A range where the curve has a bump that no model describes: its points take no part in the fit and stand for themselves. */
export interface Bump {
  /** Hz. */
  readonly fromHz: number;
  readonly toHz: number;
}

export function requireBump(curve: Curve, bump: Bump | undefined): Bump | undefined {
  if (bump === undefined) return undefined;
  const { fromHz, toHz } = bump;
  requireBand(fromHz, toHz);
  const count = curve.points.filter(({ frequency }) => frequency >= fromHz && frequency <= toHz).length;
  if (count > 0) return bump;
  throw new OutOfDomainError(
    `The bump from ${fromHz} Hz to ${toHz} Hz must hold at least one point of the curve; got none.`,
  );
}

/**
 * The fitted spectrum with straight lines through the bump's points in its place, from the point before the bump to the one
 * after it.
 */
export function withBump(fitted: Spectrum, curve: Curve, { fromHz, toHz }: Bump): Spectrum {
  if (fitted.pieces === undefined)
    throw new OutOfDomainError(
      "A bump and a Lorentzian cannot stand in one model; leave the bump out or name another model.",
    );
  const inside = curve.points.map(({ frequency }) => frequency >= fromHz && frequency <= toHz);
  const first = Math.max(inside.indexOf(true) - 1, 0);
  const last = Math.min(inside.lastIndexOf(true) + 1, inside.length - 1);
  const span = [curve.points[first]?.frequency ?? fromHz, curve.points[last]?.frequency ?? toHz] as const;
  return spliceSpectrum(fitted, polyline(curve), span, "points of the bump");
}
