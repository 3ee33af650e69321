import type { Plot } from "../presentation";
import { arrow, hatchedBar } from "./pieces";
import type { Piece } from "./pieces";
import { px, shapeOf, shapePath } from "./shapes";

/** A sample of how something is painted, with its name. */
export interface Key {
  readonly text: string;
  /** In a box of KEY_WIDTH by KEY_HEIGHT px. */
  readonly sample: readonly Piece[];
}

export const KEY_WIDTH = 30;
export const KEY_HEIGHT = 14;
const MIDDLE = KEY_HEIGHT / 2;
const CENTRE = KEY_WIDTH / 2;

/** What is drawn and what it means, in the order of reading: groups or bands, then marks. */
export function keysOf(plot: Plot): Key[] {
  const { kind, curves, marks } = plot;
  const own = kind === "lines" ? groupKeys(plot) : bandKeys(plot);
  const line = kind === "added" ? curves.slice(0, 1).map(({ name }) => ({ text: name, sample: [stroke("line", null)] })) : [];
  // the last column of such a plot's twin is named after the interval
  const interval = kind === "levels" ? [{ text: plot.twin.head[plot.twin.head.length - 1], sample: sampleInterval() }] : [];
  const marked = marks.map((mark) => ({ text: mark.label, sample: sampleMark(mark) }));
  return [...line, ...own, ...interval, ...marked];
}

/** One key a group: its band, line and shape together; a band's name says the group's. */
function groupKeys({ groups, bands, curves }: Plot): Key[] {
  return groups.flatMap((text, group) => {
    const band = bands.find((item) => item.group === group);
    if (!band && !curves.some((curve) => curve.group === group)) return [];
    const marker: Piece = { look: "marker", group, d: shapePath(shapeOf(group), CENTRE, MIDDLE, 4) };
    return [{ text: band?.name ?? text, sample: [...(band ? [area("band", group)] : []), stroke("line", group), marker] }];
  });
}

function bandKeys({ bands, kind }: Plot): Key[] {
  return [...bands].reverse().map(({ name, reach, group }) => ({
    text: name,
    sample:
      reach === "simultaneous"
        ? [area("outline", group)]
        : [area("band", group), ...(kind === "difference" ? [stroke("line", group)] : [])],
  }));
}

function sampleMark({ what, stretch }: Plot["marks"][number]): Piece[] {
  const upright = `M${px(CENTRE)} 0V${KEY_HEIGHT}`;
  switch (what) {
    case "zero":
      return [stroke("zero", null)];
    case "crossing":
      return [
        { look: "crossing", group: null, d: upright },
        ...(stretch ? [{ look: "stretch" as const, group: null, d: hatchedBar(5, KEY_WIDTH - 5, MIDDLE) }] : []),
      ];
    case "shared from":
    case "shared to":
      return [
        { look: "shared", group: null, d: upright },
        { look: "arrow", group: null, d: arrow(CENTRE, MIDDLE, what === "shared to" ? -1 : 1) },
      ];
  }
}

function sampleInterval(): Piece[] {
  return [
    { look: "interval", group: null, d: `M3 ${MIDDLE}H${KEY_WIDTH - 3}M3 ${MIDDLE - 4}v8M${KEY_WIDTH - 3} ${MIDDLE - 4}v8` },
    { look: "dot", group: null, d: shapePath("circle", CENTRE, MIDDLE, 4) },
  ];
}

function stroke(look: "line" | "zero", group: number | null): Piece {
  return { look, group, d: `M0 ${MIDDLE}H${KEY_WIDTH}` };
}

function area(look: "band" | "outline", group: number | null): Piece {
  return { look, group, d: `M1 1.5H${KEY_WIDTH - 1}V${KEY_HEIGHT - 1.5}H1Z` };
}
