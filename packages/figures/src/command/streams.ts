/** What a command may touch of the world; tests hand in their own. */
export interface Streams {
  /** All of standard input. */
  readInput(): string;
  readFile(path: string): string;
  writeFile(path: string, text: string): void;
  /** Standard output. */
  print(text: string): void;
  /** Standard error. */
  complain(text: string): void;
  /** How far long work has come, for whoever watches; nothing where nobody does. */
  progress(what: string, total: number): Progress;
}

/** Long work counted in steps. */
export interface Progress {
  step(): void;
  /** Takes the display away. */
  end(): void;
}
