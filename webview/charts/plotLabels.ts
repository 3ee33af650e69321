import type { Chart } from "chart.js";
import type { Plot } from "../../src/protocol";
import { endLabels } from "../../src/report/slopes/picture/labels";
import { el } from "../dom";
import { widthOf } from "./palette";
import type { Palette } from "./palette";
import { frameOn, stripAt } from "./plotPieces";
import { isFlipped } from "./room";

/** Height of a line of small text, in px. */
const LINE = 16;
const GAP = 8;

/** Names as text over the canvas: at the ends of the groups' lines, before their strips, and over the intervals of levels. */
export function labelsOf(chart: Chart, plot: Plot, palette: Palette): HTMLElement[] {
  const frame = frameOn(chart);
  const { left, width } = frame.area;
  const name = (text: string, kind: string, style: Partial<Record<"left" | "right" | "width" | "top", number>>) => {
    const label = el("span", { class: `plot-name ${kind}`, title: text }, text);
    for (const [key, value] of Object.entries(style)) label.style.setProperty(key, `${value}px`);
    return label;
  };
  const bold = (text: string) => 1.1 * widthOf(text, palette);
  const lines = endLabels(plot, frame, bold, LINE).map((end) => {
    const label = name(end.text, "of-line", { right: chart.width - end.right, top: end.middle - LINE / 2 });
    label.title = plot.groups[end.group];
    return label;
  });
  const strips = plot.densities.map(({ group }, i) => {
    const strip = stripAt(chart, plot, i);
    return name(plot.groups[group] ?? "", "of-strip", { left: 0, width: left - GAP, top: strip.top + strip.height - LINE });
  });
  const levels = isFlipped(plot)
    ? plot.intervals.map((level) =>
        name(level.name, "of-level", { left: left + 4, width: width - 4, top: frame.y(level.x) - LINE - 6 }),
      )
    : [];
  return [...lines, ...strips, ...levels];
}
