import { readFileSync } from "node:fs";
import { bandNoise, fitCurve, OutOfDomainError, polyline, readCurve, whiteFlicker } from "@quietband/core";
import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { compareCurves } from "../../src/chain/compare-curves.js";
import { noiseBudget } from "../../src/chain/noise-budget.js";
import { readChain } from "../../src/chain/read-chain.js";
import { referenceNoiseByUse } from "../../src/chain/reference-noise-by-use.js";
import { referencePathNoise } from "../../src/chain/reference-path-noise.js";
import { tone } from "../../src/chain/tone.js";
import { converterFigures } from "../../src/convert/converter-figures.js";
import { expectedPeakToPeak } from "../../src/convert/expected-peak-to-peak.js";
import { checkStatedFigure } from "../../src/judge/check-stated-figure.js";
import { noiseReport } from "../../src/report/noise-report.js";
import { reportCsv } from "../../src/report/report-csv.js";
import { reportMarkdown } from "../../src/report/report-markdown.js";
import { reportText } from "../../src/report/report-text.js";

const demo = (name: string): string =>
  readFileSync(new URL(`../../../../fixtures/demo/${name}`, import.meta.url), "utf8");
const curve = readCurve(demo("R1.csv"));
const lines = polyline(curve);
const band = { fromHz: 0.1, toHz: 10 };
const noise = bandNoise(lines, band);
const path = { spectrum: lines, referenceVolts: 4.096, ...band };
const budget = noiseBudget(
  readChain(demo("strain-channel.json"), { loadCurve: (file) => readCurve(demo(file)) }).budget,
);

const report = noiseReport({
  title: "Logger | review (INVENTED)",
  noise: {
    noise,
    label: "Reference R1",
    basis: "straight lines through the points",
    record: expectedPeakToPeak(lines, { ...band, recordSeconds: 10 }),
    converter: converterFigures({ rms: noise.rms, rangePeakToPeak: 8.192, bits: 24, referenceVolts: 4.096 }),
  },
  fit: fitCurve(curve, { toHz: 1000 }),
  reference: {
    path: referencePathNoise({ ...path, input: { kind: "dc", volts: 2.048 } }),
    byUse: referenceNoiseByUse({ ...path, input: { kind: "dc" }, shares: [0, 0.5, 1], otherRms: 1e-6 }),
  },
  budget,
  candidates: compareCurves([{ name: "R1", spectrum: lines }], band),
  checks: [checkStatedFigure(curve, "7.2 µV peak-to-peak, 0.1 Hz to 10 Hz")],
  plots: [{ title: "a plot", svg: "<svg>µ</svg>" }],
  cautions: ["A caution of one's own."],
});

const entryOf = (section: string, name: string) =>
  report.sections.find(({ heading }) => heading.startsWith(section))?.entries.find((entry) => entry.name === name);

test("every number has a unit, a basis, and where it needs one an assumption", () => {
  for (const { heading, entries } of report.sections)
    for (const { name, value, basis, unit } of entries) {
      expect(basis, `${heading}: ${name}`).not.toBe("");
      if (typeof value === "number") expect(Number.isFinite(value), `${heading}: ${name} ${unit}`).toBe(true);
    }
  expect(entryOf("Reference R1", "peak-to-peak of a record")?.assumption).toBe("Gaussian, stationary noise");
});

test("its numbers are those of its parts", () => {
  expectRelative(Number(entryOf("Reference R1", "RMS")?.value), noise.rms, 1e-15);
  expectRelative(Number(entryOf("Budget", "RMS of all")?.value), budget.rms, 1e-15);
  expectRelative(Number(entryOf("Noise through", "RMS at this input")?.value), 0.5 * noise.rms, 1e-12);
  expect(entryOf("Stated figure", "verdict")?.value).toBe("agrees");
  expect(entryOf("Budget", "to attack first")?.value).toBe("amplifier A1");
  expectRelative(Number(entryOf("Model", "floor")?.value), 71.6e-9, 1e-3);
});

test("what each source assumes stands with it, and where the money is wasted", () => {
  const text = reportText(report);
  expect(text).toMatch(/\n {2}bridge: 350 Ω at 25 °C\.\n/);
  expect(text).toMatch(
    /excitation X1: .*Below 1 Hz there are no points.* 61 % of its power lies beyond its points\.\n/,
  );
  expect(entryOf("Budget", "hardly worth attacking")?.value).toBe("reference R1");
  const row = reportCsv(report)
    .split("\r\n")
    .find((line) => line.startsWith('Budget,"bridge, RMS"'));
  expect(row).toMatch(/,V,"of the source alone, referred to input",350 Ω at 25 °C\.$/);
  expect(reportMarkdown(report)).toContain("- bridge: 350 Ω at 25 °C.\n");
});

test("a missed target names the bandwidth that would meet it; tones and correlation have lines of their own", () => {
  const white = whiteFlicker({ floor: 10e-9, cornerHz: 0 });
  const missed = noiseBudget({
    sources: [
      { source: white, name: "a" },
      { source: whiteFlicker({ floor: 10e-9, cornerHz: 0 }), name: "b" },
      { source: tone({ frequencyHz: 50, amplitude: 1e-8 }), name: "hum" },
    ],
    correlations: [{ between: ["a", "b"], coefficient: 0.5 }],
    fromHz: 0,
    toHz: 1e4,
    measured: { unit: "°C", perUnit: 1e4 },
    target: { rms: 1e-7 },
  });
  const { entries } = noiseReport({ title: "missed", budget: missed }).sections[0] ?? { entries: [] };
  const value = (name: string): number => Number(entries.find((entry) => entry.name === name)?.value);
  // 3·10⁻¹⁶·f + ½·10⁻¹⁶ = 10⁻¹⁴
  expectRelative(value("bandwidth that meets it"), (1e-14 - 0.5e-16) / 3e-16, 1e-12);
  expectRelative(value("added by correlation"), (100 * 1e-12) / (3e-12 + 0.5e-16), 1e-12);
  expectRelative(value("peak-to-peak, measured"), 1e4 * missed.peakToPeak.total, 1e-14);
  expect(entries.find(({ name }) => name === "peak-to-peak of all")?.basis).toMatch(/tones in amplitude, 20\.00 nV$/);
});

test("it is the same after a round trip through JSON, and ends with the cautions that every report carries", () => {
  expect(JSON.parse(JSON.stringify(report))).toEqual(report);
  expect(report.cautions[0]).toBe("A caution of one's own.");
  expect(report.cautions.at(-1)).toMatch(/medical, or protects people or equipment.*qualified review/);
});

describe("one structure, three forms", () => {
  test("text: aligned, nothing ends in blanks", () => {
    const text = reportText(report);
    expect(text).toMatch(/\n {2}RMS +1\.248 µV +0\.1 Hz to 10 Hz, straight lines through the points, ± 2 % \(k = 1\)/);
    expect(text).toMatch(/assumed: Gaussian, stationary noise/);
    expect(text.split("\n").filter((line) => /\s$/.test(line))).toEqual([]);
  });

  test("Markdown: tables by section, plots embedded or beside, texts escaped", () => {
    const embedded = reportMarkdown(report);
    expect(embedded).toMatch(/^# Logger \\\| review \(INVENTED\)\n/);
    const [, data = ""] = /data:image\/svg\+xml;base64,([A-Za-z0-9+/=]+)\)/.exec(embedded) ?? [];
    expect(Buffer.from(data, "base64").toString("utf8")).toBe("<svg>µ</svg>");
    expect(reportMarkdown(report, { plotPath: (_, index) => `plot-${index}.svg` })).toContain("![a plot](plot-0.svg)");
    const widths = embedded
      .split("\n")
      .filter((line) => line.startsWith("| "))
      .map((line) => line.replace(/\\\|/g, "").split("|").length);
    expect(Math.min(...widths)).toBeGreaterThan(4);
  });

  test("CSV: every number with all its digits, tables included", () => {
    const rows = reportCsv(report).split("\r\n");
    expect(rows[0]).toBe("section,figure,value,unit,rests on,assumed");
    expect(rows.find((row) => row.startsWith("Reference R1,RMS,"))).toContain(`,${String(noise.rms)},V,`);
    expect(rows.find((row) => row.startsWith('Budget,"amplifier A1, share"'))).toMatch(/,86\.97\d+,%/);
  });
});

test("a report of nothing, without a title or with a part it does not know is refused", () => {
  expect(() => noiseReport({ title: "empty" })).toThrow(OutOfDomainError);
  expect(() => noiseReport({ title: " ", noise: { noise } })).toThrow(/needs a title/);
  expect(() => noiseReport({ title: "a", nose: 1 } as never)).toThrow(/nose/);
});
