import type { CurveSourceEntry } from "./curve.js";
import type { CommentLine } from "./curve-lines.js";
import { refusal } from "./refusal.js";
import { tidyText } from "./tidy-text.js";

/** A value that a comment gives, and the line it stands on. */
export interface StatedText {
  readonly text: string;
  readonly line: number;
}

/** What the comments of a text say: settings of the curve itself, and its provenance in the order given. */
export interface CurveComments {
  readonly label: StatedText | undefined;
  readonly pointUncertainty: StatedText | undefined;
  readonly axisUncertainty: StatedText | undefined;
  readonly source: readonly CurveSourceEntry[];
}

type Setting = "label" | "pointUncertainty" | "axisUncertainty";

/** Keys that set something, in lower case; every other key is provenance. */
const settings: ReadonlyMap<string, Setting> = new Map([
  ["label", "label"],
  ["point uncertainty", "pointUncertainty"],
  ["uncertainty", "pointUncertainty"],
  ["axis uncertainty", "axisUncertainty"],
]);

/** Longest key; a colon further on is one of a sentence. */
export const longestKey = 60;

/** Sorts comments into settings and provenance. */
export function curveComments(comments: readonly CommentLine[]): CurveComments {
  const found = new Map<Setting, StatedText>();
  const source: CurveSourceEntry[] = [];
  for (const { line, text } of comments) {
    const entry = readComment(text);
    if (entry === undefined) continue;
    const setting = settings.get(entry.key.toLowerCase());
    if (setting === undefined) {
      source.push(entry);
      continue;
    }
    const earlier = found.get(setting);
    if (earlier !== undefined)
      throw refusal(line, `"# ${entry.key}:" stands on line ${earlier.line} already; keep one of the two`);
    found.set(setting, { text: entry.value, line });
  }
  return {
    label: found.get("label"),
    pointUncertainty: found.get("pointUncertainty"),
    axisUncertainty: found.get("axisUncertainty"),
    source,
  };
}

/** `key: value`, or a free remark; the colon of a key is followed by a blank or the end. `: text` is a remark with a colon. */
export function readComment(text: string): CurveSourceEntry | undefined {
  const tidy = tidyText(text);
  if (tidy === "") return undefined;
  const colon = `${tidy} `.indexOf(": ");
  if (colon < 0 || colon > longestKey) return { key: "", value: tidy };
  const entry = { key: tidy.slice(0, colon).trim(), value: tidy.slice(colon + 2).trim() };
  return entry.key === "" && entry.value === "" ? undefined : entry;
}

/** The comment that {@link readComment} reads back. */
export function writeComment({ key, value }: CurveSourceEntry): string {
  if (key !== "") return `# ${key}: ${value}`.trimEnd();
  return readComment(value)?.key === "" && !value.startsWith(": ") ? `# ${value}` : `# : ${value}`;
}

/** Whether a key sets something, so that it cannot name provenance. */
export function isSettingKey(key: string): boolean {
  return settings.has(key.toLowerCase());
}
