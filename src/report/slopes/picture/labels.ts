import type { Plot } from "../presentation";
import type { Frame } from "./place";

/** A group's name beside the end of its line: right end and middle of the text, in px. */
export interface EndLabel {
  readonly group: number;
  readonly text: string;
  readonly right: number;
  readonly middle: number;
}

/** Part of the plot's width a name may take. */
const SHARE = 0.4;
/** From a line to the middle of its name. */
const OFF = 11;

/**
 * Names at the ends of the groups' lines, the upper half above their lines, the lower half below, none over another. None where they would not
 * fit one above another.
 * @param widthOf width of a text in px
 * @param lineHeight px from one name to the next
 */
export function endLabels(plot: Plot, { area, x, y }: Frame, widthOf: (text: string) => number, lineHeight: number): EndLabel[] {
  const longest = area.width * SHARE;
  const ends = plot.groups.flatMap((name, group) => {
    const curve = plot.curves.find((item) => item.group === group && item.supported);
    if (!curve) return [];
    const text = shortened(name, longest, widthOf);
    const right = Math.min(x(curve.x[curve.x.length - 1]), area.left + area.width) - 2;
    // a name lies along its line for its whole width
    const under = curve.x.flatMap((value, i) => (x(value) >= right - widthOf(text) ? [y(curve.y[i])] : []));
    return [{ group, text, right, upper: Math.min(...under), lower: Math.max(...under), end: under[under.length - 1] }];
  });
  if (plot.kind !== "lines" || ends.length * lineHeight > area.height) return [];
  ends.sort((a, b) => a.end - b.end);
  const wanted = ends.map(({ upper, lower }, i) => (i < ends.length / 2 ? upper - OFF : lower + OFF));
  const half = lineHeight / 2;
  const middles = apart(wanted, lineHeight, area.top + half, area.top + area.height - half);
  return ends.map(({ group, text, right }, i) => ({ group, text, right, middle: middles[i] }));
}

/** Places in rising order, moved as little as needed to lie a step apart between two ends. */
function apart(wanted: readonly number[], step: number, from: number, to: number): number[] {
  const placed: number[] = [];
  wanted.forEach((place, i) => placed.push(Math.max(place, i === 0 ? from : placed[i - 1] + step)));
  for (let i = placed.length - 1, most = to; i >= 0; i--, most = placed[i + 1] - step) placed[i] = Math.min(placed[i], most);
  return placed;
}

/** A text cut to a width, with "…" where it is cut. */
export function shortened(text: string, width: number, widthOf: (text: string) => number): string {
  if (widthOf(text) <= width) return text;
  const letters = [...text];
  while (letters.length > 1 && widthOf(`${letters.join("")}…`) > width) letters.pop();
  return `${letters.join("").trimEnd()}…`;
}
