import { MalformedDataError } from "@quietband/core";
import { expect, test } from "vitest";
import { parseFile } from "../../src/file/parse-file.js";

test("what is no JSON is refused in one line, whatever the parser quotes", () => {
  const run = () => parseFile('{\n  "a": 1,\n  "b": x\n}', "A chain file");
  expect(run).toThrow(MalformedDataError);
  expect(run).toThrow(/^A chain file must be JSON; [^\n]*\.$/);
});

test("a key that stands twice is refused by name", () => {
  expect(parseFile('{"a": {"b": 1}, "b": 2}', "A file")).toEqual({ a: { b: 1 }, b: 2 });
  expect(() => parseFile('{"a": 1, "a": 2}', "A file")).toThrow(/"a" stands twice/);
});
