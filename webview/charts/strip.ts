import type { Axis, Strip } from "../../src/report/presentation";
import { svg } from "../dom";
import { percent, within } from "./scale";

type Item = Strip["items"][number];
export const PLOT = 120;
export const ROW = 18;
const PAD = 6;

/** The axis the strip is drawn on: wide enough for every set, with the table's ticks. */
export function stripAxis(strip: Strip, axis: Axis | null): Axis {
  const ends = strip.items.flatMap(({ line }) =>
    line === null ? [] : line.kind === "point" ? [line.mid] : [line.low, line.high],
  );
  let [low, high] = [Math.min(0, axis?.low ?? 0), Math.max(0, axis?.high ?? 0)];
  for (const end of ends) [low, high] = [Math.min(low, end), Math.max(high, end)];
  const pad = (high - low) * 0.04 || 1;
  return { low: low - pad, high: high + pad, ticks: axis?.ticks ?? [{ at: 0, text: "0" }] };
}

/** The order of all sets by estimate: intervals and points above, what each set holds fixed below, the chosen set framed. */
export function drawStrip(strip: Strip, axis: Axis, width: number, chosen: number): SVGElement[] {
  const step = width / Math.max(1, strip.items.length);
  const x = (i: number) => (i + 0.5) * step;
  const y = (value: number) => PAD + (1 - percent(axis, value) / 100) * (PLOT - 2 * PAD);
  const parts: SVGElement[] = [];
  if (within(axis, 0)) parts.push(svg("line", { class: "zero", x1: 0, x2: width, y1: y(0), y2: y(0) }));
  parts.push(
    svg("path", {
      class: "interval thin",
      d: each(
        strip,
        ({ line }, i) => line?.kind === "interval" && `M${x(i).toFixed(1)} ${y(line.low).toFixed(1)}V${y(line.high).toFixed(1)}`,
      ),
    }),
  );
  parts.push(
    svg("path", {
      class: "span-thin",
      d: each(
        strip,
        ({ line }, i) => line?.kind === "span" && `M${x(i).toFixed(1)} ${y(line.low).toFixed(1)}V${y(line.high).toFixed(1)}`,
      ),
    }),
  );
  const size = Math.min(6, Math.max(2, step * 0.7));
  const points = each(
    strip,
    ({ line }, i) =>
      line !== null && line.kind !== "span" && `M${(x(i) - size / 2).toFixed(1)} ${y(line.mid).toFixed(1)}h${size.toFixed(1)}`,
  );
  const dots = svg("path", { class: "points", d: points });
  dots.style.strokeWidth = `${size}px`;
  parts.push(dots);
  strip.columns.forEach((_, column) => {
    const top = PLOT + column * ROW + ROW / 2;
    parts.push(svg("line", { class: "guide", x1: 0, x2: width, y1: top, y2: top }));
    parts.push(
      svg("path", {
        class: "holds",
        d: runs(strip.items, column)
          .map(([from, to]) => `M${(from * step + step * 0.12).toFixed(2)} ${top}H${((to + 1) * step - step * 0.12).toFixed(2)}`)
          .join(""),
      }),
    );
  });
  const frame = Math.max(step, 5);
  parts.push(
    svg("rect", {
      class: "cursor",
      x: Math.min(Math.max(x(chosen) - frame / 2, 0.5), width - frame - 0.5),
      y: 0.5,
      width: frame,
      height: PLOT + strip.columns.length * ROW - 1,
    }),
  );
  return parts;
}

function each(strip: Strip, path: (item: Item, i: number) => string | false): string {
  return strip.items.map((item, i) => path(item, i) || "").join("");
}

/** Neighbouring sets that hold a column, as one run each. */
function runs(items: readonly Item[], column: number): [number, number][] {
  const found: [number, number][] = [];
  items.forEach(({ holds }, i) => {
    if (!holds.includes(column)) return;
    const last = found.at(-1);
    if (last && last[1] === i - 1) last[1] = i;
    else found.push([i, i]);
  });
  return found;
}
