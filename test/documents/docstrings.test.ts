import { describe, expect, test } from "vitest";
import { holds, runExample } from "../support/example.js";
import { filesBelow, textOf } from "../support/sources.js";

const sources = filesBelow("packages", (path) => /\/src\/.*\.ts$/.test(path) && !path.endsWith(".d.ts"));

const examples = sources.flatMap((path) =>
  [...textOf(path).matchAll(/^ \* ```ts\n([\s\S]*?)^ \* ```/gm)].map((match) => ({
    path,
    block: (match[1] ?? "").replace(/^ \* ?/gm, ""),
  })),
);

describe("examples in docstrings give what they show", () => {
  test.each(examples)("$path", async ({ block }) => {
    const claims = await runExample(block);
    expect(claims.length, "an example shows at least one result").toBeGreaterThan(0);
    for (const claim of claims)
      expect(holds(claim), `expected ${claim.expected}, got ${String(claim.actual)}`).toBe(true);
  });
});

test("every function the roofs export has an example", () => {
  const missing = ["core", "figures"].flatMap((name) => {
    const exports = [...textOf(`packages/${name}/src/index.ts`).matchAll(/export \{([^}]*)\} from "\.\/([^"]+)\.js"/g)];
    return exports.flatMap(([, names = "", file = ""]) => {
      const text = textOf(`packages/${name}/src/${file}.ts`);
      return names
        .split(",")
        .map((part) => part.trim())
        .filter((part) => part !== "" && !part.startsWith("type "))
        .filter((part) => new RegExp(`export function ${part}\\b`).test(text))
        .filter((part) => {
          const before = text.slice(0, text.search(new RegExp(`export function ${part}\\b`)));
          return !/@example[\s\S]*?\*\/\s*$/.test(before.slice(before.lastIndexOf("/**")));
        })
        .map((part) => `${name}: ${part}`);
    });
  });
  expect(missing).toEqual([]);
});
