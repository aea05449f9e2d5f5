import { MalformedDataError } from "@quietband/core";
import { shown } from "../convert/domain.js";
import type { JsonSchema } from "./json-schema.js";

/** Definitions by name, as under `$defs`. */
export type SchemaDefinitions = Readonly<Record<string, JsonSchema>>;

/**
 * Refuses a value that does not have the shape of a schema, in one sentence with the place as a JSON pointer (RFC 6901):
 * "At /sources/2/resistance: ...".
 */
export function checkAgainstSchema(
  value: unknown,
  schema: JsonSchema,
  definitions: SchemaDefinitions,
  pointer = "",
): void {
  if ("$ref" in schema) {
    checkAgainstSchema(value, definitions[schema.$ref.slice("#/$defs/".length)] as JsonSchema, definitions, pointer);
    return;
  }
  const check = (inner: unknown, at: JsonSchema, step: string | number): void =>
    checkAgainstSchema(inner, at, definitions, `${pointer}/${escaped(step)}`);
  if ("const" in schema) requireListed(value, [schema.const], pointer);
  else if ("enum" in schema) requireListed(value, schema.enum, pointer);
  else if ("oneOf" in schema)
    checkAgainstSchema(value, branchByKind(value, schema.oneOf, pointer), definitions, pointer);
  else if ("anyOf" in schema)
    checkAgainstSchema(value, branchByType(value, schema.anyOf, definitions, pointer), definitions, pointer);
  else if (schema.type === "object") checkRecord(value, schema, check, pointer);
  else if (schema.type === "array") checkList(value, schema, check, pointer);
  else if (schema.type === "string") requireText(value, pointer);
  else requireNumber(value, schema, pointer);
}

/** An error that says where in the file it is. */
export function malformedAt(pointer: string, message: string): MalformedDataError {
  return new MalformedDataError(`At ${pointer === "" ? "the top of the file" : pointer}: ${message}`);
}

type Of<Type extends string> = Extract<JsonSchema, { readonly type: Type }>;
type Check = (inner: unknown, schema: JsonSchema, step: string | number) => void;

function checkRecord(value: unknown, schema: Of<"object">, check: Check, pointer: string): void {
  const { properties, required, minProperties = 0 } = schema;
  const known = Object.keys(properties);
  if (
    typeof value !== "object" ||
    value === null ||
    Array.isArray(value) ||
    Object.keys(value).length < minProperties
  ) {
    const wanted = (required.length > 0 ? required : known).join(", ");
    throw malformedAt(pointer, `expected a record with ${wanted}; got ${what(value)}.`);
  }
  for (const key of Object.keys(value))
    if (!known.includes(key))
      throw malformedAt(pointer, `nothing is called "${key.slice(0, 40)}" here; known are ${known.join(", ")}.`);
  for (const key of required)
    if (!Object.hasOwn(value, key))
      throw malformedAt(pointer, `"${key}" is missing; needed are ${required.join(", ")}.`);
  for (const [key, inner] of Object.entries(value)) check(inner, properties[key] as JsonSchema, key);
}

function checkList(
  value: unknown,
  { items, minItems = 0, maxItems = Number.POSITIVE_INFINITY }: Of<"array">,
  check: Check,
  pointer: string,
): void {
  if (!Array.isArray(value)) throw malformedAt(pointer, `expected a list; got ${what(value)}.`);
  if (value.length < minItems || value.length > maxItems) {
    const wanted = minItems === maxItems ? `${minItems}` : `at least ${minItems}`;
    throw malformedAt(pointer, `expected a list of ${wanted}; got ${value.length}.`);
  }
  for (const [index, inner] of value.entries()) check(inner, items, index);
}

function requireText(value: unknown, pointer: string): void {
  if (typeof value !== "string" || value.trim() === "")
    throw malformedAt(pointer, `expected a text, with the unit where it is a quantity; got ${what(value)}.`);
}

function requireNumber(value: unknown, schema: Of<"number" | "integer">, pointer: string): void {
  const { type, minimum, maximum, exclusiveMinimum: above } = schema;
  const limits: readonly (readonly [number | undefined, string, (given: number, limit: number) => boolean])[] = [
    [minimum, "at least", (given, limit) => given >= limit],
    [maximum, "at most", (given, limit) => given <= limit],
    [above, "above", (given, limit) => given > limit],
  ];
  const right = typeof value === "number" && (type === "integer" ? Number.isInteger(value) : Number.isFinite(value));
  if (right && limits.every(([limit, , holds]) => limit === undefined || holds(value, limit))) return;
  const wanted = [
    type === "integer" ? "a whole number" : "a number",
    ...limits.flatMap(([limit, words]) => (limit === undefined ? [] : [`${words} ${limit}`])),
  ];
  throw malformedAt(pointer, `expected ${wanted.join(", ")}; got ${what(value)}.`);
}

function requireListed(value: unknown, allowed: readonly string[], pointer: string): void {
  if (typeof value === "string" && allowed.includes(value)) return;
  throw malformedAt(pointer, `expected ${allowed.join(", ")}; got ${what(value)}.`);
}

/** Of records that are told apart by `kind`, the one the value names. */
function branchByKind(value: unknown, branches: readonly JsonSchema[], pointer: string): JsonSchema {
  const found = typeof value === "object" && value !== null ? (value as { readonly kind?: unknown }).kind : undefined;
  const names = branches.map(kindOf);
  const branch = branches[names.indexOf(typeof found === "string" ? found : "")];
  if (branch !== undefined) return branch;
  if (found === undefined)
    throw malformedAt(pointer, `expected a record with a kind, one of ${names.join(", ")}; got ${what(value)}.`);
  throw malformedAt(`${pointer}/kind`, `expected ${names.join(", ")}; got ${what(found)}.`);
}

function kindOf(branch: JsonSchema): string {
  const kind = "properties" in branch ? branch.properties["kind"] : undefined;
  return kind !== undefined && "const" in kind ? kind.const : "";
}

/** Of shapes that differ by type, the one the value has; the first, for its message, where it has none. */
function branchByType(
  value: unknown,
  branches: readonly JsonSchema[],
  definitions: SchemaDefinitions,
  pointer: string,
): JsonSchema {
  const types = branches.map((branch) => typeOf(branch, definitions));
  const own = Array.isArray(value) ? "array" : typeof value;
  const branch = branches[types.indexOf(own)];
  if (branch !== undefined) return branch;
  throw malformedAt(
    pointer,
    `expected ${types.map((type) => typeWords[type] ?? type).join(" or ")}; got ${what(value)}.`,
  );
}

const typeWords: Readonly<Record<string, string>> = {
  object: "a record",
  array: "a list",
  string: "a text",
  number: "a number",
};

function typeOf(schema: JsonSchema, definitions: SchemaDefinitions): string {
  if ("$ref" in schema) return typeOf(definitions[schema.$ref.slice("#/$defs/".length)] as JsonSchema, definitions);
  if ("oneOf" in schema) return "object";
  if ("enum" in schema || "const" in schema) return "string";
  if ("anyOf" in schema) return "object";
  return schema.type === "integer" ? "number" : schema.type;
}

function what(value: unknown): string {
  return Array.isArray(value) ? "a list" : shown(value);
}

/** RFC 6901: ~ and / inside a step. */
function escaped(step: string | number): string {
  return String(step).replaceAll("~", "~0").replaceAll("/", "~1");
}
