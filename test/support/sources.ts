import { readdirSync, readFileSync, statSync } from "node:fs";
import { dirname, join, relative, resolve } from "node:path";
import { fileURLToPath } from "node:url";

/** Folder of the repository. */
export const root = fileURLToPath(new URL("../..", import.meta.url));

/** Every file below a folder of the repository, as paths relative to the repository. */
export function filesBelow(folder: string, matches: (path: string) => boolean = () => true): string[] {
  const found: string[] = [];
  const visit = (path: string): void => {
    for (const name of readdirSync(path)) {
      if (name === "node_modules" || name === "dist" || name.startsWith(".")) continue;
      const inner = join(path, name);
      if (statSync(inner).isDirectory()) visit(inner);
      else if (matches(inner)) found.push(relative(root, inner));
    }
  };
  visit(join(root, folder));
  return found.toSorted();
}

export function textOf(path: string): string {
  return readFileSync(join(root, path), "utf8");
}

/** Relative imports of a source file, as repository paths with .ts. */
export function importsOf(path: string): string[] {
  const specifiers = [...textOf(path).matchAll(/(?:from|import)\s+"(\.[^"]+)"/g)].map((match) => match[1] as string);
  return specifiers.map((specifier) => relative(root, resolve(root, dirname(path), specifier)).replace(/\.js$/, ".ts"));
}
