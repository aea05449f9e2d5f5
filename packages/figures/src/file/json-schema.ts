/** The part of JSON Schema (2020-12) that describes a chain file. */
export type JsonSchema =
  | {
      readonly description?: string;
      readonly type: "object";
      readonly properties: Readonly<Record<string, JsonSchema>>;
      readonly required: readonly string[];
      readonly minProperties?: number;
      readonly additionalProperties: false;
    }
  | {
      readonly description?: string;
      readonly type: "array";
      readonly items: JsonSchema;
      readonly minItems?: number;
      readonly maxItems?: number;
    }
  | {
      readonly description?: string;
      readonly type: "number" | "integer";
      readonly minimum?: number;
      readonly maximum?: number;
      readonly exclusiveMinimum?: number;
    }
  | {
      readonly description?: string;
      readonly type: "string";
      readonly minLength: number;
      readonly examples?: readonly string[];
    }
  | { readonly description?: string; readonly enum: readonly string[] }
  | { readonly description?: string; readonly const: string }
  /** One shape or another by the type of the value: a number or a text, one record or a list. */
  | { readonly description?: string; readonly anyOf: readonly JsonSchema[] }
  /** One record or another by the text under `kind`. */
  | { readonly description?: string; readonly oneOf: readonly JsonSchema[] }
  | { readonly $ref: string };

/** Short ways to write schemas. */
export const text = (description: string, ...examples: readonly string[]): JsonSchema => ({
  description,
  type: "string",
  minLength: 1,
  ...(examples.length > 0 && { examples }),
});

export const record = (
  description: string,
  required: Readonly<Record<string, JsonSchema>>,
  optional: Readonly<Record<string, JsonSchema>> = {},
): JsonSchema => ({
  description,
  type: "object",
  properties: { ...required, ...optional },
  required: Object.keys(required),
  additionalProperties: false,
});

/** A record that is told from others by the text under `kind`. */
export const kind = (
  name: string,
  description: string,
  required: Readonly<Record<string, JsonSchema>>,
  optional: Readonly<Record<string, JsonSchema>> = {},
): JsonSchema => record(description, { kind: { const: name }, ...required }, optional);
