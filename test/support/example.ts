import * as core from "@quietband/core";
import * as figures from "@quietband/figures";
import { transformSync } from "esbuild";
import { relativeError } from "./relative.js";

const modules: Readonly<Record<string, object>> = { "@quietband/core": core, "@quietband/figures": figures };

/** One executed claim of an example: what stood after the arrow, and what came out. */
export interface Claim {
  readonly expected: string;
  readonly actual: unknown;
}

/**
 * Runs a block of TypeScript from the documentation. Lines `expression; // → 1.23e-6` are claims; imports from the two
 * packages are served from source. `extra` adds names, for instance files of the demonstration.
 */
export async function runExample(block: string, extra: Readonly<Record<string, unknown>> = {}): Promise<Claim[]> {
  const claims: Claim[] = [];
  const claim = (actual: unknown, expected: string): void => {
    claims.push({ expected, actual });
  };
  const marked = block
    .split("\n")
    .map((line) => {
      const match = /^(?!\s*\/\/)(.*?);\s*\/\/ → (.*)$/.exec(line);
      if (match === null) return line;
      const [, expression = "", expected = ""] = match;
      const declared = /^\s*(?:const|let) (\w+) =/.exec(expression);
      if (declared !== null) return `${expression}; __claim(${declared[1]}, ${JSON.stringify(expected)});`;
      return `__claim(${expression}, ${JSON.stringify(expected)});`;
    })
    .join("\n");
  const body = marked.replace(
    /import (?:type )?\{([^}]*)\} from "(@quietband\/\w+)";/g,
    (_, names: string, from: string) =>
      `const {${names.replace(/\btype \w+,?/g, "").replace(/(\w+) as (\w+)/g, "$1: $2")}} = __modules[${JSON.stringify(from)}];`,
  );
  const code = transformSync(`async function __run() {${body}\n}`, { loader: "ts" }).code;
  const run = new Function("__claim", "__modules", ...Object.keys(extra), `${code}; return __run();`) as (
    ...given: unknown[]
  ) => Promise<void>;
  await run(claim, modules, ...Object.values(extra));
  return claims;
}

/** Whether a value rounds to the digits shown, is the text shown, or has the JSON shown. */
export function holds({ expected, actual }: Claim): boolean {
  const number = /^[−-]?[\d.]+(?:e[+-]?\d+)?$/.test(expected) ? Number(expected.replace("−", "-")) : undefined;
  if (number !== undefined && typeof actual === "number") {
    const digits = expected.replace(/e.*$/, "").replace(/[^\d]/g, "").replace(/^0+/, "").length;
    return number === actual || relativeError(actual, number) <= 0.5000001 * 10 ** (1 - digits) * scaleOf(number);
  }
  if (typeof actual === "string") return actual === expected;
  return JSON.stringify(actual) === expected;
}

/** Half a unit of the last digit shown, relative to a mantissa between 1 and 10. */
function scaleOf(value: number): number {
  const mantissa = Math.abs(value) / 10 ** Math.floor(Math.log10(Math.abs(value)));
  return 1 / mantissa;
}
