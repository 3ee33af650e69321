import type { SlopesSection } from "../../src/protocol";
import { el } from "../dom";
import { redraw } from "../redraw";
import { askSlopes } from "../slopes/ask";
import type { View } from "../view";
import { drawFigures } from "./figures";
import { head, isOld } from "./head";
import { chooserOf } from "./slopesChooser";

/** A wait shorter than this, in ms, is not worth a word. */
const PATIENCE = 400;

interface Pieces {
  readonly fold: HTMLDetailsElement;
  readonly finding: HTMLElement;
  readonly inside: HTMLElement;
  readonly chooser: HTMLElement;
  readonly waiting: HTMLElement;
  readonly sentences: HTMLElement;
  readonly figures: HTMLElement;
}

let pieces: Pieces | null = null;
let now: View;
/** The latest figure; it stays on the page, marked, until the next one is there. */
let shown: SlopesSection | null = null;
let impatient = 0;

/** How the difference changes along a modifier: closed until opened, with the finding in its heading row. */
export function drawSlopes(part: HTMLElement, view: View): void {
  now = view;
  const { presentation, slopes, status } = view.state;
  part.hidden = !presentation || presentation.slopesSummary === "";
  const { fold, finding, inside, chooser, waiting, sentences, figures } = (pieces ??= lay(part));
  const open = view.isOpen("slopes");
  fold.open = open;
  finding.textContent = presentation?.slopesSummary ?? "";
  shown = open ? (slopes ?? shown) : null;
  if (presentation) askSlopes(view, shown);
  wait(waiting, inside, open && !slopes && !isOld(status.kind));
  inside.classList.toggle("old", isOld(status.kind));
  redraw(chooser, shown && [shown.sets, shown.set, shown.modifiers, shown.modifier, shown.contrasts, shown.contrast], () =>
    shown ? [chooserOf(shown, view)] : [],
  );
  redraw(sentences, shown?.sentences, () => (shown?.sentences ?? []).map((text) => el("p", { class: "sentence" }, text)));
  drawFigures(figures, shown?.plots ?? [], view);
}

function lay(part: HTMLElement): Pieces {
  const finding = el("span", {});
  const [chooser, sentences, figures] = ["chooser", "sentences", "figures"].map((name) => el("div", { class: name }));
  chooser.dataset["focusNext"] = "slopes-modifier";
  const waiting = el("p", { class: "quiet", hidden: true }, "The slopes are being drawn…");
  const inside = el("div", { class: "slopes" }, chooser, waiting, sentences, figures);
  const fold = el("details", { class: "fold" }, el("summary", { "data-focus": "slopes" }, finding), inside);
  fold.addEventListener("toggle", () => {
    if (fold.open === now.isOpen("slopes")) return;
    now.setOpen("slopes", fold.open);
    drawSlopes(part, now);
  });
  part.replaceChildren(head("slopes", "Slopes"), el("div", { class: "body" }, fold));
  return { fold, finding, inside, chooser, waiting, sentences, figures };
}

/** Old figures are dimmed at once; a word moves them only when it takes long. */
function wait(waiting: HTMLElement, inside: HTMLElement, waits: boolean): void {
  inside.classList.toggle("waiting", waits);
  inside.setAttribute("aria-busy", String(waits));
  if (!waits) {
    window.clearTimeout(impatient);
    impatient = 0;
    waiting.hidden = true;
  } else if (!shown) waiting.hidden = false;
  else if (impatient === 0) impatient = window.setTimeout(() => (waiting.hidden = false), PATIENCE);
}
