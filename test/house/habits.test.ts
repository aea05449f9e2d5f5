import { expect, test } from "vitest";
import { filesBelow, textOf } from "../support/sources.js";

const typescript = (path: string): boolean => path.endsWith(".ts") || path.endsWith(".mjs");
const written = [...filesBelow("packages", typescript), ...filesBelow("test", typescript)];

test("nothing is compared absolutely: densities live at 1e-9", () => {
  const banned = ["toBe", "CloseTo"].join("");
  expect(written.filter((path) => textOf(path).includes(`.${banned}`))).toEqual([]);
});

test("no test is skipped by hand or singled out", () => {
  const offenders = written.filter((path) => /\b(test|describe|it)\.(only|skip|todo)\(/.test(textOf(path)));
  expect(offenders).toEqual([]);
});

test("every unit test mirrors a source by name, or says what it crosses", () => {
  const crossing = new Set(["contract", "vectors"]);
  const stray = ["core", "figures"].flatMap((name) => {
    const sources = new Set(filesBelow(`packages/${name}/src`).map((path) => path.split("/").slice(3).join("/")));
    return filesBelow(`packages/${name}/test`, (path) => path.endsWith(".test.ts"))
      .map((path) => path.split("/").slice(3).join("/"))
      .filter((path) => !sources.has(path.replace(/(\.slow)?\.test\.ts$/, ".ts")))
      .filter((path) => !crossing.has(path.replace(/^.*\//, "").replace(/(\.slow)?\.test\.ts$/, "")));
  });
  expect(stray).toEqual([]);
});

test("the demonstration parts are marked invented", () => {
  const unmarked = filesBelow("fixtures/demo", (path) => path.endsWith(".csv")).filter(
    (path) => !textOf(path).startsWith("# INVENTED"),
  );
  expect(unmarked).toEqual([]);
});

test("no file names a machine's folder", () => {
  const machine = new RegExp(`["'\`( ]/(${["work", "tmp", "root", "home"].join("|")})/`);
  const all = [...written, ...filesBelow("docs"), ...filesBelow("fixtures"), "README.md", "DEVELOPERS.md"];
  expect(all.filter((path) => machine.test(textOf(path)))).toEqual([]);
});
