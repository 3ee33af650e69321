import type { HostMessage, Plot, SavedFigure } from "../../src/protocol";
import { figureSvg } from "../../src/report/slopes/picture/svg";
import type { Post } from "../channel";
import { pngOf } from "../charts/png";
import { button, el } from "../dom";

/** What was said stays this long, in ms; a failure stays. */
const LINGER = 6000;

let saves = 0;
/** Where the answer to each save is said. */
const places = new Map<number, HTMLElement>();

/**
 * Buttons that send a figure to be saved: drawn anew for paper from the same numbers, in black on white whatever the theme.
 * @param plot the plot as it is when a button is pressed
 * @param name what the buttons are called across redraws
 * @param title id of the figure's title
 */
export function saveTools(plot: () => Plot | null, name: string, title: string, post: Post): HTMLElement {
  const said = el("span", { class: "copied", role: "status" });
  const save = (as: SavedFigure["as"]) => {
    const shown = plot();
    if (!shown) return;
    const id = ++saves;
    const svg = figureSvg(shown);
    said.replaceChildren();
    places.set(id, said);
    const send = (data: string) => post({ type: "saveFigure", id, figure: { as, name: shown.title, data } });
    if (as === "svg") send(svg);
    else pngOf(svg).then(send, () => showSaved({ id, ok: false, text: "The picture could not be drawn." }));
  };
  const tool = (as: SavedFigure["as"], text: string) =>
    button(text, `${name} ${as}`, () => save(as), { "data-save": as, "aria-describedby": title });
  return el("div", { class: "tools" }, tool("svg", "Save as SVG"), tool("png", "Save as PNG"), said);
}

/** The host's answer, beside the buttons that asked. */
export function showSaved({ id, ok, text }: Pick<Extract<HostMessage, { type: "saved" }>, "id" | "ok" | "text">): void {
  const place = places.get(id);
  places.delete(id);
  if (!place) return;
  place.textContent = text;
  place.classList.toggle("failed", !ok);
  if (ok) window.setTimeout(() => place.textContent === text && place.replaceChildren(), LINGER);
}
