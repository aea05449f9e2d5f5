import { defineConfig } from "vitest/config";

const source = (path: string): string => new URL(`packages/${path}`, import.meta.url).pathname;

export default defineConfig({
  resolve: { alias: [{ find: /^@quietband\/(core|figures)$/, replacement: source("$1/src/index.ts") }] },
  test: {
    include: ["test/**/*.test.ts", "packages/*/test/**/*.test.ts"],
    testTimeout: 120_000,
    coverage: {
      provider: "v8",
      include: ["packages/*/src/**/*.ts"],
      exclude: ["**/*.d.ts"],
      reporter: ["text-summary", "json-summary"],
    },
  },
});
