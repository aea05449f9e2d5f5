import { Writable } from "node:stream";
import { expect, test } from "vitest";
import { terminalProgress } from "../../src/command/terminal-progress.js";

function stream(isTTY: boolean): { readonly stream: NodeJS.WriteStream; readonly said: () => string } {
  let said = "";
  const sink = new Writable({
    write(chunk: Buffer, _encoding, done) {
      said += chunk.toString();
      done();
    },
  });
  return {
    stream: Object.assign(sink, { isTTY, columns: 80, rows: 24 }) as unknown as NodeJS.WriteStream,
    said: () => said,
  };
}

function work(isTTY: boolean, steps: number): string {
  const { stream: out, said } = stream(isTTY);
  const progress = terminalProgress(out, "reading", steps);
  for (let k = 0; k < steps; k += 1) progress.step();
  progress.end();
  return said();
}

test("a terminal sees how far long work has come", () => {
  expect(work(true, 5)).toContain("reading");
});

test("a pipe sees nothing, and neither does a terminal of work that is over at once", () => {
  expect(work(false, 5)).toBe("");
  expect(work(true, 2)).toBe("");
});
