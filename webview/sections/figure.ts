import type { Plot } from "../../src/protocol";
import { el } from "../dom";
import { redraw } from "../redraw";
import type { View } from "../view";
import { twinOf } from "./twin";

export interface Figure {
  readonly root: HTMLElement;
  readonly show: (plot: Plot) => void;
  /** Lets go of what it holds; it is not shown again. */
  readonly leave: () => void;
}

/** One plot with its title, its summary for a screen reader and its text twin. */
export function layFigure(kind: Plot["kind"], view: View): Figure {
  const title = el("figcaption", { id: `plot-${kind}` });
  const summary = el("p", { class: "unseen", id: `plot-${kind}-summary` });
  const twin = el("div", { class: "twin" });
  const name = `plot ${kind}`;
  const fold = el("details", { open: view.isOpen(name) }, el("summary", { "data-focus": name }, "as a table"), twin);
  fold.addEventListener("toggle", () => view.setOpen(name, fold.open));
  const root = el("figure", { "data-plot": kind, "aria-labelledby": title.id }, title, summary, fold);
  return {
    root,
    show: (plot) => {
      title.textContent = plot.title;
      summary.textContent = plot.summary;
      redraw(twin, [plot.title, plot.twin], () => [twinOf(plot)]);
    },
    leave: () => undefined,
  };
}
