import type { QuadratureRule } from "./adaptive.js";
import { arrayBlock } from "./array-block.js";
import { logRatio } from "./power-law-integral.js";

/** Five-point Gauss–Legendre on [−1, 1] (Abramowitz, Stegun 25.4.30, in closed form). */
const inner = Math.sqrt(5 - 2 * Math.sqrt(10 / 7)) / 3;
const outer = Math.sqrt(5 + 2 * Math.sqrt(10 / 7)) / 3;
const innerWeight = (322 + 13 * Math.sqrt(70)) / 900;
const outerWeight = (322 - 13 * Math.sqrt(70)) / 900;
const places: readonly number[] = Object.freeze([-outer, -inner, 0, inner, outer]);
const placeWeights: readonly number[] = Object.freeze([outerWeight, innerWeight, 128 / 225, innerWeight, outerWeight]);

/** Widest panel in ln x; a power law of exponent 4 is integrated over it to 1e-7. */
const widest = 1.2;

/**
 * A fixed rule in ln x between ascending positive finite `edges`: five nodes on panels no wider than 1.2, so that sums of
 * moderate power laws are integrated to 1e-7 and better. It knows nothing of peaks between the edges: check it
 * against a known integral.
 */
export function shortPanelRule(edges: readonly number[]): QuadratureRule {
  let panels = 0;
  for (let index = 1; index < edges.length; index += 1) panels += panelsIn(edges, index);
  const [nodes, weights] = arrayBlock([panels * places.length, panels * places.length]);
  let k = 0;
  for (let index = 1; index < edges.length; index += 1) {
    const from = edges[index - 1] as number;
    const count = panelsIn(edges, index);
    const half = count === 0 ? 0 : (0.5 * logRatio(from, edges[index] as number)) / count;
    for (let panel = 0; panel < count; panel += 1)
      for (let place = 0; place < places.length; place += 1) {
        const x = from + from * Math.expm1(half * (2 * panel + 1 + (places[place] as number)));
        nodes[k] = x;
        weights[k] = half * (placeWeights[place] as number) * x;
        k += 1;
      }
  }
  return { nodes, weights };
}

function panelsIn(edges: readonly number[], index: number): number {
  const from = edges[index - 1] as number;
  const to = edges[index] as number;
  return to > from ? Math.ceil(Math.log(to / from) / widest) : 0;
}
