import { cascade, OutOfDomainError, type Weighting } from "@quietband/core";
import { requireFinite, shown } from "../convert/domain.js";
import type { BudgetStage } from "./budget-options.js";

/** The way from a place in the path to its output. */
export interface WayOut {
  /** Amplitude gain to the output. */
  readonly gain: number;
  /** What the stages on the way do over frequency, in order. */
  readonly weightings: readonly Weighting[];
}

/** Ways to the output by the name of the stage at whose input they begin. */
export interface SignalPath {
  wayFrom(place: string): WayOut;
}

/** Names that mean an end of the path and no stage. */
const ends: readonly string[] = Object.freeze(["input", "output"]);

export function signalPath(stages: readonly BudgetStage[], last: Weighting | undefined): SignalPath {
  const ways = new Map<string, WayOut>();
  let way: WayOut = { gain: 1, weightings: last === undefined ? [] : [last] };
  ways.set("output", way);
  for (const { name, gain = 1, weighting } of stages.toReversed()) {
    if (typeof name !== "string" || name === "" || ends.includes(name) || ways.has(name))
      throw new OutOfDomainError(
        `Every stage of a path needs a name of its own other than input and output; got ${shown(name)}.`,
      );
    if (requireFinite(`The gain of stage "${name}"`, gain) === 0)
      throw new OutOfDomainError(`The gain of stage "${name}" must not be zero.`);
    way = {
      gain: way.gain * gain,
      weightings: weighting === undefined ? way.weightings : [weighting, ...way.weightings],
    };
    ways.set(name, way);
  }
  ways.set("input", way);
  return {
    wayFrom(place: string): WayOut {
      const found = ways.get(place);
      if (found !== undefined) return found;
      const known = ["input", ...stages.map(({ name }) => name), "output"].join(", ");
      throw new OutOfDomainError(`The path has no stage ${shown(place)}; it has ${known}.`);
    },
  };
}

/** A cascade that is undefined where nothing is in the way. */
export function cascadeOf(weightings: readonly Weighting[]): Weighting | undefined {
  const [first, ...others] = weightings;
  return first === undefined ? undefined : cascade(first, ...others);
}
