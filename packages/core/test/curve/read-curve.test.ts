import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { demoCurve } from "../../../../test/support/published.js";
import { expectRelative } from "../../../../test/support/relative.js";
import { readCurve } from "../../src/curve/read-curve.js";
import { MalformedDataError, OutOfDomainError } from "../../src/ground/errors.js";

// The points as they were made, to six digits; invented parts.
const truths = JSON.parse(
  readFileSync(new URL("../../../../fixtures/demo/true-answers.json", import.meta.url), "utf8"),
) as Record<string, { points: [number, number][] }>;

/** Points as pairs, for short expectations. */
function pairs(text: string, options = {}): (readonly [number, number])[] {
  return readCurve(text, options).points.map(({ frequency, density }) => [frequency, density]);
}

const expected = [
  [10, 120e-9],
  [1200, 85e-9],
];

describe("the four demonstration curves", () => {
  test.each(["R1", "A1", "J1", "X1"] as const)("%s reads to its points", (part) => {
    const { points, unit, source } = readCurve(demoCurve(part));
    const truth = truths[part]?.points ?? [];
    expect(unit).toBe("V");
    expect(source[0]?.key).toMatch(/^INVENTED/);
    expect(points.map(({ frequency }) => frequency)).toEqual(truth.map(([hz]) => hz));
    // the dB axis of X1 was rounded to six digits there
    for (const [index, [, density]] of truth.entries())
      expectRelative(points[index]?.density ?? 0, density, part === "X1" ? 5e-6 : 0, `${part} point ${index}`);
  });

  test("X1 has half a decibel on each point", () => {
    const { points, uncertaintyIs } = readCurve(demoCurve("X1"));
    expect(uncertaintyIs).toBe("given");
    for (const { uncertainty } of points) expectRelative(uncertainty, (Math.LN10 / 20) * 0.5, 1e-15);
  });
});

describe("headings", () => {
  test.each([
    "frequency [Hz], density [nV/√Hz]",
    "f/Hz, e_n/(nV/√Hz)",
    "f / Hz, e_n (nV/sqrt(Hz))",
    "f (Hz), nV/rtHz",
    "Hz, nV/Hz^0.5",
    "Frequency in Hz, noise density in nV/√Hz",
    "frequency Hz, density nV/√Hz",
    "frequency (typical) [Hz], density [input-referred] [nV/√Hz]".replace("[input-referred] ", "(input-referred) "),
    "frequency, f [Hz]; e [nV/√Hz]",
    "\ufefffrequency [Hz], density [nV/√Hz]",
    "F/Hz, e/nV/√Hz",
  ])("%s", (heading) => {
    const separator = heading.includes(";") ? ";" : ",";
    expect(pairs(`${heading}\n1200${separator} 85\n10${separator} 120`)).toEqual(expected);
  });

  test.each([
    ["f/kHz, µV/√Hz", "1.2, 0.085\n0.01, 0.12"],
    ["mHz, fV/√Hz", "1200000, 85e6\n10000, 1.2e8"],
    ["f [MHz], d [V/√Hz]", "0.0012, 85e-9\n1e-5, 1.2E-7"],
  ])("with prefixes, %s gives the same doubles", (heading, rows) => {
    expect(pairs(`${heading}\n${rows}`)).toEqual(expected);
  });

  test("columns are known by their units, in any order", () => {
    const { points } = readCurve("u [%], e [nV/√Hz], f [kHz]\n5, 85, 1.2\n4, 120, 0.01");
    expect(points.map(({ frequency, density, uncertainty }) => [frequency, density, uncertainty])).toEqual([
      [10, 120e-9, 0.04],
      [1200, 85e-9, 0.05],
    ]);
  });

  test("a column of common-mode noise is a density, and an empty last column none at all", () => {
    expect(pairs("f [Hz], common-mode noise [nV/√Hz],\n1200, 85,\n10, 120,")).toEqual(expected);
  });

  test.each(["uncertainty [%]", "u [%]", "u(e)/%", "%", "relative error [%]", "σ [%]"])(
    "%s is an uncertainty",
    (name) => {
      const { points } = readCurve(`f [Hz], e [nV/√Hz], ${name}\n1, 2, 5\n2, 3, 4`);
      expect(points.map(({ uncertainty }) => uncertainty)).toEqual([0.05, 0.04]);
    },
  );

  test("between blanks, names may have several words", () => {
    const heading = "noise frequency [Hz] input noise density [nV/√Hz] uncertainty [%]";
    expect(pairs(`${heading}\n1200 85 5\n10 120 5`)).toEqual(expected);
  });

  test("square roots of power densities; a percentage of a square counts half, a decibel whole", () => {
    const { points, unit } = readCurve("f [Hz], S [V²/Hz], u\n1, 4e-18, 5 %\n2, 9e-18, 0.5 dB\n3, 16e-18, 3 %");
    expect(unit).toBe("V");
    expect(points.map(({ density }) => density)).toEqual([2e-9, 3e-9, 4e-9]);
    expect(points[0]?.uncertainty).toBe(0.025);
    expectRelative(points[1]?.uncertainty ?? 0, (Math.LN10 / 20) * 0.5, 1e-15);
    expect(pairs("f [Hz], S [nV²/Hz]\n1, 4\n2, 9")).toEqual([
      [1, 2e-9],
      [2, 3e-9],
    ]);
  });

  test("levels", () => {
    const level = pairs("f [Hz], L [dBV/√Hz]\n1, -120\n2, -140");
    for (const [index, density] of [1e-6, 1e-7].entries()) expectRelative(level[index]?.[1] ?? 0, density, 1e-15);
    const micro = pairs("f [Hz], L [dB re 1 µV/√Hz]\n1, 0\n2, -20");
    for (const [index, density] of [1e-6, 1e-7].entries()) expectRelative(micro[index]?.[1] ?? 0, density, 1e-15);
    const power = pairs("f [Hz], L [dBV²/Hz]\n1, -120\n2, -140");
    for (const [index, density] of [1e-6, 1e-7].entries()) expectRelative(power[index]?.[1] ?? 0, density, 1e-15);
  });
});

describe("cells", () => {
  test.each([
    ["1.2 kHz, 85 nV/√Hz\n10 Hz, 0.12 µV/√Hz"],
    ["1.2kHz;85nV/√Hz\n10Hz;120nV/√Hz"],
    ["1.2 kHz\t85 nV/√Hz\n10 Hz\t120 nV/√Hz"],
    ["1.2 kHz 85 nV/√Hz\n10 Hz  120 nV/√Hz"],
    ["1,2 kHz; 85 nV/√Hz\n10 Hz; 0,12 \u03bcV/√Hz"],
    ["1k2 Hz, 85n V/√Hz\n10 Hz, 120 nV/√Hz".replace("85n V", "85 nV")],
    ["f [Hz], e [V/√Hz]\n1k2, 85n\n10, 0.12u"],
    ["f [Hz], e [V/√Hz]\n1.2K, 85 nV/√Hz\n10, 120n"],
    ["f [Hz]   e [V/√Hz]\n1.2k   85n\n10     120n"],
    ["f [Hz]\te [V/√Hz]\n1,2k\t85n\n10\t120n"],
    ["f [Hz], e [V/√Hz]\r\n1.2k, 85n,\r\n10, 120n, , \r\n"],
    ["f [Hz], e [V/√Hz]\r1.2k, 85n\r10, 120n\r"],
    ["\n\n  f [Hz], e [V/√Hz]\n\n 1.2k, 85n # misread?\n# between\n\t10, 120n\n\n"],
    ["f [Hz], e [V/√Hz]\n+1200, +85e-9\n10, 1.2e−7"],
    ["1200, 85 nV/√Hz\n10 Hz, 120 nV/√Hz".replace("1200,", "1200 Hz,")],
  ])("%j", (text) => {
    expect(pairs(text)).toEqual(expected);
  });

  test("options stand in where the text names no unit and no label", () => {
    const options = { frequencyUnit: "kHz", densityUnit: "nV/√Hz", label: "mine" };
    expect(pairs("1.2, 85\n0.01, 120", options)).toEqual(expected);
    expect(pairs("f [Hz], e\n1200, 85\n10, 120", options)).toEqual(expected);
    expect(readCurve("1 85\n2 80", options).label).toBe("mine");
    expect(readCurve("# label: its own\n1 85\n2 80", options).label).toBe("its own");
    expect(() => readCurve("1 2\n3 4", { frequencyUnit: "V" })).toThrow(OutOfDomainError);
    expect(() => readCurve("1 2\n3 4", { densityUnit: "nV" })).toThrow(OutOfDomainError);
    expect(() => readCurve("1 2\n3 4", { densityUnit: "nV/Hz" })).toThrow("did you mean nV/√Hz or nV²/Hz?");
    expect(() => readCurve("1 2\n3 4", { unit: "V" } as object)).toThrow(OutOfDomainError);
  });

  test("a row that ends in aside is kept for show and left out of fits", () => {
    for (const text of ["1, 85\n2, 80, aside\n3, 80", "1 85\n2 80 aside\n3 80", "1;85;\n2;80;;aside\n3;80;"]) {
      const { points } = readCurve(text, {
        frequencyUnit: "Hz",
        densityUnit: text.includes(";;") ? "V/√Hz" : "nV/√Hz",
      });
      expect(points.map(({ inFit }) => inFit)).toEqual([true, false, true]);
    }
  });

  test("points carry the line they came from, and come in ascending order", () => {
    expect(readCurve("# x\n\n30 Hz, 1 V/√Hz\n10 Hz, 3 V/√Hz\n20 Hz, 2 V/√Hz").points.map(({ line }) => line)).toEqual([
      4, 5, 3,
    ]);
  });

  test("a row typed twice alike counts once", () => {
    expect(pairs("10 Hz, 120 nV/√Hz\n1.2 kHz, 85 nV/√Hz\n0.01 kHz, 0.12 µV/√Hz")).toEqual(expected);
  });
});

describe("uncertainty", () => {
  const read = (cells: readonly string[], head = ""): unknown => {
    const curve = readCurve(
      `${head}f [Hz]; e [nV/√Hz]; u\n${cells.map((cell, index) => `${index + 1}; 5; ${cell}`).join("\n")}`,
    );
    return [curve.uncertaintyIs, ...curve.points.map(({ uncertainty }) => uncertainty)];
  };

  test("is read in percent and decibels, with or without ±", () => {
    expect(read(["5 %", "± 4%", "0,5 %", "100 %"])).toEqual(["given", 0.05, 0.04, 0.005, 1]);
  });

  test("that is missing is assumed, and the curve says so", () => {
    expect(read(["5 %", "-"])).toEqual(["assumed", 0.05, 0.05]);
    expect(read(["3 %", ""])).toEqual(["assumed", 0.03, 0.05]);
    expect(readCurve("1 Hz, 1 V/√Hz\n2 Hz, 1 V/√Hz").uncertaintyIs).toBe("assumed");
  });

  test("may be stated once for all points that state none", () => {
    expect(read(["3 %", "-"], "# uncertainty: 2 %\n")).toEqual(["given", 0.03, 0.02]);
    expect(read(["3 %", "-"], "# point uncertainty: 2 %\n")).toEqual(["given", 0.03, 0.02]);
  });

  test("of an axis, common to all points, stands in a comment", () => {
    expect(readCurve("# axis uncertainty: 3 %\n1 Hz, 1 V/√Hz\n2 Hz, 1 V/√Hz").commonUncertainty).toBe(0.03);
    expect(readCurve("# axis uncertainty: 3 %\n1 Hz, 1 V²/Hz\n2 Hz, 1 V²/Hz").commonUncertainty).toBe(0.015);
    expectRelative(
      readCurve("# axis uncertainty: 0.25 dB\n1 Hz, 1 V/√Hz\n2 Hz, 1 V/√Hz").commonUncertainty,
      (Math.LN10 / 20) * 0.25,
      1e-15,
    );
  });

  test("that points share but feel differently stands in columns of its own", () => {
    const text = "f [Hz], e [V/√Hz], common frequency axis [%], common: density axis [%]\n2, 1, -1.5, 0\n1, 1, 2, 0.5";
    expect(readCurve(text).commonEffects).toEqual([
      { name: "frequency axis", effects: [0.02, -0.015] },
      { name: "density axis", effects: [0.005, 0] },
    ]);
  });
});

test("comments are provenance, in the order given", () => {
  const text =
    "# document: data sheet (invented)\n1 Hz, 1 V/√Hz # first light\n# typical, 25 °C\n# figure: 7\n2 Hz, 1 V/√Hz";
  expect(readCurve(text).source).toEqual([
    { key: "document", value: "data sheet (invented)" },
    { key: "", value: "first light" },
    { key: "", value: "typical, 25 °C" },
    { key: "figure", value: "7" },
  ]);
});

describe("refusals name the line, what stands there and what was expected", () => {
  const heading = "frequency [Hz], density [nV/√Hz]";
  test.each([
    ["", "at least two rows at different frequencies"],
    ["# only a comment", "at least two rows"],
    ["1 Hz, 1 V/√Hz", 'got 1 after "1 Hz, 1 V/√Hz"'],
    [`${heading}\n1, 2\n1, 2`, "got one frequency only"],
    [
      `${heading}\n1, 2\n2, 3\n1, 3`,
      "Line 4: expected one density at each frequency, got another at 1 Hz than on line 2.",
    ],
    [`${heading}\n1, 2\n2, 3\n1, 2, aside`, "Line 4: expected one density at each frequency"],
    [`${heading}\n1, 2\n0, 3`, 'Line 3: expected a frequency such as 1.2 kHz, above zero and finite, got "0".'],
    [`${heading}\n1, 2\n-5, 3`, 'Line 3: expected a frequency such as 1.2 kHz, above zero and finite, got "-5".'],
    [`${heading}\n1, 2\n5, -3`, 'Line 3: expected a density such as 85 nV/√Hz, above zero and finite, got "-3".'],
    [`${heading}\n1, 2\n5, 1e999`, 'above zero and finite, got "1e999"'],
    [`${heading}\n1, 2\n5, 1e-200`, "above zero and finite"],
    [`${heading}\n1, 2\n5, Infinity`, '"Infinity" does not begin with a number'],
    [`${heading}\n1, 2\n5, NaN`, '"NaN" does not begin with a number'],
    [`${heading}\n1, 2\n5`, 'Line 3: expected 2 cells (frequency, density), got 1 in "5".'],
    [`${heading}\n1, 2\n5,`, "Line 3: expected a density such as 85 nV/√Hz, but the cell is empty"],
    [`${heading}\n1, 2\n, 5`, "Line 3: expected a frequency such as 1.2 kHz, but the cell is empty"],
    [`${heading}\n1, 2\n5, 6, 7`, 'Line 3: expected 2 cells (frequency, density), got 3 in "5, 6, 7".'],
    [`${heading}, u\n1, 2, 5 %\n5, 6`, "a dash stands for an uncertainty that is not stated"],
    [
      `${heading}\n1, 2\n5, 3 nA/√Hz`,
      'Line 3: expected a density of the same quantity as on line 2, got "3 nA/√Hz", which is in A/√Hz.',
    ],
    [`${heading}\n1, 2\n5, 3 nV²/Hz`, "of the same quantity as on line 2"],
    [`${heading}\n1, 2\n5, 3 nV`, "is in V, which is no density; did you mean V/√Hz?"],
    [`${heading}\n1, 2\n5, 3 nV/Hz`, "did you mean nV/√Hz or nV²/Hz?"],
    [`${heading}\n1, 2\n5, 3 quux`, '"quux" is no unit known here'],
    [`${heading}\n1, 2\n5 V, 3`, 'Line 3: expected a frequency such as 1.2 kHz, but "5 V" is in V.'],
    [`${heading}\n1, 2\n5, 3n`, '"3n" has a prefix where the unit, V/√Hz, already has one'],
    ["f [Hz], density [nV/Hz]\n1, 2\n2, 3", "Line 1: expected a heading such as"],
    ["f [Hz], density [nV/Hz]\n1, 2\n2, 3", "did you mean nV/√Hz or nV²/Hz?"],
    ["f/Hz, nV/Hz\n1, 2\n2, 3", "did you mean nV/√Hz or nV²/Hz?"],
    ["f/Hz, e_n/nV/Hz\n1, 2\n2, 3", "did you mean nV/√Hz or nV²/Hz?"],
    ["f [Hz], density [xV/√Hz]\n1, 2\n2, 3", '"xV/√Hz" is no unit known here'],
    ["f [Hz], density (xV/√Hz)\n1, 2\n2, 3", '"xV/√Hz" is no unit known here'],
    ["f [Hz], density [nV]\n1, 2\n2, 3", 'got "density [nV]" in V'],
    ["f [Hz], e [nV/√Hz], max [nV/√Hz]\n1, 2, 3\n2, 3, 4", "got 2 in"],
    ["f [Hz], level [dB]\n1, 2\n2, 3", 'density (as nV/√Hz or dBV/√Hz) and uncertainty, got "level [dB]" in dB'],
    ["f, e, u, v\n1, 2, 3, 4\n1, 2, 3, 4", 'got one more, "v"'],
    ["f [Hz], e [nV/√Hz], gain [dB]\n1, 2, 3\n2, 3, 3", 'got "gain [dB]" in dB'],
    ["f [Hz], e [nV/√Hz], gain\n1, 2, 3 dB\n2, 3, 3 dB", 'got one more, "gain"'],
    ["f [Hz]\n1\n2", "got no column of density"],
    [
      "1, 2\n3, 4",
      'Line 1: expected a frequency such as 1.2 kHz, but "1" has no unit; write the unit in the cell, or a heading such as',
    ],
    ["1 Hz, 2\n3 Hz, 4", '"2" has no unit'],
    ["1 Hz, 2 V/√Hz, 5\n3 Hz, 4 V/√Hz, 5", 'expected an uncertainty such as 5 % or 0.4 dB, but "5" has no unit'],
    ["1 Hz, 2 V/√Hz, 0 %\n3 Hz, 4 V/√Hz, 5 %", "above 0 and at most 100 %"],
    ["1 Hz, 2 V/√Hz, 120 %\n3 Hz, 4 V/√Hz, 5 %", "above 0 and at most 100 %"],
    ["1 Hz, 2 V/√Hz, 5 V\n3 Hz, 4 V/√Hz, 5 %", '"5 V" is in V'],
    ["# axis uncertainty: lots\n1 Hz, 2 V/√Hz\n3 Hz, 4 V/√Hz", "Line 1: expected an uncertainty above 0"],
    ["# uncertainty: 200 %\n1 Hz, 2 V/√Hz\n3 Hz, 4 V/√Hz", "Line 1: expected an uncertainty above 0"],
    ["Hz\tnV/√Hz\n1,000\t5\n2,000\t6", 'Line 2: expected numbers that can be read in one way, got "1,000·5"'],
    ["Hz\tnV/√Hz\n0,5\t5\n1.5\t6", '"1.5" holds two numbers'],
    ["f [Hz]  e [nV/√Hz]\n0,1 1900\n0,2 1300", '"0,1" has a comma that is no decimal mark here'],
    ["f [Hz], e [V/√Hz], common axis [V]\n1, 2, 3\n2, 3, 4", 'got "common axis [V]" in V'],
    ["f [Hz], e [V/√Hz], common axis [%]\n1, 2, x\n2, 3, 4", "expected an effect of a common error"],
  ])("%j", (text, said) => {
    const read = (): unknown => readCurve(text);
    expect(read).toThrow(MalformedDataError);
    expect(read).toThrow(said);
  });

  test("carries the line as a number too", () => {
    try {
      readCurve(`${heading}\n1, 2\n5, x`);
      expect.unreachable();
    } catch (error) {
      expect(error).toMatchObject({ line: 3, code: "malformed-data" });
    }
  });

  test("lines longer than 1000 characters, wherever they are", () => {
    for (const text of [`# ${"x".repeat(1000)}`, `${heading}\n1, 2\n2, ${"3".repeat(1000)}`, "1".repeat(1e6)])
      expect(() => readCurve(text)).toThrow("expected at most 1000 characters");
    expect(
      readCurve(`# ${"x".repeat(990)}\n${heading}\n1, ${"2".repeat(100)}\n2, ${"3".repeat(100)}`).points,
    ).toHaveLength(2);
  });

  test("what is no text", () => {
    expect(() => readCurve(undefined as unknown as string)).toThrow(MalformedDataError);
  });
});
