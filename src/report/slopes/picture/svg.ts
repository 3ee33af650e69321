import { escapeXml } from "../../escape";
import type { Plot, PlotAxis } from "../presentation";
import { KEY_HEIGHT, KEY_WIDTH, keysOf } from "./keys";
import { endLabels, shortened } from "./labels";
import { paintPiece, paintRule, paintText } from "./paint";
import { bandPieces, curvePieces, densityPiece, intervalPieces, markerPieces, markPieces, pointPieces } from "./pieces";
import type { Piece } from "./pieces";
import { frameOf } from "./place";
import type { Frame } from "./place";
import { px } from "./shapes";
import { guessWidth, wrapped } from "./text";

/** Sizes in px. */
const WIDTH = 720;
const EDGE = 16;
const SIZE = 13;
const TITLE = 15;
const LINE = 18;
const HEIGHT = 300;
/** A level's row: its name above its interval. */
const ROW = 40;
const STRIP = 26;

const widthOf = (text: string) => guessWidth(text, SIZE);

/**
 * A plot as an SVG file, to be read on white: title and summary for a screen reader, no script, no name that could clash where it is put into a
 * page. All texts are the plot's.
 */
export function figureSvg(plot: Plot): string {
  const inner = WIDTH - 2 * EDGE;
  const head = wrapped(plot.title, inner, (text) => 1.08 * guessWidth(text, TITLE));
  let y = EDGE + TITLE;
  const parts = head.map((line, i) => paintText(line, EDGE, y + i * (LINE + 2), { size: TITLE, bold: true }));
  y += (head.length - 1) * (LINE + 2) + 10;
  const keys = layKeys(plot, y, inner);
  parts.push(...keys.parts);
  y = keys.bottom;
  // intervals of levels lie across, a row a level
  const rows = plot.kind === "levels";
  const [across, up] = rows ? [plot.y, plot.x] : [plot.x, plot.y];
  if (!rows) {
    const lines = wrapped(up.label, inner, widthOf);
    parts.push(...lines.map((line, i) => paintText(line, EDGE, y + LINE + i * LINE, { soft: true })));
    y += lines.length * LINE;
  }
  const left = rows ? EDGE + 8 : EDGE + 10 + Math.max(...up.ticks.map(({ text }) => widthOf(text)), 20);
  const height = rows ? ROW * plot.intervals.length : HEIGHT;
  const area = { left, top: y + 10, width: WIDTH - EDGE - 12 - left, height };
  const frame = frameOf(across, rows ? { ...up, from: up.to, to: up.from } : up, area);
  parts.push(...axes(frame, across, rows ? null : up), ...drawn(plot, frame));
  y = area.top + height + 8 + LINE;
  const under = wrapped(across.label, area.width, widthOf);
  parts.push(...under.map((line, i) => paintText(line, left + area.width, y + LINE + i * LINE, { anchor: "end", soft: true })));
  y += under.length * LINE + 10;
  for (const density of plot.densities) {
    const strip = { top: y, height: STRIP };
    const name = shortened(plot.groups[density.group] ?? "", area.width / 2, widthOf);
    parts.push(
      paintPiece(densityPiece(density, frame.x, strip)),
      paintRule(`M${px(left)} ${px(y + STRIP)}h${px(area.width)}`, true),
    );
    parts.push(paintText(name, left + 4, y + 12, { group: density.group, rim: true }));
    y += STRIP + 8;
  }
  const notes = plot.points.flatMap(({ note }) => (note === null ? [] : wrapped(note, inner, widthOf)));
  parts.push(...notes.map((line, i) => paintText(line, EDGE, y + LINE + i * LINE, { soft: true })));
  y += notes.length * LINE + EDGE;
  const box = `viewBox="0 0 ${WIDTH} ${Math.ceil(y)}" width="${WIDTH}" height="${Math.ceil(y)}"`;
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" ${box} role="img" font-family="system-ui, 'Segoe UI', Helvetica, Arial, sans-serif">`,
    `<title>${escapeXml(plot.title)}</title>`,
    `<desc>${escapeXml(plot.summary)}</desc>`,
    `<rect width="100%" height="100%" fill="#ffffff"/>`,
    ...parts.filter((part) => part !== ""),
    "</svg>\n",
  ].join("\n");
}

/** Keys in rows from a height on, and where they end. */
function layKeys(plot: Plot, top: number, width: number): { parts: string[]; bottom: number } {
  const parts: string[] = [];
  let [x, y] = [EDGE, top];
  for (const { text, sample } of keysOf(plot)) {
    const lines = wrapped(text, width - KEY_WIDTH - 8, widthOf);
    const wide = KEY_WIDTH + 8 + Math.max(...lines.map(widthOf));
    if (x > EDGE && x + wide > EDGE + width) [x, y] = [EDGE, y + LINE];
    parts.push(`<g transform="translate(${px(x)} ${px(y + 2)})">${sample.map(paintPiece).join("")}</g>`);
    parts.push(...lines.map((line, i) => paintText(line, x + KEY_WIDTH + 6, y + KEY_HEIGHT - 1 + i * LINE)));
    if (lines.length > 1) [x, y] = [EDGE, y + lines.length * LINE];
    else x += wide + 18;
  }
  return { parts, bottom: x > EDGE ? y + LINE + 4 : y + 4 };
}

/** Grid, edges and ticks; ticks that would lie over the one before are left out. */
function axes({ area, x, y }: Frame, across: PlotAxis, up: PlotAxis | null): string[] {
  const { left, top, width, height } = area;
  const bottom = top + height;
  const parts: string[] = [paintRule(across.ticks.map((tick) => `M${px(x(tick.at))} ${px(top)}V${px(bottom)}`).join(""))];
  if (up) parts.push(paintRule(up.ticks.map((tick) => `M${px(left)} ${px(y(tick.at))}h${px(width)}`).join("")));
  parts.push(paintRule(`M${px(left)} ${px(bottom)}h${px(width)}`, true));
  let end = -Infinity;
  for (const { at, text } of across.ticks) {
    const half = widthOf(text) / 2;
    if (x(at) - half < end + 6) continue;
    end = x(at) + half;
    parts.push(paintText(text, x(at), bottom + LINE, { anchor: "middle", soft: true }));
  }
  for (const { at, text } of up?.ticks ?? []) parts.push(paintText(text, left - 6, y(at) + 4.5, { anchor: "end", soft: true }));
  return parts;
}

/** Everything inside the axes; lines and bands that reach beyond them are cut off. */
function drawn(plot: Plot, frame: Frame): string[] {
  const { area } = frame;
  const { left, top, width, height } = area;
  const under = [
    ...bandPieces(plot.bands, frame),
    ...markPieces(
      plot.marks.filter((mark) => plot.kind !== "levels" || mark.axis === "x"),
      frame,
    ),
  ];
  const over = [...curvePieces(plot.curves, frame), ...markerPieces(plot, frame)];
  const place = `x="${px(left)}" y="${px(top)}" width="${px(width)}" height="${px(height)}"`;
  const view = `viewBox="${px(left)} ${px(top)} ${px(width)} ${px(height)}"`;
  const inside = (pieces: readonly Piece[]) =>
    pieces.length > 0 ? `<svg ${place} ${view} overflow="hidden">${pieces.map(paintPiece).join("")}</svg>` : "";
  const names = endLabels(plot, frame, (text) => 1.08 * widthOf(text), LINE - 3);
  return [
    inside(under),
    // every row lies inside the axes; one at their end is drawn whole
    ...pointPieces(plot, frame).map(paintPiece),
    inside(over),
    ...(plot.kind === "levels" ? levels(plot, frame) : []),
    ...names.map(({ text, right, middle, group }) =>
      paintText(text, right, middle + 4.5, { anchor: "end", bold: true, group, rim: true }),
    ),
  ];
}

/** Zero upright, then each level's name above its dot and interval. */
function levels(plot: Plot, frame: Frame): string[] {
  const { left, top, width, height } = frame.area;
  const zero = plot.marks.filter(({ what }) => what === "zero").map(({ at }) => `M${px(frame.x(at))} ${px(top)}v${px(height)}`);
  const names = plot.intervals.map(({ name, x }) =>
    paintText(shortened(name, width, widthOf), left, frame.y(x) - 8, { rim: true }),
  );
  return [paintPiece({ look: "zero", group: null, d: zero.join("") }), ...intervalPieces(plot, frame).map(paintPiece), ...names];
}
