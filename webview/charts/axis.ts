import type { Axis } from "../../src/report/presentation";
import { svg } from "../dom";
import { percent } from "./scale";
import { onWidth } from "./width";

/** Room a tick's text needs on either side, in px a character. */
const CHARACTER = 7;
const GAP = 8;

/** The common axis over the lines: zero always, other ticks where there is room. */
export function drawAxis(axis: Axis): SVGSVGElement {
  const picture = svg("svg", { class: "axis", width: "100%", height: 18, "aria-hidden": "true" });
  onWidth(picture, (width) => picture.replaceChildren(...ticks(axis, width)));
  return picture;
}

function ticks(axis: Axis, width: number): Element[] {
  const placed: { left: number; right: number }[] = [];
  const order = [...axis.ticks].sort((a, b) => rank(axis, a.at) - rank(axis, b.at));
  return order.flatMap(({ at, text }) => {
    const middle = (percent(axis, at) / 100) * width;
    const half = (text.length * CHARACTER) / 2;
    const left = Math.min(Math.max(middle - half, 0), Math.max(width - 2 * half, 0));
    if (placed.some((other) => left < other.right + GAP && left + 2 * half > other.left - GAP)) return [];
    placed.push({ left, right: left + 2 * half });
    const x = `${percent(axis, at).toFixed(3)}%`;
    return [
      svg("line", { class: at === 0 ? "zero" : "tick", x1: x, x2: x, y1: 14, y2: 18 }),
      svg("text", { class: "tick-text", x: left + half, y: 10, "text-anchor": "middle" }, text),
    ];
  });
}

/** Zero first, then the outermost. */
function rank(axis: Axis, at: number): number {
  return at === 0 ? -1 : axis.high - axis.low - Math.abs(at);
}
