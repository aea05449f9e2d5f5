import { readFileSync, writeFileSync } from "node:fs";
import { runCommandLine } from "./command-line.js";
import { commands } from "./commands.js";
import { terminalProgress } from "./terminal-progress.js";

// Written at once and not through the process's streams: a closed pipe then ends the program quietly.
const write = (descriptor: number, text: string): void => {
  try {
    writeFileSync(descriptor, text);
  } catch (error) {
    if (!(error instanceof Error && "code" in error && error.code === "EPIPE")) throw error;
  }
};

process.exitCode = runCommandLine(process.argv.slice(2), commands, {
  readInput: () => readFileSync(0, "utf8"),
  readFile: (path) => readFileSync(path, "utf8"),
  writeFile: (path, text) => writeFileSync(path, text),
  print: (text) => write(1, text),
  complain: (text) => write(2, text),
  progress: (what, total) => terminalProgress(process.stderr, what, total),
});
