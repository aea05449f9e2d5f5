import {
  type AxesCalibration,
  type AxisDescription,
  type Curve,
  type CurveSourceEntry,
  calibrateAxes,
  pointsFromPath,
  pointsFromPicks,
  type ReferencePoint,
  thinCurve,
} from "@quietband/core";
import { checkAgainstSchema, malformedAt } from "../file/check-against-schema.js";
import {
  type FilePlace,
  madeAt,
  numberAt,
  placeAt,
  placesAt,
  quantityAt,
  shareAt,
  textAt,
  wordsAt,
} from "../file/file-place.js";
import type { JsonSchema } from "../file/json-schema.js";
import { parseFile } from "../file/parse-file.js";
import { picksSchema } from "./picks-schema.js";

/** A picks file, read. */
export interface PickedPlot {
  readonly calibration: AxesCalibration;
  /** With the calibration's residuals among its provenance. */
  readonly curve: Curve;
  /** Points before thinning. */
  readonly pointsRead: number;
}

/** Thinning of a traced path unless the file says otherwise. */
const pathThinning = 1e-3;

/**
 * A curve from a plain JSON file with the axes of a plot and the places picked along a curve, or its vector path.
 * `picksSchema` is the file's shape as JSON Schema; quantities are texts with their units, plain numbers are pixels.
 *
 * @param json - the text of the file, or what JSON.parse made of it.
 * @returns the calibration, and the curve with its point uncertainties and the errors that all points share.
 * @throws MalformedDataError that begins with the place: "At /frequency/ticks/2/value: ..."; what `calibrateAxes`,
 *   `pointsFromPicks` and `pointsFromPath` refuse, with the place as well.
 *
 * @example
 * ```ts
 * import { readPicks } from "@quietband/figures";
 * const { curve, calibration } = readPicks(`{
 *   "unit": "V",
 *   "frequency": { "scale": "log", "ticks": [{ "pixel": 100, "value": "1 Hz" }, { "pixel": 700, "value": "1 kHz" }] },
 *   "density": { "scale": "log", "ticks": [{ "pixel": 400, "value": "1 nV/√Hz" }, { "pixel": 50, "value": "100 nV/√Hz" }] },
 *   "picks": [[100, 50], [300, 225], [700, 225]]
 * }`);
 * curve.points.map(({ density }) => density.toPrecision(4)).join(" "); // → 1.000e-7 1.000e-8 1.000e-8
 * calibration.worst.pixels < 1e-9; // → true
 * ```
 */
export function readPicks(json: unknown): PickedPlot {
  const value = typeof json === "string" ? parseFile(json, "A picks file") : json;
  checkAgainstSchema(value, picksSchema as JsonSchema, {});
  const top: FilePlace = { fields: value as FilePlace["fields"], pointer: "" };
  const calibration = calibrationOf(top);
  const read = curveOf(top, calibration);
  const tolerance = shareAt(top, "thin") ?? (top.fields["path"] === undefined ? undefined : pathThinning);
  const curve = tolerance === undefined ? read : madeAt("/thin", () => thinCurve(read, { tolerance }));
  return Object.freeze({ calibration, curve, pointsRead: read.points.length });
}

function calibrationOf(top: FilePlace): AxesCalibration {
  const unit = textAt(top, "unit");
  const referencePoints = referencePointsOf(top, unit);
  const frequency = axisOf(top, "frequency", "Hz");
  const density = axisOf(top, "density", `${unit}/√Hz`);
  if (referencePoints !== undefined && (frequency.ticks !== undefined || density.ticks !== undefined))
    throw malformedAt(
      "/referencePoints",
      "axes are calibrated by ticks or by reference points, not by both; leave one out.",
    );
  for (const name of ["frequency", "density"] as const)
    if (referencePoints === undefined && { frequency, density }[name].ticks === undefined)
      throw malformedAt(`/${name}`, "ticks are missing; give two or more, or reference points for both axes.");
  return madeAt(referencePoints === undefined ? "/frequency and /density" : "/referencePoints", () =>
    calibrateAxes({ unit, frequency, density, referencePoints, tickErrorPixels: numberAt(top, "tickError") }),
  );
}

function axisOf(top: FilePlace, name: "frequency" | "density", unit: string): AxisDescription {
  const place = placeAt(top, name) as FilePlace;
  const kind = textAt(place, "scale") as AxisDescription["kind"];
  if (place.fields["ticks"] === undefined) return { kind };
  const wanted = kind === "dB" ? "dB" : unit;
  return {
    kind,
    ticks: placesAt(place, "ticks").map((tick) => ({
      pixel: numberAt(tick, "pixel") as number,
      value: quantityAt(tick, "value", wanted).value,
    })),
  };
}

function referencePointsOf(top: FilePlace, unit: string): readonly ReferencePoint[] | undefined {
  if (top.fields["referencePoints"] === undefined) return undefined;
  const dB = textAt(placeAt(top, "density") as FilePlace, "scale") === "dB";
  return placesAt(top, "referencePoints").map((point) => {
    const [x = 0, y = 0] = point.fields["place"] as readonly number[];
    return {
      x,
      y,
      frequency: quantityAt(point, "frequency", "Hz").value,
      density: quantityAt(point, "density", dB ? "dB" : `${unit}/√Hz`).value,
    };
  });
}

type Place = readonly [number, number];

function curveOf(top: FilePlace, calibration: AxesCalibration): Curve {
  const { picks, repeatedPicks, path } = top.fields;
  const given = Object.entries({ picks, repeatedPicks, path }).filter(([, value]) => value !== undefined);
  const [first, another] = given;
  if (first === undefined || another !== undefined)
    throw malformedAt(
      another === undefined ? "" : `/${another[0]}`,
      `expected one of picks, repeatedPicks and path; got ${given.length === 0 ? "none" : given.map(([key]) => key).join(" and ")}.`,
    );
  const [name] = first;
  const shared = {
    pickErrorPixels: numberAt(top, "pickError"),
    label: wordsAt(top, "label"),
    source: sourceOf(top, calibration),
  };
  return madeAt(`/${name}`, () => {
    if (name === "path") return pathCurve(placeAt(top, "path") as FilePlace, calibration, shared);
    const pixel = ([x, y]: Place) => ({ x, y });
    const lineWidthPixels = numberAt(top, "lineWidth");
    const places =
      name === "picks"
        ? (picks as readonly Place[]).map(pixel)
        : (repeatedPicks as readonly (readonly Place[])[]).map((series) => series.map(pixel));
    return pointsFromPicks(calibration, places, { ...shared, lineWidthPixels });
  });
}

function pathCurve(
  place: FilePlace,
  calibration: AxesCalibration,
  shared: {
    readonly pickErrorPixels: number | undefined;
    readonly label: string | undefined;
    readonly source: readonly CurveSourceEntry[];
  },
): Curve {
  const matrix = place.fields["matrix"] as readonly [number, number, number, number, number, number] | undefined;
  return pointsFromPath(calibration, textAt(place, "data"), {
    ...shared,
    matrix,
    tolerancePixels: numberAt(place, "tolerance"),
  });
}

/** The file's own lines, then what the calibration left. */
function sourceOf({ fields }: FilePlace, { residuals, worst, tickErrorPixels }: AxesCalibration): CurveSourceEntry[] {
  const lines = (fields["source"] ?? []) as readonly string[];
  const entries = lines.map((line): CurveSourceEntry => {
    const [, key, value] = /^([^:]{1,40}):\s+(.*)$/s.exec(line) ?? [];
    return key === undefined || value === undefined ? { key: "", value: line } : { key, value };
  });
  const each = residuals.map(({ name, pixels }) => `${name} ${pixels.toFixed(2)}`).join(", ");
  return [
    ...entries,
    {
      key: "calibration",
      value: `worst is ${worst.name}, ${worst.pixels.toFixed(2)} pixels off; a tick is taken as known to ${tickErrorPixels.toFixed(2)} pixels`,
    },
    { key: "calibration residuals, pixels", value: each },
  ];
}
