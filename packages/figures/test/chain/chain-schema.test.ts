import { readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { chainSchema } from "../../src/chain/chain-schema.js";
import { checkAgainstSchema, type SchemaDefinitions } from "../../src/file/check-against-schema.js";
import type { JsonSchema } from "../../src/file/json-schema.js";
import { everyKind } from "./support/every-kind.js";

const { $defs, ...whole } = chainSchema;
const definitions = $defs as SchemaDefinitions;

test("the published copy in the documents is this schema", () => {
  const published = readFileSync(new URL("../../../../docs/chain.schema.json", import.meta.url), "utf8");
  expect(JSON.parse(published)).toEqual(chainSchema);
});

test("it is frozen to the last list", () => {
  const thawed: string[] = [];
  const visit = (value: unknown, at: string): void => {
    if (typeof value !== "object" || value === null) return;
    if (!Object.isFrozen(value)) thawed.push(at);
    for (const [key, inner] of Object.entries(value)) visit(inner, `${at}/${key}`);
  };
  visit(chainSchema, "");
  expect(thawed).toEqual([]);
});

test("every reference in it is defined, and every record closes its keys", () => {
  const problems: string[] = [];
  const visit = (value: unknown, at: string): void => {
    if (typeof value !== "object" || value === null) return;
    const schema = value as Readonly<Record<string, unknown>>;
    if (typeof schema["$ref"] === "string" && definitions[schema["$ref"].replace("#/$defs/", "")] === undefined)
      problems.push(`${at}: ${schema["$ref"]}`);
    if (schema["type"] === "object" && schema["additionalProperties"] !== false) problems.push(`${at}: open`);
    for (const [key, inner] of Object.entries(value)) visit(inner, `${at}/${key}`);
  };
  visit(chainSchema, "");
  expect(problems).toEqual([]);
});

test("it accepts a chain with every kind of source, and that chain leaves out no kind", () => {
  expect(() => checkAgainstSchema(everyKind, whole as JsonSchema, definitions)).not.toThrow();
  const known = (
    definitions["source"] as unknown as {
      readonly oneOf: readonly { readonly properties: { readonly kind: { readonly const: string } } }[];
    }
  ).oneOf;
  const used = new Set(everyKind.sources.map(({ kind }) => kind));
  expect(known.map(({ properties }) => properties.kind.const).filter((kind) => !used.has(kind))).toEqual([]);
});
