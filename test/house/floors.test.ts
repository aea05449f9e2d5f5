import { describe, expect, test } from "vitest";
import { filesBelow, importsOf, textOf } from "../support/sources.js";

/** The house as docs/architecture.md draws it: rooms by floor; a file imports from lower floors or its own room. */
const houses: Readonly<Record<string, Readonly<Record<string, number>>>> = {
  core: { ground: 0, numerics: 1, curve: 2, spectrum: 3, weighting: 3, band: 4, fit: 5, record: 5 },
  figures: { convert: 0, file: 1, chain: 2, judge: 2, pick: 2, show: 3, report: 4, command: 5 },
};

for (const [house, floors] of Object.entries(houses)) {
  const files = filesBelow(`packages/${house}/src`, (path) => path.endsWith(".ts") && !path.endsWith(".d.ts"));
  const roomOf = (path: string): string => path.split("/")[3] ?? "";

  describe(`the house of ${house}`, () => {
    test("every file lives in a room of the plan, but for the roof", () => {
      const astray = files.filter((path) => !path.endsWith("/src/index.ts") && floors[roomOf(path)] === undefined);
      expect(astray).toEqual([]);
    });

    test("files import from lower floors or their own room", () => {
      const climbing = files
        .filter((path) => !path.endsWith("/src/index.ts"))
        .flatMap((path) =>
          importsOf(path)
            .filter((target) => target.endsWith(".ts") && !target.includes("/vendor/"))
            .filter((target) => {
              const [from, to] = [floors[roomOf(path)] ?? -1, floors[roomOf(target)] ?? 99];
              return roomOf(path) !== roomOf(target) && to >= from;
            })
            .map((target) => `${path} imports ${target}`),
        );
      expect(climbing).toEqual([]);
    });

    test("the roof only re-exports", () => {
      const lines = textOf(`packages/${house}/src/index.ts`)
        .split(/;\n/)
        .map((line) => line.trim());
      expect(lines.filter((line) => line !== "" && !line.startsWith("export "))).toEqual([]);
    });

    test("no file passes 300 lines, and none is called utils", () => {
      const long = files.filter((path) => textOf(path).split("\n").length > 301);
      expect(long).toEqual([]);
      expect(files.filter((path) => /util|helper|misc/.test(path))).toEqual([]);
    });
  });
}

test("core knows nothing of figures and of Node", () => {
  const core = filesBelow("packages/core/src", (path) => path.endsWith(".ts"));
  const offenders = core.filter((path) => /from "(node:|@quietband\/figures)/.test(textOf(path)));
  expect(offenders).toEqual([]);
});
