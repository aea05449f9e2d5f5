import { readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { picksSchema } from "../../src/pick/picks-schema.js";

test("the published copy in the documents is this schema", () => {
  const published = readFileSync(new URL("../../../../docs/picks.schema.json", import.meta.url), "utf8");
  expect(JSON.parse(published)).toEqual(picksSchema);
});

test("it is frozen to the last list, and every record closes its keys", () => {
  const problems: string[] = [];
  const visit = (value: unknown, at: string): void => {
    if (typeof value !== "object" || value === null) return;
    const schema = value as Readonly<Record<string, unknown>>;
    if (!Object.isFrozen(value)) problems.push(`${at}: not frozen`);
    if (schema["type"] === "object" && schema["additionalProperties"] !== false) problems.push(`${at}: open`);
    for (const [key, inner] of Object.entries(value)) visit(inner, `${at}/${key}`);
  };
  visit(picksSchema, "");
  expect(problems).toEqual([]);
});
