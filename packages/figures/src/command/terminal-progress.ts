import { SingleBar } from "cli-progress";
import type { Progress } from "./streams.js";

const noProgress: Progress = Object.freeze({ step: () => {}, end: () => {} });

/** Work of fewer steps is over before anybody has read the bar. */
const fewestSteps = 3;

/** A bar on a stream that is a terminal, taken away at the end; nothing on a pipe or a file. */
export function terminalProgress(stream: NodeJS.WriteStream, what: string, total: number): Progress {
  if (!stream.isTTY || total < fewestSteps) return noProgress;
  const bar = new SingleBar({
    stream,
    clearOnComplete: true,
    hideCursor: true,
    format: `${what} {bar} {value} of {total}`,
  });
  bar.start(total, 0);
  return { step: () => bar.increment(), end: () => bar.stop() };
}
