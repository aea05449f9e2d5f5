/**
 * The first key that stands twice in one record of a JSON text, which a parser would settle in silence by its last value;
 * undefined where there is none. The text must be valid JSON.
 */
export function repeatedKey(json: string): string | undefined {
  const open: (Set<string> | undefined)[] = [];
  for (const [token, , colon] of json.matchAll(/("(?:[^"\\]|\\.)*")(\s*:)?|[{}[\]]/g)) {
    if (token === "{") open.push(new Set());
    else if (token === "[") open.push(undefined);
    else if (token === "}" || token === "]") open.pop();
    else if (colon !== undefined) {
      const key = JSON.parse(token.slice(0, -colon.length)) as string;
      const keys = open.at(-1);
      if (keys?.has(key) === true) return key;
      keys?.add(key);
    }
  }
  return undefined;
}
