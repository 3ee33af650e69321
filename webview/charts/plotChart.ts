import { Chart, LinearScale, LineElement, LogarithmicScale, PointElement, ScatterController } from "chart.js";
import type { ChartConfiguration, ChartDataset, PointStyle } from "chart.js";
import { shapeOf } from "../../src/report/slopes/picture/shapes";
import type { Shape } from "../../src/report/slopes/picture/shapes";
import type { Plot } from "../../src/protocol";
import { faded } from "./palette";
import type { Palette } from "./palette";
import { paintOf } from "./paint";
import { isFlipped } from "./room";

Chart.register(ScatterController, LineElement, PointElement, LinearScale, LogarithmicScale);
export { Chart };

/** Height of one group's strip of density, in px. */
export const STRIP = 22;
/** Beside and over the area, so that nothing at its ends is cut. */
const EDGE = 14;
const OVER = 8;
/** Rows from which on points are drawn small. */
const MANY = 300;

const STYLES: Readonly<Record<Shape, PointStyle>> = {
  circle: "circle",
  triangle: "triangle",
  square: "rect",
  diamond: "rectRot",
  cross: "crossRot",
  plus: "cross",
};

type Options = NonNullable<ChartConfiguration<"scatter">["options"]>;

/** Lines over rows; what comes first lies on top. */
export function datasetsOf({ curves, points }: Plot, palette: Palette): ChartDataset<"scatter">[] {
  const rows = points.reduce((sum, { x }) => sum + x.length, 0);
  const lines = curves.map(({ group, x, y, supported }): ChartDataset<"scatter"> => {
    const { stroke, width, dash } = paintOf(supported ? "line" : "beyond", group, palette);
    return {
      data: x.map((at, i) => ({ x: at, y: y[i] })),
      showLine: true,
      pointRadius: 0,
      borderColor: stroke ?? palette.ink,
      borderWidth: width,
      borderDash: [...dash],
    };
  });
  const dots = points.map(({ group, x, y }): ChartDataset<"scatter"> => {
    const { stroke, strokeShare, width } = paintOf("points", group, palette);
    return {
      data: x.map((at, i) => ({ x: at, y: y[i] })),
      // rows at the ends of the axis are seen whole
      clip: EDGE / 2,
      pointStyle: STYLES[shapeOf(group)],
      pointRadius: rows >= MANY ? 2.5 : 3.5,
      pointBorderColor: faded(stroke ?? palette.ink, strokeShare),
      pointBorderWidth: width,
      pointBackgroundColor: "transparent",
    };
  });
  return [...lines, ...dots];
}

/** @param left px left of the area */
export function optionsOf(plot: Plot, palette: Palette, left: number): Options {
  const afterFit = (scale: { width: number }) => (scale.width = left);
  const scales = isFlipped(plot)
    ? {
        x: scaleOf(plot.y, palette, true),
        y: { ...scaleOf(plot.x, palette, false), reverse: true, afterFit, ticks: { display: false }, border: { display: false } },
      }
    : { x: scaleOf(plot.x, palette, false), y: { ...scaleOf(plot.y, palette, true), afterFit } };
  return {
    animation: false,
    // the page tells the size, so that names and lines move together
    responsive: false,
    maintainAspectRatio: false,
    events: [],
    layout: { padding: { top: OVER, right: EDGE, bottom: plot.densities.length * STRIP } },
    scales: scales as Options["scales"],
  };
}

function scaleOf({ from, to, ticks, log }: Plot["x"], palette: Palette, lines: boolean) {
  const texts = new Map(ticks.map(({ at, text }) => [at, text]));
  return {
    type: log ? "logarithmic" : "linear",
    min: from,
    max: to,
    grid: { display: lines, color: faded(palette.ink, 0.14), tickLength: 4 },
    border: { color: palette.soft },
    afterBuildTicks: (scale: { ticks: { value: number }[] }) => (scale.ticks = ticks.map(({ at }) => ({ value: at }))),
    ticks: {
      color: palette.soft,
      font: { family: palette.font, size: palette.size },
      maxRotation: 0,
      autoSkipPadding: 10,
      callback: (value: string | number) => texts.get(Number(value)) ?? "",
    },
  };
}
