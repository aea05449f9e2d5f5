import type { Curve } from "@quietband/core";
import type { DensityPlotOptions } from "./density-options.js";
import { quantityText } from "./quantity-text.js";

/** What the picture shows, in sentences, for readers who listen to it and for labels that found no place. */
export function describeDensity(
  options: DensityPlotOptions,
  unit: string,
  [fromHz, toHz]: readonly [number, number],
): string {
  const { curves = [], models = [], band, floor, cornerHz, suspected = [] } = options;
  const hertz = (hz: number): string => (hz === Number.POSITIVE_INFINITY ? "∞" : quantityText(hz, "Hz", { digits: 4 }));
  const sentences = [
    `Noise density in ${unit}/√Hz over frequency, both logarithmic, from ${hertz(fromHz)} to ${hertz(toHz)}.`,
    ...curves.slice(0, spoken).map(curveSentence),
    ...(curves.length > spoken ? [`And ${curves.length - spoken} more curves.`] : []),
    ...models.slice(0, spoken).map(({ label }) => `Model: ${label === "" ? "unnamed" : label}.`),
    ...(models.length > spoken ? [`And ${models.length - spoken} more models.`] : []),
  ];
  if (floor !== undefined) sentences.push(`Floor ${quantityText(floor, `${unit}/√Hz`, { digits: 4 })}.`);
  if (cornerHz !== undefined) sentences.push(`Corner ${hertz(cornerHz)}.`);
  if (band !== undefined) sentences.push(`Shaded band ${hertz(band.fromHz)} to ${hertz(band.toHz)}.`);
  if (suspected.length > 0)
    sentences.push(`Suspected misreadings at ${suspected.slice(0, spoken).map(hertz).join(", ")}.`);
  return sentences.join(" ");
}

const spoken = 12;

function curveSentence({ label, points }: Curve): string {
  const left = points.filter(({ inFit }) => !inFit).length;
  const count = `${points.length} ${points.length === 1 ? "point" : "points"}`;
  return `${label === "" ? "Curve" : label}: ${count}${left > 0 ? `, ${left} left out of the fit` : ""}.`;
}
