import type { Plot } from "../../src/protocol";
import { el } from "../dom";
import { layCursor } from "./cursor";
import { onTheme, paletteOf } from "./palette";
import type { Palette } from "./palette";
import { Chart, datasetsOf, optionsOf, STRIP } from "./plotChart";
import { labelsOf } from "./plotLabels";
import { frameOn, paintOver, paintUnder } from "./plotPieces";
import { isFlipped, roomOf } from "./room";

/** Height of the canvas without strips of density, in px. */
const HEIGHT = 220;
/** A level's share of it, and what the axis needs. */
const LEVEL = 42;
const AXIS = 36;

export interface Picture {
  readonly root: HTMLElement;
  /** The exact values at the place that is read. */
  readonly said: HTMLElement;
  /** @param along plots that share the room beside their areas, this one among them */
  readonly show: (plot: Plot, along: readonly Plot[]) => void;
  readonly leave: () => void;
}

/**
 * One plot on a canvas, its names over it as text. It is drawn over in place, and anew when the theme or the width changes.
 * @param focus its name across redraws
 * @param title id of the element that names it
 * @param summary id of the element that says what it shows
 */
export function layPlot(focus: string, title: string, summary: string): Picture {
  const canvas = el("canvas", { "aria-hidden": "true" });
  const names = el("div", { class: "plot-names", "aria-hidden": "true" });
  // an application's keys are its own: a screen reader hands the arrows on
  const spoken = { role: "application", "aria-roledescription": "plot", "aria-labelledby": title, "aria-describedby": summary };
  const root = el("div", { class: "plot", tabindex: 0, "data-focus": focus, ...spoken }, canvas, names);
  const cursor = layCursor(root);
  root.append(cursor.area);
  let chart: Chart<"scatter"> | null = null;
  let shown: { plot: Plot; along: readonly Plot[]; palette: Palette; width: number } | null = null;

  const pieces = {
    id: "pieces",
    beforeDatasetsDraw: (drawn: Chart) => {
      if (shown) paintUnder(drawn, shown.plot, shown.palette);
    },
    afterDatasetsDraw: (drawn: Chart) => {
      if (shown) paintOver(drawn, shown.plot, shown.palette);
    },
  };

  function draw(plot: Plot, along: readonly Plot[]): void {
    const width = Math.round(root.getBoundingClientRect().width);
    const palette = paletteOf();
    shown = { plot, along, palette, width };
    if (width === 0) return;
    const height = isFlipped(plot) ? AXIS + LEVEL * plot.intervals.length : HEIGHT + plot.densities.length * STRIP;
    const options = optionsOf(plot, palette, roomOf(along, width, palette));
    const datasets = datasetsOf(plot, palette);
    chart ??= new Chart(canvas, { type: "scatter", data: { datasets }, options, plugins: [pieces] });
    chart.data.datasets = datasets;
    chart.options = options;
    chart.resize(width, height);
    chart.update("none");
    names.replaceChildren(...labelsOf(chart, plot, palette));
    cursor.lay(plot, frameOn(chart));
  }
  const again = () => shown && draw(shown.plot, shown.along);
  const watch = new ResizeObserver(() => {
    if (shown && Math.round(root.getBoundingClientRect().width) !== shown.width) again();
  });
  watch.observe(root);
  const themed = onTheme(again);
  return {
    root,
    said: cursor.said,
    show: draw,
    leave: () => {
      watch.disconnect();
      themed();
      chart?.destroy();
    },
  };
}
