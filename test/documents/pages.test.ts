import { spawnSync } from "node:child_process";
import { describe, expect, test } from "vitest";
import { holds, runExample } from "../support/example.js";
import { filesBelow, root, textOf } from "../support/sources.js";

const pages = ["README.md", ...filesBelow("docs", (path) => path.endsWith(".md"))];
const blocksOf = (page: string, language: string): string[] =>
  [...textOf(page).matchAll(new RegExp(`^\`\`\`${language}\\n([\\s\\S]*?)^\`\`\``, "gm"))].map(
    (match) => match[1] ?? "",
  );

describe("every TypeScript block of the pages gives what it shows", () => {
  const blocks = pages.flatMap((page) => blocksOf(page, "ts").map((block, index) => ({ page, index, block })));

  test("there are some", () => expect(blocks.length).toBeGreaterThan(5));

  test.each(blocks)("$page, block $index", async ({ block }) => {
    const claims = await runExample(block);
    expect(claims.length, "a block shows at least one result").toBeGreaterThan(0);
    for (const claim of claims)
      expect(holds(claim), `expected ${claim.expected}, got ${String(claim.actual)}`).toBe(true);
  });
});

describe("every console block prints what it shows", () => {
  const blocks = pages.flatMap((page) => blocksOf(page, "console").map((block, index) => ({ page, index, block })));

  test.each(blocks)("$page, block $index", ({ block }) => {
    const [typed = "", ...shown] = block.trimEnd().split("\n");
    const words = [...typed.replace(/^\$ quietband /, "").matchAll(/"([^"]*)"|(\S+)/g)].map(
      (match) => match[1] ?? match[2] ?? "",
    );
    const ran = spawnSync(process.execPath, ["packages/figures/bin/quietband.js", ...words], {
      cwd: root,
      encoding: "utf8",
    });
    expect(ran.stderr).toBe("");
    expect(ran.stdout.trimEnd()).toBe(shown.join("\n").trimEnd());
  });
});
