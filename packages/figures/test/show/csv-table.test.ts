import { array, assert as check, constantFrom, double, oneof, property, string } from "fast-check";
import { expect, test } from "vitest";
import { csvTable } from "../../src/show/csv-table.js";

test("writes numbers in full and their unit into the heading", () => {
  const table = {
    columns: [{ heading: "source" }, { heading: "noise", unit: "V" }],
    rows: [["bridge", 5.6061234567e-9]],
  };
  expect(csvTable(table)).toBe("source,noise [V]\r\nbridge,5.6061234567e-9\r\n");
});

test("quotes what needs quotes and nothing else", () => {
  const row = ['say "hi"', "a,b", "c\nd", "e\rf", " g "];
  const columns = row.map((_, index) => ({ heading: String(index) }));
  expect(csvTable({ columns, rows: [row] })).toBe('0,1,2,3,4\r\n"say ""hi""","a,b","c\nd","e\rf", g \r\n');
});

/** RFC 4180 read back by the letter: a second, slow, obvious implementation. */
function readCsv(text: string): string[][] {
  const rows: string[][] = [[]];
  let field = "";
  let quoted = false;
  for (let at = 0; at < text.length; at += 1) {
    const character = text[at] as string;
    if (quoted) {
      if (character !== '"') field += character;
      else if (text[at + 1] === '"') {
        field += '"';
        at += 1;
      } else quoted = false;
    } else if (character === '"') quoted = true;
    else if (character === ",") {
      rows.at(-1)?.push(field);
      field = "";
    } else if (character === "\r" && text[at + 1] === "\n") {
      rows.at(-1)?.push(field);
      field = "";
      rows.push([]);
      at += 1;
    } else field += character;
  }
  return rows.slice(0, -1);
}

test("comes back from a reader of RFC 4180 cell by cell, numbers to the last bit", () => {
  const cell = oneof(
    string(),
    constantFrom('"', ",", "\r\n", "\n", '",'),
    double({ noNaN: true, noDefaultInfinity: true }),
  );
  check(
    property(array(array(cell, { minLength: 3, maxLength: 3 })), (rows) => {
      const columns = ["a", "b,c", 'd"e'].map((heading) => ({ heading }));
      const [heading, ...read] = readCsv(csvTable({ columns, rows }));
      expect(heading).toEqual(["a", "b,c", 'd"e']);
      expect(read).toEqual(rows.map((row) => row.map(String)));
      for (const [index, row] of rows.entries())
        for (const [place, value] of row.entries())
          if (typeof value === "number") expect(Number(read[index]?.[place])).toBe(value === 0 ? 0 : value);
    }),
    { seed: 3, numRuns: 300 },
  );
});

test("refuses a row of another length", () => {
  expect(() => csvTable({ columns: [{ heading: "a" }], rows: [[1, 2]] })).toThrow(/row 0 has 2/);
});
