import { readCurve } from "@quietband/core";
import { type Chain, readChain } from "../chain/read-chain.js";
import type { ParsedOptions } from "./command-options.js";
import type { Streams } from "./streams.js";
import { UsageError } from "./usage-error.js";

/** The one chain a command works on: a file, or - for standard input; curves are sought beside it. */
export function readChainInput(command: string, parsed: ParsedOptions, streams: Streams): Chain {
  const [path, ...more] = parsed.files;
  if (path === undefined || more.length > 0)
    throw new UsageError(
      `quietband ${command} takes one chain file, or - for standard input; got ${parsed.files.length}.`,
    );
  const folder = path === "-" ? "" : path.replace(/[^\\/]*$/, "");
  const text = path === "-" ? streams.readInput() : streams.readFile(path);
  const progress = streams.progress("reading curves", text.match(/"file"\s*:/g)?.length ?? 0);
  try {
    return readChain(text, {
      loadCurve: (file) => {
        const curve = readCurve(streams.readFile(`${folder}${file}`));
        progress.step();
        return curve;
      },
    });
  } finally {
    progress.end();
  }
}
