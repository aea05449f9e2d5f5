import { mergeConfig } from "vitest/config";
import base from "./vitest.config.ts";

// Mutation runs the quick tests that stand beside each package; what crosses packages or simulates is too slow for it.
export default mergeConfig(base, { test: { exclude: ["test/**", "**/*.slow.test.ts", "**/node_modules/**"] } });
