import fc from "fast-check";
import { expect, test } from "vitest";
import { curveComments, readComment, writeComment } from "../../src/curve/curve-comments.js";

test.each([
  ["document: data sheet, rev. B", { key: "document", value: "data sheet, rev. B" }],
  [" load :  1 µF ", { key: "load", value: "1 µF" }],
  ["read at 12:30 from https://example.org", { key: "", value: "read at 12:30 from https://example.org" }],
  [": note: the plot starts at 1 Hz", { key: "", value: "note: the plot starts at 1 Hz" }],
  ["revision:", { key: "revision", value: "" }],
  [`${"long ".repeat(20)}: x`, { key: "", value: `${"long ".repeat(20)}: x` }],
  ["", undefined],
  [" : ", undefined],
])("%j", (text, entry) => {
  expect(readComment(text)).toEqual(entry);
});

test("settings are told from provenance whatever their capitals, and stand once", () => {
  const comments = [
    { line: 1, text: " Label: R1" },
    { line: 2, text: "figure: 7" },
    { line: 3, text: "Axis uncertainty: 3 %" },
    { line: 4, text: "uncertainty: 4 %" },
  ];
  expect(curveComments(comments)).toEqual({
    label: { text: "R1", line: 1 },
    pointUncertainty: { text: "4 %", line: 4 },
    axisUncertainty: { text: "3 %", line: 3 },
    source: [{ key: "figure", value: "7" }],
  });
  expect(() => curveComments([...comments, { line: 9, text: "point uncertainty: 5 %" }])).toThrow(
    'Line 9: "# point uncertainty:" stands on line 4 already',
  );
});

test("reads back what it wrote", () => {
  const word = fc
    .array(fc.constantFrom("a", ":", " ", "#", "1", "é", ";"), { maxLength: 12 })
    .map((all) => all.join(""));
  fc.assert(
    fc.property(word, (text) => {
      const entry = readComment(text);
      if (entry === undefined) return;
      const written = writeComment(entry);
      expect(written.startsWith("# ")).toBe(true);
      expect(readComment(written.slice(1))).toEqual(entry);
    }),
    { numRuns: 3000, seed: 6 },
  );
});
