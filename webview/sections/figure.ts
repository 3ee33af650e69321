import type { Plot } from "../../src/protocol";
import { KEY_HEIGHT, KEY_WIDTH, keysOf } from "../../src/report/slopes/picture/keys";
import { paintedIcon } from "../charts/paint";
import { onTheme, paletteOf } from "../charts/palette";
import { layPlot } from "../charts/plot";
import { isFlipped } from "../charts/room";
import { el } from "../dom";
import { redraw } from "../redraw";
import type { View } from "../view";
import { saveTools } from "./save";
import { twinOf } from "./twin";

export interface Figure {
  readonly root: HTMLElement;
  /** @param along plots on the same axis, this one among them */
  readonly show: (plot: Plot, along: readonly Plot[]) => void;
  /** Lets go of what it holds; it is not shown again. */
  readonly leave: () => void;
}

/** One plot with its title, key, axes' names, its summary for a screen reader and its text twin. */
export function layFigure(kind: Plot["kind"], view: View): Figure {
  const name = `plot ${kind}`;
  let shown: Plot | null = null;
  const title = el("figcaption", { id: `plot-${kind}` });
  const summary = el("p", { class: "unseen", id: `plot-${kind}-summary` });
  const key = el("div", { class: "key" });
  const [above, below] = [el("p", { class: "axis-name" }), el("p", { class: "axis-name below" })];
  const picture = layPlot(`${name} plot`, title.id, summary.id);
  const note = el("p", { class: "quiet" });
  // a wide table is moved by keyboard too
  const scrolled = { role: "group", tabindex: 0, "aria-labelledby": title.id, "data-focus": `${name} table` };
  const twin = el("div", { class: "twin", ...scrolled });
  const fold = el("details", { open: view.isOpen(name) }, el("summary", { "data-focus": name }, "as a table"), twin);
  fold.addEventListener("toggle", () => view.setOpen(name, fold.open));
  const tools = saveTools(() => shown, name, title.id, view.post);
  const root = el("figure", { "data-plot": kind, "aria-labelledby": title.id });
  root.append(title, summary, key, above, picture.root, below, picture.said, note, fold, tools);

  const drawKey = (plot: Plot) => {
    const palette = paletteOf();
    const keys = keysOf(plot);
    redraw(key, [keys, palette], () =>
      keys.map(({ text, sample }) =>
        el("span", { class: "key-item" }, paintedIcon(sample, KEY_WIDTH, KEY_HEIGHT, palette), el("span", {}, text)),
      ),
    );
  };
  const themed = onTheme(() => shown && drawKey(shown));
  return {
    root,
    show: (plot, along) => {
      shown = plot;
      title.textContent = plot.title;
      summary.textContent = plot.summary;
      const flipped = isFlipped(plot);
      above.textContent = flipped ? plot.x.label : plot.y.label;
      below.textContent = flipped ? plot.y.label : plot.x.label;
      note.textContent = plot.points.map((points) => points.note ?? "").join("");
      note.hidden = note.textContent === "";
      drawKey(plot);
      picture.show(plot, along);
      redraw(twin, [plot.title, plot.twin], () => [twinOf(plot)]);
    },
    leave: () => {
      themed();
      picture.leave();
    },
  };
}
