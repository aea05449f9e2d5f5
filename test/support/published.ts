import { readFileSync } from "node:fs";

/** A table of fixtures/published, with its source and how far it was verified. */
export interface Published<Row> {
  readonly source: string;
  readonly verified: string;
  readonly values: readonly Row[];
}

export function published<Row>(name: string): Published<Row> {
  return JSON.parse(
    readFileSync(new URL(`../../fixtures/published/${name}.json`, import.meta.url), "utf8"),
  ) as Published<Row>;
}

/** A typed curve of the invented demonstration. */
export function demoCurve(name: "R1" | "A1" | "J1" | "X1"): string {
  return readFileSync(new URL(`../../fixtures/demo/${name}.csv`, import.meta.url), "utf8");
}
