import { describe, expect, test } from "vitest";
import { readUnit } from "../../src/ground/unit.js";

function read(text: string): unknown[] {
  const unit = readUnit(text);
  return "problem" in unit ? [unit.problem] : [unit.unit, unit.exponent, ...(unit.isLevel ? ["level"] : [])];
}

describe("densities as the trade writes them", () => {
  test.each([
    "nV/√Hz",
    "nV/√(Hz)",
    "nV / √Hz",
    "nV/sqrt(Hz)",
    "nV/SQRT(Hz)",
    "nV/sqrtHz",
    "nV/rtHz",
    "nV/rt(Hz)",
    "nV/rt-Hz",
    "nV/rootHz",
    "nV/root Hz",
    "nV/Hz^0.5",
    "nV/Hz^.5",
    "nV/Hz^(1/2)",
    "nV/Hz^1/2",
    "nV/Hz½",
    "nV/Hz^½",
    "nV·Hz^-0.5",
    "nV*Hz^-1/2",
    "nV/Hz**0.5",
    "nVrms/√Hz",
    "nV RMS/√Hz",
    "nV_rms/√Hz",
    "(nV)/√Hz",
  ])("%s is nV/√Hz", (text) => {
    expect(read(text)).toEqual(["V/√Hz", -9]);
  });

  test.each(["nV²/Hz", "nV^2/Hz", "nV2/Hz", "nV**2/Hz", "(nV)²/Hz", "(nV)^2/Hz", "nVrms²/Hz"])(
    "%s is a square: its prefix counts twice",
    (text) => {
      expect(read(text)).toEqual(["V²/Hz", -18]);
    },
  );

  test.each([
    ["g²/Hz", ["g²/Hz", 0]],
    ["µg/√Hz", ["g/√Hz", -6]],
    ["μg/rtHz", ["g/√Hz", -6]],
    ["ug/rtHz", ["g/√Hz", -6]],
    ["fA/√Hz", ["A/√Hz", -15]],
    ["ppm/√Hz", ["1/√Hz", -6]],
    ["ppm²/Hz", ["1/Hz", -12]],
    ["1/Hz", ["1/Hz", 0]],
    ["m/s²/√Hz", ["m/s²/√Hz", 0]],
    ["(m/s^2)/√Hz", ["m/s²/√Hz", 0]],
    ["(m/s²)²/Hz", ["(m/s²)²/Hz", 0]],
    ["(m/s^2)^2/Hz", ["(m/s²)²/Hz", 0]],
    ["m²/s⁴/Hz", ["(m/s²)²/Hz", 0]],
    ["°/s/√Hz", ["°/s/√Hz", 0]],
    ["mdps/√Hz", ["°/s/√Hz", -3]],
    ["Hz/√Hz", ["Hz/√Hz", 0]],
    ["FS/√Hz", ["FS/√Hz", 0]],
  ])("%s", (text, expected) => {
    expect(read(text)).toEqual(expected);
  });

  test.each([
    ["dBV/√Hz", ["V/√Hz", 0, "level"]],
    ["dB V/√Hz", ["V/√Hz", 0, "level"]],
    ["dBµV/√Hz", ["V/√Hz", -6, "level"]],
    ["dB re 1 µV/√Hz", ["V/√Hz", -6, "level"]],
    ["dB(V/√Hz)", ["V/√Hz", 0, "level"]],
    ["dBV²/Hz", ["V²/Hz", 0, "level"]],
    ["dB re 1 m/√Hz", ["m/√Hz", 0, "level"]],
  ])("%s is a level", (text, expected) => {
    expect(read(text)).toEqual(expected);
  });
});

describe("units with prefixes", () => {
  test.each([
    ["Hz", ["Hz", 0]],
    ["kHz", ["Hz", 3]],
    ["KHz", ["Hz", 3]],
    ["mHz", ["Hz", -3]],
    ["daPa", ["Pa", 1]],
    ["Pa", ["Pa", 0]],
    ["mm/s²", ["m/s²", -3]],
    ["min", ["s", 0]],
    ["m", ["m", 0]],
    ["T", ["T", 0]],
    ["%", ["1", -2]],
    ["kohm", ["Ω", 3]],
    ["k\u2126", ["Ω", 3]],
    ["dB", ["dB", 0]],
    ["dBV", ["V", 0, "level"]],
  ])("%s", (text, expected) => {
    expect(read(text)).toEqual(expected);
  });
});

describe("refusals say what was meant", () => {
  test.each([
    ["nV/Hz", "did you mean nV/√Hz or nV²/Hz?"],
    ["V/Hz", "did you mean V/√Hz or V²/Hz?"],
    ["dBV/Hz", "did you mean dBV/√Hz or dBV²/Hz?"],
    ["m/s²/Hz", "did you mean (m/s²)/√Hz or (m/s²)²/Hz?"],
    ["m/s^2/Hz", "did you mean (m/s²)/√Hz or (m/s²)²/Hz?"],
    ["khz", "did you mean kHz?"],
    ["mhz", "did you mean mHz or MHz?"],
    ["nv/√Hz", "did you mean nV?"],
    ["dBm/Hz", "is a level whose reference the text does not tell"],
    ["dBA", "is a level whose reference the text does not tell"],
    ["nX/√Hz", "is no unit known here"],
    ["min/√Hz", "is no unit known here"],
    ["dB/√Hz", "is no unit known here"],
    ["mppm", "is no unit known here"],
    ["", "is no unit known here"],
    ["V".repeat(1000), "is no unit"],
  ])("%s", (text, said) => {
    expect(read(text)[0]).toContain(said);
  });
});
