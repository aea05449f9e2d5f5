import type { Curve } from "@quietband/core";
import type { DensityPlotOptions } from "./density-options.js";
import { bandText, cornerText, floorText, hertzText } from "./density-words.js";

/** What the picture shows, in sentences, for readers who listen to it and for labels that found no place. */
export function describeDensity(
  options: DensityPlotOptions,
  unit: string,
  [fromHz, toHz]: readonly [number, number],
): string {
  const { curves = [], models = [], band, floor, cornerHz, suspected = [] } = options;
  const sentences = [
    `Noise density in ${unit}/√Hz over frequency, both logarithmic, from ${bandText({ fromHz: rounded(fromHz), toHz: rounded(toHz) })}.`,
    ...curves.slice(0, spoken).map(curveSentence),
    ...(curves.length > spoken ? [`And ${curves.length - spoken} more curves.`] : []),
    ...models.slice(0, spoken).map(({ label }) => `Model: ${label === "" ? "unnamed" : label}.`),
    ...(models.length > spoken ? [`And ${models.length - spoken} more models.`] : []),
  ];
  if (floor !== undefined) sentences.push(sentence(floorText(floor, unit)));
  if (cornerHz !== undefined) sentences.push(sentence(cornerText(cornerHz)));
  if (band !== undefined) sentences.push(`Shaded band ${bandText(band)}.`);
  if (suspected.length > 0)
    sentences.push(`Suspected misreadings at ${suspected.slice(0, spoken).map(hertzText).join(", ")}.`);
  return sentences.join(" ");
}

const spoken = 12;

function curveSentence({ label, points }: Curve): string {
  const left = points.filter(({ inFit }) => !inFit).length;
  const count = `${points.length} ${points.length === 1 ? "point" : "points"}`;
  return `${label === "" ? "Curve" : label}: ${count}${left > 0 ? `, ${left} left out of the fit` : ""}.`;
}

function sentence(text: string): string {
  return `${text.charAt(0).toUpperCase()}${text.slice(1)}.`;
}

/** The ends of the axis are nobody's figures: three digits tell where they are. */
function rounded(hz: number): number {
  return Number(hz.toPrecision(3));
}
