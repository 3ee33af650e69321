import type { Chart } from "chart.js";
import type { Plot } from "../../src/protocol";
import { bandPieces, densityPiece, intervalPieces, markerPieces, markPieces } from "../../src/report/slopes/picture/pieces";
import type { Frame } from "../../src/report/slopes/picture/place";
import type { Palette } from "./palette";
import { paintOn } from "./paint";
import { STRIP } from "./plotChart";
import { isFlipped } from "./room";

/** Space between strips, in px. */
const BETWEEN = 6;

/** Where values lie on the canvas, across and up; of levels, values lie across and levels down. */
export function frameOn(chart: Chart): Frame {
  const { x, y } = chart.scales;
  const { left, top, width, height } = chart.chartArea;
  return { area: { left, top, width, height }, x: (value) => x.getPixelForValue(value), y: (value) => y.getPixelForValue(value) };
}

/** Bands and marks, under the rows and lines. */
export function paintUnder(chart: Chart, plot: Plot, palette: Palette): void {
  const frame = frameOn(chart);
  if (isFlipped(plot)) {
    const { area, x } = frame;
    const zeros = plot.marks.filter(({ axis }) => axis === "y").map(({ at }) => `M${x(at)} ${area.top}v${area.height}`);
    paintOn(chart.ctx, [{ look: "zero", group: null, d: zeros.join("") }], palette);
  } else inside(chart, () => paintOn(chart.ctx, [...bandPieces(plot.bands, frame), ...markPieces(plot.marks, frame)], palette));
}

/** The groups' shapes on their lines, dots with their intervals, and the strips of density under the axis. */
export function paintOver(chart: Chart, plot: Plot, palette: Palette): void {
  const frame = frameOn(chart);
  inside(chart, () => paintOn(chart.ctx, markerPieces(plot, frame), palette));
  const strips = plot.densities.map((density, i) => densityPiece(density, frame.x, stripAt(chart, plot, i)));
  paintOn(chart.ctx, [...intervalPieces(plot, frame), ...strips], palette);
}

/** Where a group's strip of density lies. */
export function stripAt(chart: Chart, { densities }: Plot, i: number): { readonly top: number; readonly height: number } {
  return { top: chart.height - (densities.length - i) * STRIP + BETWEEN, height: STRIP - BETWEEN };
}

function inside({ ctx, chartArea: { left, top, width, height } }: Chart, paint: () => void): void {
  ctx.save();
  ctx.beginPath();
  ctx.rect(left, top, width, height);
  ctx.clip();
  paint();
  ctx.restore();
}
