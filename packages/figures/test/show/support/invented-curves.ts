import { readFileSync } from "node:fs";
import type { Curve, Spectrum } from "@quietband/core";

/** A curve from [Hz, density, relative uncertainty, in the fit]. */
export function curveOf(
  points: readonly (readonly [hz: number, density: number, uncertainty?: number, inFit?: boolean])[],
  label = "part",
  unit = "V",
): Curve {
  return {
    unit,
    label,
    points: points.map(([frequency, density, uncertainty = 0.05, inFit = true]) => ({
      frequency,
      density,
      uncertainty,
      inFit,
    })),
    uncertaintyIs: "assumed",
    commonUncertainty: 0,
    source: [],
  };
}

/** The demonstration's reference R1, read without the library; points above 1 kHz are left out of the fit. */
export function demoR1(): Curve {
  const text = readFileSync(new URL("../../../../../fixtures/demo/R1.csv", import.meta.url), "utf8");
  const rows = text.split("\n").filter((line) => /^[\d.]+,/.test(line));
  return curveOf(
    rows.map((row) => {
      const [hz = 0, nanovolts = 0] = row.split(",").map(Number);
      return [hz, nanovolts * 1e-9, 0.05, hz <= 1000] as const;
    }),
    "R1, reference (invented)",
  );
}

/** A hundred curves with floors and corners of their own. */
export function hundredCurves(): readonly Curve[] {
  return Array.from({ length: 100 }, (_, part) =>
    curveOf(
      Array.from({ length: 20 }, (__, index) => {
        const hz = 0.1 * 10 ** (0.3 * index);
        return [hz, (3 + 0.4 * part) * 1e-9 * Math.sqrt(1 + (20 + 9 * ((37 * part) % 100)) / hz)] as const;
      }),
      `candidate ${part + 1}`,
    ),
  );
}

/** A model by its formula alone, with the span of the points that support it. */
export function modelOf(powerDensityAt: (hz: number) => number, pointsSpan: readonly [number, number]): Spectrum {
  return {
    unit: "V",
    support: [0, Number.POSITIVE_INFINITY],
    knots: [],
    lowExponent: 1,
    highExponent: 0,
    pointsSpan,
    powerDensityAt,
  };
}
