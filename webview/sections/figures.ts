import type { Plot } from "../../src/protocol";
import type { View } from "../view";
import { layFigure } from "./figure";
import type { Figure } from "./figure";

const laid = new WeakMap<Element, { readonly figures: readonly Figure[]; readonly kinds: string }>();

/** The plots, one under another. While the same kinds follow each other they are drawn over in place: focus, folds and scroll stay. */
export function drawFigures(part: HTMLElement, plots: readonly Plot[], view: View): void {
  const kinds = plots.map((plot) => plot.kind).join(" ");
  let here = laid.get(part);
  if (here?.kinds !== kinds) {
    here?.figures.forEach((figure) => figure.leave());
    here = { kinds, figures: plots.map((plot) => layFigure(plot.kind, view)) };
    laid.set(part, here);
    part.replaceChildren(...here.figures.map((figure) => figure.root));
  }
  here.figures.forEach((figure, i) => figure.show(plots[i], axisOf(plots[i], plots)));
}

/** Rows and lines stand over the difference along the same axis. */
function axisOf(plot: Plot, plots: readonly Plot[]): readonly Plot[] {
  const along = plots.filter(({ kind }) => kind === "lines" || kind === "difference");
  return along.includes(plot) ? along : [plot];
}
