import fc from "fast-check";
import { afterEach, describe, expect, test, vi } from "vitest";
import { demoCurve } from "../../../../test/support/published.js";
import { readCurve } from "../../src/curve/read-curve.js";
import { NoiseError } from "../../src/ground/errors.js";

/** Reads, and holds the promise: the module's own error, or a curve that is sorted, positive and finite throughout. */
function readsOrRefuses(text: string): "read" | "refused" {
  try {
    const { points, commonUncertainty, unit } = readCurve(text);
    expect(unit).not.toBe("");
    expect(commonUncertainty >= 0 && commonUncertainty <= 1).toBe(true);
    let last = 0;
    for (const { frequency, density, uncertainty } of points) {
      expect(frequency > last && frequency <= 1e150).toBe(true);
      expect(density >= 1e-150 && density <= 1e150).toBe(true);
      expect(uncertainty > 0 && uncertainty <= 1).toBe(true);
      last = frequency;
    }
    expect(points.length).toBeGreaterThanOrEqual(2);
    return "read";
  } catch (error) {
    if (error instanceof NoiseError) {
      expect(error.message).toMatch(/[.?]$/);
      expect(error.message).not.toMatch(/\p{Cc}/u);
      return "refused";
    }
    throw error;
  }
}

const valid = [
  ...(["R1", "A1", "J1", "X1"] as const).map((part) => demoCurve(part)),
  "# label: x\n# axis uncertainty: 3 %\n# uncertainty: 0.4 dB\nf [Hz], S [V²/Hz], u [%], common axis [%]\n1, 4n7, 5, 0.1\n2, 9, -, -2\n",
  "1k2 Hz 85 nV/√Hz ±5 %\n10 Hz 0.12 µV/√Hz - aside\n1e3 Hz 1 V/√Hz 1 dB",
];

describe("whatever the text, readCurve gives a sound curve or its own error", () => {
  test("for characters of any kind", () => {
    const text = fc.oneof(
      fc.string({ unit: "binary", maxLength: 200 }),
      fc.string({ unit: "grapheme", maxLength: 200 }),
    );
    fc.assert(
      fc.property(text, (given) => {
        readsOrRefuses(given);
      }),
      { numRuns: 3000, seed: 11 },
    );
  });

  test("for the words of curves in any order", () => {
    const word = fc.constantFrom(
      ..."0 1 9 . , ; : # - + − ± e E k µ μ n R K / √ ² ^ ( ) [ ] % _ ∞".split(" "),
      ..." |\t|\n|\r|\r\n|aside|common|label|uncertainty|axis uncertainty|Hz|kHz|nV/√Hz|V²/Hz|dBV/√Hz|dB|rt|sqrt|Infinity|NaN".split(
        "|",
      ),
      "frequency [Hz], density [nV/√Hz]\n",
      "1e308",
      "1e-324",
      "\u0000",
      "\ufeff",
      "\u2028",
      "\ud800",
    );
    fc.assert(
      fc.property(fc.array(word, { maxLength: 60 }), (words) => {
        readsOrRefuses(words.join(""));
      }),
      { numRuns: 10_000, seed: 12 },
    );
  });

  test("for texts that are right", () => {
    expect(valid.map((text) => readsOrRefuses(text))).toEqual(valid.map(() => "read"));
  });

  test("for texts that were right before someone typed into them", () => {
    const slip = fc.record({
      at: fc.integer({ min: 0, max: 999 }),
      remove: fc.nat({ max: 3 }),
      insert: fc.oneof(
        fc.string({ maxLength: 3 }),
        fc.constantFrom("\n", "\t", ";", ",", "#", "-", "e9", "µ", "Hz", " ", "0", "aside"),
      ),
    });
    const outcomes = { read: 0, refused: 0 };
    fc.assert(
      fc.property(fc.constantFrom(...valid), fc.array(slip, { minLength: 1, maxLength: 4 }), (text, slips) => {
        let typed = text;
        for (const { at, remove, insert } of slips) {
          const place = Math.floor((at / 1000) * typed.length);
          typed = typed.slice(0, place) + insert + typed.slice(place + remove);
        }
        outcomes[readsOrRefuses(typed)] += 1;
      }),
      { numRuns: 5000, seed: 13 },
    );
    // the test would be idle if nearly all were read, or nearly none
    expect(Math.min(outcomes.read, outcomes.refused)).toBeGreaterThan(500);
  });
});

const point = fc.record({
  frequency: fc.integer({ min: 1, max: 1e9 }),
  mantissa: fc.integer({ min: 1, max: 1e9 }),
});
const points = fc.uniqueArray(point, { selector: ({ frequency }) => frequency, minLength: 2, maxLength: 12 });

test("a curve does not depend on the order of its rows", () => {
  fc.assert(
    fc.property(points, fc.func(fc.nat()), (given, key) => {
      const read = (rows: typeof given): unknown =>
        readCurve(
          `f [Hz], e [pV/√Hz]\n${rows.map(({ frequency, mantissa }) => `${frequency}, ${mantissa}`).join("\n")}`,
        ).points.map(({ frequency, density, uncertainty, inFit }) => [frequency, density, uncertainty, inFit]);
      expect(read(given.toSorted((one, other) => key(one.frequency) - key(other.frequency)))).toEqual(read(given));
    }),
    { numRuns: 300, seed: 14 },
  );
});

test("a curve does not depend on the prefix, place of the unit, separator or decimal mark", () => {
  const prefixes = [
    ["f", 0],
    ["p", 3],
    ["n", 6],
    ["µ", 9],
    ["u", 9],
    ["m", 12],
    ["", 15],
  ] as const;
  const heads = fc.constantFrom(...prefixes);
  /** A whole number with its point moved left: the same decimal in another unit. */
  const moved = (whole: number, places: number): string => {
    const digits = String(whole).padStart(places + 1, "0");
    const cut = digits.length - places;
    return places === 0 ? digits : `${digits.slice(0, cut)}.${digits.slice(cut)}`;
  };
  fc.assert(
    fc.property(
      points,
      heads,
      fc.constantFrom(", ", ";", "\t", " "),
      fc.boolean(),
      fc.boolean(),
      (given, head, separator, inCell, comma) => {
        const [prefix, places] = head;
        const unit = `${prefix}V/√Hz`;
        const withComma = comma && (separator === ";" || separator === "\t");
        const rows = given.map(({ frequency, mantissa }) => {
          const cells = [
            `${moved(frequency, 3)} kHz`,
            inCell ? `${moved(mantissa, places)} ${unit}` : moved(mantissa, places),
          ];
          return cells.join(separator).replaceAll(".", withComma ? "," : ".");
        });
        const plain = readCurve(
          `f [Hz], e [fV/√Hz]\n${given.map(({ frequency, mantissa }) => `${frequency}, ${mantissa}`).join("\n")}`,
        );
        const heading = inCell ? "" : `frequency${separator === " " ? " " : separator}density [${unit}]\n`;
        // where every comma could stand for thousands the text is refused; one more row settles it
        const settled = withComma ? [...rows, `0,0005 kHz${separator}0,5 V/√Hz`] : rows;
        const read = readCurve(`${heading}${settled.join("\n")}`).points.filter(({ frequency }) => frequency !== 0.5);
        expect(read.map(({ frequency, density }) => [frequency, density])).toEqual(
          plain.points.map(({ frequency, density }) => [frequency, density]),
        );
      },
    ),
    { numRuns: 1000, seed: 15 },
  );
});

test("a million rows are read, and not one more", () => {
  const heading = "frequency [Hz], density [nV/√Hz]";
  const rows = Array.from({ length: 1_000_001 }, (_, index) => `${index + 1},5`);
  expect(() => readCurve(`${heading}\n${rows.join("\n")}`)).toThrow("Line 1000002: expected at most 1000000 rows");
  expect(readCurve(`${heading}\n${rows.slice(1).join("\n")}`).points).toHaveLength(1_000_000);
});

describe("the work grows with the length of the text and no faster", () => {
  afterEach(() => vi.restoreAllMocks());

  /** Characters that reading a text looks at: one by one, by searching, by copying and by replacing. */
  function charactersSeen(text: string): number {
    let seen = 0;
    // oxlint-disable-next-line typescript/unbound-method -- each is called with its text as this
    const { charCodeAt, indexOf, slice, replace } = String.prototype;
    vi.spyOn(String.prototype, "charCodeAt").mockImplementation(function (this: string, at) {
      seen += 1;
      return charCodeAt.call(this, at);
    });
    vi.spyOn(String.prototype, "indexOf").mockImplementation(function (this: string, what, from = 0) {
      const found = indexOf.call(this, what, from);
      seen += (found < 0 ? this.length : found) - from + 1;
      return found;
    });
    vi.spyOn(String.prototype, "slice").mockImplementation(function (this: string, from, to) {
      const part = slice.call(this, from, to);
      seen += part.length;
      return part;
    });
    vi.spyOn(String.prototype, "replace").mockImplementation(function (this: string, ...given: never[]) {
      seen += this.length;
      return (replace as (...all: never[]) => string).apply(this, given);
    } as typeof String.prototype.replace);
    readsOrRefuses(text);
    vi.restoreAllMocks();
    return seen;
  }

  const heading = "f [Hz], e [nV/√Hz]\n";
  const hostile: readonly (readonly [string, (size: number) => string])[] = [
    ["rows", (size) => heading + Array.from({ length: size / 8 }, (_, index) => `${index + 1}, 5`).join("\n")],
    [
      "rows with units",
      (size) =>
        Array.from({ length: size / 20 }, (_, index) => `${index + 1} Hz; 8,5n V/√Hz`.replace("n V", " nV")).join("\n"),
    ],
    ["rows without end of a comment", (size) => `${heading}1, 2\n2, 3\n${" \n".repeat(size / 2)}#`],
    ["comments", (size) => "# a: b\n".repeat(size / 7) + heading],
    ["blank lines", (size) => "\n".repeat(size)],
    ["carriage returns", (size) => "\r".repeat(size)],
    ["one long number", (size) => `${heading}1, ${"1".repeat(size)}`],
    ["one long word", (size) => `${heading}1, ${"(".repeat(size)}`],
    ["separators", (size) => heading + ",".repeat(size)],
    ["lines at the limit", (size) => heading + `${"1,".repeat(499)}\n`.repeat(size / 999)],
    ["long blanks", (size) => heading + `${" ".repeat(990)}x\n`.repeat(size / 992)],
    ["exponents", (size) => heading + `1e${"9".repeat(900)}, 1\n`.repeat(size / 905)],
    ["brackets in a heading", (size) => `${"[(".repeat(Math.min(size / 2, 500))}\n1, 2\n2, 3`],
  ];

  test.each(hostile)("%s", (_, make) => {
    const size = 40_000;
    const short = make(size);
    const long = make(2 * size);
    const [few, many] = [charactersSeen(short), charactersSeen(long)];
    expect(few).toBeLessThan(30 * short.length + 2000);
    expect(many).toBeLessThan(2.2 * few + 2000);
  });
});
