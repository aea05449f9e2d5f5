import { expect, test } from "vitest";
import { textTable } from "../../src/show/text-table.js";

const columns = [
  { heading: "source" },
  { heading: "noise", unit: "V" },
  { heading: "share", unit: "%", digits: 3 },
  { heading: "basis" },
];

test("aligns texts left and numbers right, each with its unit and prefix", () => {
  const table = {
    columns,
    rows: [
      ["bridge", 5.606e-9, 9.56, "350 Ω at 25 °C"],
      ["amplifier A1", 16.93e-9, 87.2, ""],
    ],
  };
  expect(textTable(table)).toBe(
    [
      "source            noise    share   basis",
      "────────────   ────────   ──────   ──────────────",
      "bridge         5.606 nV   9.56 %   350 Ω at 25 °C",
      "amplifier A1   16.93 nV   87.2 %",
    ].join("\n"),
  );
});

test("keeps columns straight with wide characters and combining marks", () => {
  const lines = textTable({
    columns: [{ heading: "part" }, { heading: "n" }],
    rows: [
      ["雑音", 1],
      ["re\u0301sistance", 2],
    ],
  }).split("\n");
  expect(lines[2]).toBe("雑音         1");
  expect(lines[3]).toBe("re\u0301sistance   2");
});

test("a label cannot break the line or steer the terminal", () => {
  const text = textTable({ columns: [{ heading: "part" }], rows: [["a\nb\u001b[2Jc"]] });
  expect(text.split("\n").length).toBe(3);
  expect(text).not.toContain("\u001b");
});

test("an empty cell does not turn a column of numbers into texts", () => {
  const lines = textTable({ columns: [{ heading: "value", unit: "V" }], rows: [[1e-6], [""], [100e-6]] }).split("\n");
  expect(lines[2]).toBe("  1 µV");
});

test("a column stands as it is told", () => {
  const table = { columns: [{ heading: "verdict", align: "right" as const }], rows: [["agrees"], ["no"]] };
  expect(textTable(table).split("\n").at(-1)).toBe("     no");
});

test("refuses a row of another length and a table without columns", () => {
  expect(() => textTable({ columns, rows: [["bridge", 1]] })).toThrow(/one cell per column, 4; row 0 has 2/);
  expect(() => textTable({ columns: [], rows: [] })).toThrow(/at least one column/);
});
