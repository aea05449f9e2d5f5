import type { LobedFactor } from "../numerics/lobed-rule.js";
import type { LobedGain, Weighting } from "../weighting/weighting.js";

/** Shares of their distance from the next peak that panels may span, tried until the integrand is resolved. */
export const panelShares: readonly number[] = Object.freeze([0.4, 0.15, 0.05]);

/** The lobed factor of a gain as numerics knows it. */
export function lobedFactor(lobes: LobedGain): LobedFactor {
  return {
    lobeWidth: lobes.lobeHz,
    peaksEvery: lobes.peaksEveryHz,
    valueAt: (hz) => lobes.coreAt(hz),
    parts: lobes.parts.map((part) => ({
      envelopeAt: (hz: number) => part.envelopeAt(hz),
      waves: part.waves.map(({ seconds, cosine, sine }) => ({ delay: seconds, cosine, sine })),
    })),
  };
}

/** The gain with its waves averaged away, at one frequency. */
export function meanGainAt(lobes: LobedGain, hz: number): number {
  let mean = 0;
  for (const part of lobes.parts) {
    let steady = 0;
    for (const { seconds, cosine } of part.waves) if (seconds === 0) steady += cosine;
    mean += part.envelopeAt(hz) * steady;
  }
  return mean * lobes.smoothAt(hz);
}

/** The same weighting with every lobe of a band as a knot, for bands of few. */
export function withLobesAsKnots(weighting: Weighting, { lobeHz }: LobedGain, fromHz: number, toHz: number): Weighting {
  const knots = [...weighting.knots];
  for (let k = Math.floor(fromHz / lobeHz) + 1; k * lobeHz < toHz; k += 1) knots.push(k * lobeHz);
  return { ...weighting, knots };
}
