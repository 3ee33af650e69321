import type { Band, Curve, Mark, Plot } from "../presentation";
import type { Area, Frame } from "./place";
import { px, shapeOf, shapePath } from "./shapes";

/**
 * How a piece is painted. Filled: band, density, dot, marker. Stroked: all others, of which outline, beyond (a line where its group has no rows)
 * and shared (the ends of what all groups share) are broken lines.
 */
export type Look =
  | "band"
  | "outline"
  | "line"
  | "beyond"
  | "points"
  | "marker"
  | "zero"
  | "crossing"
  | "stretch"
  | "shared"
  | "arrow"
  | "interval"
  | "dot"
  | "density";

/** One path of a picture, in px; the same on the page's canvas and in a saved file. */
export interface Piece {
  readonly look: Look;
  /** Null where it belongs to no group. */
  readonly group: number | null;
  /** SVG path data. */
  readonly d: string;
}

const POINT = 2.6;
const MARKER = 4.2;
/** Markers on a group's line. */
const MARKERS = 3;
/** Half the height of a stretch on the zero line. */
const HALF = 5;
const CAP = 4;

const at = (x: number, y: number) => `${px(x)} ${px(y)}`;
const seen = (...values: number[]) => values.every(Number.isFinite);

/** Bands, the widest first; what holds at one value is filled, what holds at all values at once is an outline. */
export function bandPieces(bands: readonly Band[], { x, y }: Frame): Piece[] {
  return bands.flatMap(({ group, reach, x: places, low, high }): Piece[] => {
    const upper = places.map((value, i) => at(x(value), y(high[i])));
    const lower = places.map((value, i) => at(x(value), y(low[i]))).reverse();
    const d = `M${[...upper, ...lower].join("L")}Z`;
    return [{ look: reach === "pointwise" ? "band" : "outline", group, d }];
  });
}

export function curvePieces(curves: readonly Curve[], { x, y }: Frame): Piece[] {
  return curves.map(({ group, x: places, y: values, supported }) => {
    const points = places.flatMap((value, i) => (seen(x(value), y(values[i])) ? [at(x(value), y(values[i]))] : []));
    return { look: supported ? "line" : "beyond", group, d: points.length > 1 ? `M${points.join("L")}` : "" };
  });
}

/** Places along a line of so many points where its group's shape stands, apart from those of the other groups. */
export function markerPlaces(length: number, group: number, groups: number): number[] {
  const share = (group + 1) / (groups + 1);
  return Array.from({ length: MARKERS }, (_, i) => Math.round(((i + share) / MARKERS) * (length - 1)));
}

/** The shape of each group on its line, where it has rows. */
export function markerPieces({ curves, groups }: Plot, { x, y }: Frame): Piece[] {
  return curves.flatMap(({ group, x: places, y: values, supported }): Piece[] => {
    if (group === null || !supported) return [];
    const d = markerPlaces(places.length, group, groups.length)
      .filter((i) => seen(x(places[i]), y(values[i])))
      .map((i) => shapePath(shapeOf(group), x(places[i]), y(values[i]), MARKER));
    return [{ look: "marker", group, d: d.join("") }];
  });
}

/** The rows, all of a group in one path. */
export function pointPieces({ points }: Plot, { x, y }: Frame): Piece[] {
  return points.map(({ group, x: places, y: values }) => ({
    look: "points",
    group,
    d: places.map((value, i) => shapePath(shapeOf(group), x(value), y(values[i]), POINT)).join(""),
  }));
}

/** Zero, the crossing with its interval on the zero line, and the ends of what all groups share with an arrow into it. */
export function markPieces(marks: readonly Mark[], frame: Frame): Piece[] {
  return marks.flatMap((mark) => markPiece(mark, frame)).map((piece) => ({ ...piece, group: null }));
}

function markPiece(mark: Mark, { area, x, y }: Frame): Omit<Piece, "group">[] {
  const { left, top, width, height } = area;
  const bottom = top + height;
  if (mark.axis === "y") return [{ look: "zero", d: `M${at(left, y(mark.at))}H${px(left + width)}` }];
  const place = x(mark.at);
  const upright = `M${at(place, bottom)}V${px(top)}`;
  if (mark.what !== "crossing")
    return [
      { look: "shared", d: upright },
      { look: "arrow", d: arrow(place, top + 7, mark.what === "shared to" ? -1 : 1) },
    ];
  const zero = Math.min(Math.max(y(0), top + HALF), bottom - HALF);
  const line: Omit<Piece, "group"> = { look: "crossing", d: upright };
  if (!mark.stretch) return [line];
  const [from, to] = mark.stretch.map(x);
  return [line, { look: "stretch", d: hatchedBar(from, to, zero) }];
}

/** An arrow of 9 px from a line into the side it opens to. */
export function arrow(x: number, y: number, side: 1 | -1): string {
  return `M${at(x, y)}h${9 * side}m${-4 * side} -4l${4 * side} 4l${-4 * side} 4`;
}

/** A bar filled with slanted strokes: "anywhere in here", without colour and without a pattern that would need a name. */
export function hatchedBar(from: number, to: number, middle: number): string {
  const strokes: string[] = [];
  for (let x = from; x + HALF <= to; x += HALF) strokes.push(`M${at(x, middle + HALF)}L${at(x + HALF, middle - HALF)}`);
  return `M${at(from, middle - HALF)}H${px(to)}V${px(middle + HALF)}H${px(from)}Z${strokes.join("")}`;
}

/** A dot with its interval on a row of its own, values across. */
export function intervalPieces({ intervals }: Plot, { x, y }: Frame): Piece[] {
  return intervals.flatMap(({ x: row, y: value, low, high }): Piece[] => {
    const middle = y(row);
    const dot: Piece = { look: "dot", group: null, d: shapePath("circle", x(value), middle, MARKER) };
    if (low === null || high === null) return [dot];
    const caps = [low, high].map((end) => `M${at(x(end), middle - CAP)}v${2 * CAP}`).join("");
    return [{ look: "interval", group: null, d: `M${at(x(low), middle)}H${px(x(high))}${caps}` }, dot];
  });
}

/** How a group's rows lie along the axis, as a hill on the lower edge of a strip. */
export function densityPiece(
  { group, x: places, height }: Plot["densities"][number],
  x: (value: number) => number,
  strip: Pick<Area, "top" | "height">,
): Piece {
  const base = strip.top + strip.height;
  const hill = places.map((value, i) => at(x(value), base - height[i] * strip.height));
  const ends = places.length > 0 ? [at(x(places[0]), base), at(x(places[places.length - 1]), base)] : [];
  return { look: "density", group, d: ends.length > 0 ? `M${[ends[0], ...hill, ends[1]].join("L")}Z` : "" };
}
