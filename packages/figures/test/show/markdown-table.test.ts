import { expect, test } from "vitest";
import { escapeMarkdown, markdownTable } from "../../src/show/markdown-table.js";

test("is a table with pipes, numbers to the right", () => {
  const table = {
    columns: [{ heading: "source" }, { heading: "noise", unit: "V" }],
    rows: [
      ["bridge", 5.606e-9],
      ["amplifier", 16.93e-9],
    ],
  };
  expect(markdownTable(table)).toBe(
    ["| source | noise |", "| --- | ---: |", "| bridge | 5.606 nV |", "| amplifier | 16.93 nV |"].join("\n"),
  );
});

test("a label shows as it was typed and cannot break the table", () => {
  expect(escapeMarkdown("a|b *c* _d_ <e> & `f`\n[g]\\")).toBe("a\\|b \\*c\\* \\_d\\_ &lt;e> &amp; \\`f\\` \\[g\\]\\\\");
  const text = markdownTable({ columns: [{ heading: "a|b" }], rows: [["c\n| d |"]] });
  expect(text.split("\n").length).toBe(3);
  expect(text.split("\n").map((line) => line.replace(/\\\|/g, "").split("|").length)).toEqual([3, 3, 3]);
});

test("refuses a row of another length", () => {
  expect(() => markdownTable({ columns: [{ heading: "a" }], rows: [[1, 2]] })).toThrow(/row 0 has 2/);
});
