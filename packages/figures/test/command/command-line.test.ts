import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { runCommandLine } from "../../src/command/command-line.js";
import { commands } from "../../src/command/commands.js";

/** As the command line gets it from the system. */
test("a file that is not there is named in a sentence", () => {
  const { status, complaint } = run(["noise", "R9.csv", "--band", "1Hz:2Hz"]);
  expect([status, complaint.replace(/at .*R9/, "at R9")]).toEqual([1, "Expected a file at R9.csv; there is none.\n"]);
});

const demo = (name: string): string =>
  readFileSync(new URL(`../../../../fixtures/demo/${name}`, import.meta.url), "utf8");

/** Runs a line with files of the demonstration and remembers what it said. */
function run(
  words: readonly string[],
  input = "",
): { status: number; out: string; complaint: string; written: Map<string, string>; progress: string[] } {
  const said = { out: "", complaint: "" };
  const written = new Map<string, string>();
  const progress: string[] = [];
  const status = runCommandLine(words, commands, {
    readInput: () => input,
    readFile: demo,
    writeFile: (path, text) => written.set(path, text),
    print: (text) => {
      said.out += text;
    },
    progress: (what, total) => {
      progress.push(`${what} ${total}`);
      return { step: () => progress.push("step"), end: () => progress.push("end") };
    },
    complain: (text) => {
      said.complaint += text;
    },
  });
  return { status, ...said, written, progress };
}

describe("what it says when used wrongly: one line, status 2", () => {
  test.each([
    [["nosie"], /^quietband has no command nosie\. Did you mean noise\?\n$/],
    [["noise", "R1.csv", "--bnd", "1Hz:2Hz"], /^quietband noise takes no option --bnd\. Did you mean --band\?\n$/],
    [["noise", "R1.csv"], /needs a band: --band 0\.1Hz:10Hz/],
    [["noise", "--band", "1Hz:2Hz"], /takes one curve: a file, or - for standard input; got 0/],
    [["noise", "R1.csv", "--band"], /--band needs a value/],
    [["fit", "R1.csv", "--json=yes"], /--json takes no value/],
    [["fit", "R1.csv", "-j"], /Options begin with two dashes; got -j/],
    [["noise", "R1.csv", "--band", "1Hz:2Hz", "--band", "1Hz:3Hz"], /may be given once only/],
  ])("%o", (words, message) => {
    const { status, out, complaint } = run(words);
    expect(complaint).toMatch(message);
    expect(complaint.trimEnd().split("\n")).toHaveLength(1);
    expect([status, out]).toEqual([2, ""]);
  });
});

describe("what it says to bad input: one line, status 1", () => {
  test.each([
    [["noise", "J1.csv", "--band", "0.1Hz:10Hz"], /for instance --below 1, or move fromHz up/],
    [["noise", "R1.csv", "--band", "10Hz:1Hz"], /toHz|upper/],
    [["noise", "R1.csv", "--band", "ten"], /Expected/],
    [
      ["noise", "R1.csv", "--band", "1Hz:2Hz", "--through", "Buterworth low-pass, order 2, 5 Hz"],
      /did you mean "Butterworth low-pass"\?/,
    ],
    [["noise", "R1.csv", "--band", "1Hz:2Hz", "--through", "Butterworth low-pass, 5 Hz"], /order is missing/],
    [
      ["noise", "R1.csv", "--band", "1Hz:2Hz", "--through", "Butterworth low-pass, order 20, 5 Hz"],
      /order must be a whole number from 1 to 12; got 20/,
    ],
    [["check", "-", "--figure", "quiet"], /./],
    [["fit", "R1.csv", "--exponent", "steep"], /for --exponent; got "steep"/],
  ])("%o", (words, message) => {
    const { status, complaint } = run(words);
    expect(complaint).toMatch(message);
    expect(complaint.trimEnd().split("\n")).toHaveLength(1);
    expect(status).toBe(1);
  });
});

test("help lists every command, and each has its options and an example", () => {
  expect(run(["--help"]).out).toContain("noise <curve>");
  for (const { name, example } of commands) {
    const { status, out } = run([name, "--help"]);
    expect(status).toBe(0);
    expect(out).toContain(example.type);
  }
});

test("a curve may come from standard input, and JSON holds what the text says", () => {
  const { status, out } = run(["noise", "-", "--band", "0.1Hz:10Hz", "--json"], demo("A1.csv"));
  const { noise, figures } = JSON.parse(out) as { noise: { rms: number }; figures: { peakToPeak: { factor: number } } };
  expect(status).toBe(0);
  expect(Math.abs(noise.rms / 22.6e-9 - 1)).toBeLessThan(0.01);
  expect(figures.peakToPeak.factor).toBe(6.6);
});

test("a filter in words, with its numbers in any order, is the filter", () => {
  const one = run(["noise", "R1.csv", "--band", "0.1Hz:1kHz", "--through", "Butterworth low-pass, order 2, 5 Hz"]).out;
  const other = run([
    "noise",
    "R1.csv",
    "--band",
    "0.1Hz:1kHz",
    "--through",
    "butterworth low-pass, cutoff 5Hz, order 2",
  ]).out;
  expect(one).toBe(other);
  expect(one).toContain("through Butterworth low-pass, order 2, 5 Hz");
});

test("plot writes an SVG where it is told, or to standard output", () => {
  const { written } = run(["plot", "R1.csv", "--to", "1kHz", "--output", "R1.svg"]);
  expect(written.get("R1.svg")).toMatch(/^<svg /);
  expect(run(["plot", "R1.csv", "--running", "--band", "0.1Hz:1kHz"]).out).toMatch(/^<svg /);
});

test("check compares every figure that a curve states", () => {
  const { out } = run(["check", "R1.csv"]);
  expect(out.match(/^Stated: /gm)).toHaveLength(2);
  expect(out).toMatch(/Verdict: agrees with the range of one record of 10 s, .*; lower than 6\.6 × RMS, .*, by 13 %\./);
  expect(out).toMatch(/would agree with a peak-to-peak factor of 5\.7\d in place of 6\.6, /);
});

test("check takes the measurement as it is known", () => {
  const { out } = run(["check", "R1.csv", "--basis", "convention", "--through", "brick wall", "--factor", "5.77"]);
  expect(out).toMatch(/Verdict: agrees with 5\.77 × RMS/);
  expect(out).not.toMatch(/usual filter|As a record/);
  expect(run(["check", "R1.csv", "--basis", "guess"]).complaint).toBe(
    'Expected convention or record for --basis; got "guess".\n',
  );
});

test("check goes on where one of several figures lies beyond the points, and says so", () => {
  const { status, out } = run(["check", "X1.csv", "--of", "5V", "--below", "1"]);
  expect(status).toBe(0);
  expect(out).toMatch(/Verdict: lower than the range of one record of 10 s, .*, by a factor 2\.0/);
  expect(out).toMatch(/not checked: .*ends at 100000 Hz/);
});

test("read writes the table that noise reads, with the calibration's residuals as comments", () => {
  const { status, out } = run(["read", "R1-picks.json"]);
  expect(status).toBe(0);
  expect(out).toMatch(/^# calibration: worst is .* pixels off/m);
  const noise = run(["noise", "-", "--band", "0.1Hz:10Hz"], out);
  expect(noise.out).toMatch(/RMS +1\.2\d\d µV +± 0\.\d % \(k = 1\)/);
  const shown = JSON.parse(run(["read", "R1-picks.json", "--json"]).out) as {
    readonly calibration: { readonly residuals: readonly unknown[] };
  };
  expect(shown.calibration.residuals).toHaveLength(11);
  const { written } = run(["read", "R1-picks.json", "--output", "R1-read.csv"]);
  expect(written.get("R1-read.csv")).toBe(out);
  expect(run(["read"]).complaint).toMatch(/takes one picks file, or - for standard input; got 0/);
});

test("budget ranks the sources of the invented strain channel: the amplifier decides", () => {
  const { status, out } = run(["budget", "strain-channel.json"]);
  expect(status).toBe(0);
  expect(out).toMatch(/amplifier A1 .*87 %/);
  expect(out).toContain("bridge: 350 Ω at 25 °C.");
  expect(out).toContain("18.03 nV RMS meets the target of 20 nV");
  const { written } = run(["budget", "strain-channel.json", "--output", "strain.svg"]);
  expect(written.get("strain.svg")).toMatch(/^<svg /);
  expect(run(["budget", "R1.csv"]).status).toBe(1);
});

describe("quietband fit", () => {
  test("prints standard errors, the factor of their 95 % interval, and the noise of a band both ways", () => {
    const { status, out } = run(["fit", "R1.csv", "--to", "1kHz", "--band", "0.1Hz:10Hz"]);
    expect(status).toBe(0);
    expect(out).toMatch(/floor +71\.60 nV\/√Hz +± 3\.8 % \(k = 1\); 95 % within a factor 1\.08 \(k = 1\.96\)/);
    expect(out).toMatch(/Noise of 0\.1Hz:10Hz\n +by the model +1\.2\d+ µV/);
    expect(out).toMatch(/by straight lines through the points +1\.248 µV/);
  });

  test("leaves a bump to its own points", () => {
    const { out } = run(["fit", "R1.csv", "--bump", "4kHz:20kHz", "--band", "1kHz:20kHz"]);
    expect(out).toMatch(/Left out of the fit: 4000 Hz \(bump\), 12000 Hz \(bump\), 20000 Hz \(bump\)/);
    expect(out).toMatch(/by the model +12\.41 µV/);
  });

  test("says of suspects at the top that the curve may bend there", () => {
    expect(run(["fit", "R1.csv"]).out).toMatch(/the curve may bend there .*; fit up to 4000 Hz\?/);
  });
});

test("quietband plot draws the 95 % band of the model", () => {
  expect(run(["plot", "R1.csv", "--to", "1kHz"]).out).toContain("95 % of the model");
});
interface Compared {
  readonly comparison: {
    readonly rows: readonly { readonly name: string; readonly rms: number }[];
    readonly notes: readonly string[];
  };
}

describe("compare", () => {
  test("ranks curves through one path, draws them, and says what rests on assumption", () => {
    const { status, out, written } = run([
      "compare",
      "J1.csv",
      "A1.csv",
      "--band",
      "0.1Hz:10Hz",
      "--below",
      "1",
      "--output",
      "both.svg",
    ]);
    expect(status).toBe(0);
    expect(out).toMatch(/1 +A1 +22\.60 nV/);
    expect(out).toMatch(/2 +J1 +83\.15 nV .*× 3\.68 +48 %/);
    expect(written.get("both.svg")).toMatch(/^<svg /);
  });

  test("a source of 10 kΩ adds its thermal noise and the current noise across it", () => {
    const words = ["compare", "A1.csv", "J1.csv", "--band", "1Hz:1kHz", "--source", "10kΩ", "--json"];
    const { out } = run([...words, "--current", "A1=0.5pA/√Hz", "--gain", "J1=2"]);
    const { comparison } = JSON.parse(out) as Compared;
    const { comparison: without } = JSON.parse(run(words).out) as Compared;
    const rmsOf = ({ rows }: Compared["comparison"], name: string): number =>
      rows.find((row) => row.name === name)?.rms ?? Number.NaN;
    const current = Math.sqrt(rmsOf(comparison, "A1") ** 2 - rmsOf(without, "A1") ** 2);
    expect(Math.abs(current / (0.5e-12 * 1e4 * Math.sqrt(999)) - 1)).toBeLessThan(1e-9);
    expect(rmsOf(comparison, "J1")).toBeGreaterThan(rmsOf(without, "J1"));
    expect(comparison.notes[0]).toBe("Source of 10 kΩ at 25 °C (assumed), its thermal noise included.");
  });

  test("a curve named twice is told apart by its path; a current for no curve is refused", () => {
    expect(run(["compare", "R1.csv", "R1.csv", "--band", "1Hz:2Hz"]).complaint).toMatch(/different names/);
    const { complaint, status } = run(["compare", "R1.csv", "--band", "1Hz:2Hz", "--current", "R2=1pA/√Hz"]);
    expect([status, complaint]).toEqual([1, 'Expected --current for one of the curves, R1=...; got "R2=1pA/√Hz".\n']);
  });
});

describe("quietband report", () => {
  test("writes one document in four forms, the plot embedded or beside", () => {
    const { status, out } = run(["report", "strain-channel.json"]);
    expect(status).toBe(0);
    expect(out).toMatch(/to attack first +amplifier A1 +87 % of the power; halved, the total would be 10\.63 nV/);
    const { written } = run([
      "report",
      "strain-channel.json",
      "--as",
      "markdown",
      "--output",
      "a.md",
      "--plot",
      "a.svg",
    ]);
    expect(written.get("a.md")).toContain("](a.svg)");
    expect(written.get("a.svg")).toMatch(/^<svg /);
    expect(run(["report", "strain-channel.json", "--as", "csv"]).out).toMatch(/^section,figure,value,unit/);
    const { title } = JSON.parse(run(["report", "strain-channel.json", "--as", "json"]).out) as { title: string };
    expect(title).toContain("INVENTED");
  });

  test("a form it does not know is a wrong use", () => {
    const { status, complaint } = run(["report", "strain-channel.json", "--as", "pdf"]);
    expect([status, complaint]).toEqual([2, "quietband report writes text, markdown, csv, json; got --as pdf.\n"]);
  });
});

test.each([
  [
    ["report", "strain-channel.json"],
    ["reading curves 3", "step", "step", "step", "end"],
  ],
  [
    ["budget", "strain-channel.json"],
    ["reading curves 3", "step", "step", "step", "end"],
  ],
  [
    ["compare", "A1.csv", "R1.csv", "--band", "1Hz:2Hz"],
    ["reading 2", "step", "step", "end"],
  ],
])("%o says how far reading has come", (words, expected) => {
  expect(run(words).progress).toEqual(expected);
});

test("a file that cannot be read takes the display of progress away too", () => {
  const { status, progress } = run(["compare", "A1.csv", "strain-channel.json", "--band", "1Hz:2Hz"]);
  expect([status, ...progress]).toEqual([1, "reading 2", "step", "end"]);
});
