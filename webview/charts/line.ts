import type { Axis, Line } from "../../src/report/presentation";
import { svg } from "../dom";
import { percent, within } from "./scale";

const HEIGHT = 18;
const MIDDLE = HEIGHT / 2;
const CAP = 4;

/** One estimate on the common axis: an interval with its point, a point alone, or a hatched span without a point. */
export function drawLine(axis: Axis, line: Line | null, aloud: string): SVGSVGElement {
  const at = (value: number) => `${percent(axis, value).toFixed(3)}%`;
  const picture = svg("svg", {
    class: "line",
    width: "100%",
    height: HEIGHT,
    ...(line ? { role: "img", "aria-label": aloud } : { "aria-hidden": "true" }),
  });
  if (within(axis, 0)) picture.append(svg("line", { class: "zero", x1: at(0), x2: at(0), y1: 0, y2: HEIGHT }));
  if (!line) return picture;
  if (line.kind === "span") {
    const left = percent(axis, Math.min(line.low, line.high));
    const right = percent(axis, Math.max(line.low, line.high));
    picture.append(hatched(left, Math.max(right - left, 0.5)));
    return picture;
  }
  if (line.kind === "interval") {
    picture.append(svg("line", { class: "interval", x1: at(line.low), x2: at(line.high), y1: MIDDLE, y2: MIDDLE }));
    for (const end of [line.low, line.high]) {
      if (within(axis, end))
        picture.append(svg("line", { class: "interval", x1: at(end), x2: at(end), y1: MIDDLE - CAP, y2: MIDDLE + CAP }));
    }
  }
  picture.append(svg("circle", { class: "point", cx: at(line.mid), cy: MIDDLE, r: 3.5 }));
  return picture;
}

let patterns = 0;

/** Hatching says "anywhere in here" in every theme, without colour. */
function hatched(left: number, width: number): SVGGElement {
  const id = `hatch-${++patterns}`;
  const stripes = svg("path", { class: "hatch", d: "M0 0V6" });
  const pattern = svg(
    "pattern",
    { id, width: 5, height: 6, patternUnits: "userSpaceOnUse", patternTransform: "rotate(45)" },
    stripes,
  );
  const box = { x: `${left.toFixed(3)}%`, width: `${width.toFixed(3)}%`, y: MIDDLE - 5, height: 10 };
  return svg(
    "g",
    {},
    svg("defs", {}, pattern),
    svg("rect", { ...box, fill: `url(#${id})` }),
    svg("rect", { ...box, class: "span" }),
  );
}
