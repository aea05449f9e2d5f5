import { type SVGCommand, SVGPathData } from "svg-pathdata";
import { MalformedDataError } from "../ground/errors.js";
import type { Pixel } from "./axis-fit.js";

/** Longest path text that is read, and most vertices it may flatten to. */
const longestPath = 2e7;
const mostVertices = 2e6;

const noMove = "Path data must begin with a move command (M or m) and hold at least one.";

/**
 * SVG path data (W3C SVG 2, chapter 9) as polylines, one a subpath, curves flattened so that no chord is further from its
 * curve than the tolerance: cubic and quadratic pieces by the second differences of their control points (Wang's bound),
 * elliptical arcs on their ellipse. Control points, arcs and smooth curves keep their exact end points.
 */
export function flattenPath(pathData: string, tolerance: number): Pixel[][] {
  if (typeof pathData !== "string" || pathData.length > longestPath)
    throw new MalformedDataError(
      `Path data must be a text of at most ${longestPath} characters; got ${typeof pathData === "string" ? `${pathData.length} characters` : typeof pathData}.`,
    );
  const origin = { x: 0, y: 0 };
  const pen: Pen = {
    tolerance,
    subpaths: [],
    at: origin,
    start: origin,
    cubicControl: undefined,
    quadControl: undefined,
    count: 0,
  };
  for (const [index, command] of parsed(pathData).entries()) {
    draw(pen, command);
    const { x, y } = pen.at;
    if (!(Number.isFinite(x) && Number.isFinite(y)))
      throw new MalformedDataError(`Path command ${index + 1} leads to a place that is no number.`, { index });
    if (pen.count > mostVertices)
      throw new MalformedDataError(
        `The path has more than ${mostVertices} vertices at a tolerance of ${tolerance} pixels; ask for a wider tolerance.`,
        { index },
      );
  }
  return pen.subpaths.filter((subpath) => subpath.length > 1);
}

function parsed(pathData: string): readonly SVGCommand[] {
  // The parser joins what no command takes to the next number: -M100 50 would be x = -100.
  if (/^\s*[^\sMm]/.test(pathData)) throw new MalformedDataError(noMove);
  const close = /[Zz]\s*[^\sA-Za-z]/.exec(pathData);
  if (close !== null)
    throw new MalformedDataError(
      `Path data is broken after the close at character ${close.index + 1}: nothing but a command may follow a close.`,
      { index: close.index },
    );
  try {
    const { commands } = new SVGPathData(pathData);
    if (commands.length > 0 && commands[0]?.type === SVGPathData.MOVE_TO) return commands;
  } catch (error) {
    throw new MalformedDataError(
      `Path data could not be read as the SVG path grammar: ${error instanceof Error ? error.message : String(error)}`,
    );
  }
  throw new MalformedDataError(noMove);
}

/** Where the pen is, where it has been, and the last control points for smooth curves. Lives for one path. */
interface Pen {
  readonly tolerance: number;
  readonly subpaths: Pixel[][];
  at: Pixel;
  start: Pixel;
  cubicControl: Pixel | undefined;
  quadControl: Pixel | undefined;
  count: number;
}

function moveTo(pen: Pen, to: Pixel): void {
  pen.at = to;
  pen.start = to;
  pen.subpaths.push([to]);
  pen.count += 1;
}

function lineTo(pen: Pen, to: Pixel): void {
  const open = pen.subpaths.at(-1);
  if (open === undefined || open.length === 0) pen.subpaths.push([pen.at, to]);
  else open.push(to);
  pen.at = to;
  pen.count += 1;
}

function draw(pen: Pen, command: SVGCommand): void {
  const from = pen.at;
  const [cubicBefore, quadBefore] = [pen.cubicControl, pen.quadControl];
  pen.cubicControl = undefined;
  pen.quadControl = undefined;
  const shift = "relative" in command && command.relative ? from : { x: 0, y: 0 };
  const placed = (x: number, y: number): Pixel => ({ x: x + shift.x, y: y + shift.y });
  switch (command.type) {
    case SVGPathData.MOVE_TO:
      moveTo(pen, placed(command.x, command.y));
      break;
    case SVGPathData.LINE_TO:
      lineTo(pen, placed(command.x, command.y));
      break;
    case SVGPathData.HORIZ_LINE_TO:
      lineTo(pen, { x: command.x + shift.x, y: from.y });
      break;
    case SVGPathData.VERT_LINE_TO:
      lineTo(pen, { x: from.x, y: command.y + shift.y });
      break;
    case SVGPathData.CLOSE_PATH:
      lineTo(pen, pen.start);
      pen.subpaths.push([]);
      break;
    case SVGPathData.CURVE_TO:
      cubicTo(pen, [placed(command.x1, command.y1), placed(command.x2, command.y2), placed(command.x, command.y)]);
      break;
    case SVGPathData.SMOOTH_CURVE_TO:
      cubicTo(pen, [mirrored(from, cubicBefore), placed(command.x2, command.y2), placed(command.x, command.y)]);
      break;
    case SVGPathData.QUAD_TO:
      quadTo(pen, placed(command.x1, command.y1), placed(command.x, command.y));
      break;
    case SVGPathData.SMOOTH_QUAD_TO:
      quadTo(pen, mirrored(from, quadBefore), placed(command.x, command.y));
      break;
    case SVGPathData.ARC:
      arcTo(pen, command, placed(command.x, command.y));
      break;
    default:
      throw new MalformedDataError("Path data holds a command that is not one of the SVG path grammar.");
  }
}

function mirrored(at: Pixel, control: Pixel | undefined): Pixel {
  return control === undefined ? at : { x: 2 * at.x - control.x, y: 2 * at.y - control.y };
}

function cubicTo(pen: Pen, [one, two, to]: readonly [Pixel, Pixel, Pixel]): void {
  const from = pen.at;
  const bend = Math.max(secondDifference(from, one, two), secondDifference(one, two, to));
  along(pen, Math.sqrt((0.75 * bend) / pen.tolerance), to, (t) => {
    const s = 1 - t;
    const [a, b, c, d] = [s * s * s, 3 * s * s * t, 3 * s * t * t, t * t * t];
    return { x: a * from.x + b * one.x + c * two.x + d * to.x, y: a * from.y + b * one.y + c * two.y + d * to.y };
  });
  pen.cubicControl = two;
}

function quadTo(pen: Pen, control: Pixel, to: Pixel): void {
  const from = pen.at;
  along(pen, Math.sqrt((0.25 * secondDifference(from, control, to)) / pen.tolerance), to, (t) => {
    const s = 1 - t;
    const [a, b, c] = [s * s, 2 * s * t, t * t];
    return { x: a * from.x + b * control.x + c * to.x, y: a * from.y + b * control.y + c * to.y };
  });
  pen.quadControl = control;
}

function secondDifference(a: Pixel, b: Pixel, c: Pixel): number {
  return Math.hypot(a.x - 2 * b.x + c.x, a.y - 2 * b.y + c.y);
}

/** Steps along a curve from t = 0, exclusive, to its exact end. */
function along(pen: Pen, wanted: number, to: Pixel, placeAt: (t: number) => Pixel): void {
  const steps = Math.max(1, Math.ceil(wanted));
  if (!(steps <= mostVertices))
    throw new MalformedDataError("A curve of the path is too large to flatten at this tolerance.");
  for (let step = 1; step < steps; step += 1) lineTo(pen, placeAt(step / steps));
  lineTo(pen, to);
}

/** End point to centre parameters by SVG 2, appendix B.2.4; radii that are too small are scaled up (B.2.5). */
function arcTo(
  pen: Pen,
  arc: {
    readonly rX: number;
    readonly rY: number;
    readonly xRot: number;
    readonly lArcFlag: 0 | 1;
    readonly sweepFlag: 0 | 1;
  },
  to: Pixel,
): void {
  const from = pen.at;
  let [rx, ry] = [Math.abs(arc.rX), Math.abs(arc.rY)];
  if (from.x === to.x && from.y === to.y) return;
  if (rx === 0 || ry === 0) {
    lineTo(pen, to);
    return;
  }
  const turn = (arc.xRot * Math.PI) / 180;
  const [cos, sin] = [Math.cos(turn), Math.sin(turn)];
  const [halfX, halfY] = [(from.x - to.x) / 2, (from.y - to.y) / 2];
  const [px, py] = [cos * halfX + sin * halfY, cos * halfY - sin * halfX];
  const lambda = (px / rx) ** 2 + (py / ry) ** 2;
  if (lambda > 1) [rx, ry] = [rx * Math.sqrt(lambda), ry * Math.sqrt(lambda)];
  const across = (rx * py) ** 2 + (ry * px) ** 2;
  const rest = Math.max(0, ((rx * ry) ** 2 - across) / across);
  const sign = arc.lArcFlag === arc.sweepFlag ? -1 : 1;
  const [cpx, cpy] = [(sign * Math.sqrt(rest) * rx * py) / ry, (-sign * Math.sqrt(rest) * ry * px) / rx];
  const centre = { x: cos * cpx - sin * cpy + (from.x + to.x) / 2, y: sin * cpx + cos * cpy + (from.y + to.y) / 2 };
  const first = Math.atan2((py - cpy) / ry, (px - cpx) / rx);
  let sweep = Math.atan2((-py - cpy) / ry, (-px - cpx) / rx) - first;
  if (arc.sweepFlag === 1 && sweep < 0) sweep += 2 * Math.PI;
  if (arc.sweepFlag === 0 && sweep > 0) sweep -= 2 * Math.PI;
  const step = 2 * Math.acos(Math.max(1 - pen.tolerance / Math.max(rx, ry), 0));
  along(pen, Math.abs(sweep) / step, to, (t) => {
    const angle = first + t * sweep;
    const [ex, ey] = [rx * Math.cos(angle), ry * Math.sin(angle)];
    return { x: centre.x + cos * ex - sin * ey, y: centre.y + sin * ex + cos * ey };
  });
}
