/** The same value, frozen to its last list: a schema is public and nobody's to change. */
export function deepFrozen<Value>(value: Value): Value {
  if (typeof value === "object" && value !== null) {
    for (const inner of Object.values(value)) deepFrozen(inner);
    Object.freeze(value);
  }
  return value;
}
