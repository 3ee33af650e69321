import { button, el } from "../dom";
import { redraw } from "../redraw";
import type { View } from "../view";
import { filterOf } from "./filter";
import { head, isOld } from "./head";
import { select } from "./select";
import { stripOf } from "./strip";
import { tableOf } from "./table";

const SETS = [
  { value: "each", text: "each column alone, then all" },
  { value: "steps", text: "columns added one at a time" },
  { value: "every", text: "every combination" },
] as const;

/** How far the difference moves from set to set: a block per contrast, then what can be done with the whole. */
export function drawShifts(part: HTMLElement, view: View): void {
  const { presentation, question, filter, status } = view.state;
  const blocks = presentation?.blocks ?? [];
  part.hidden = blocks.length === 0;
  const old = isOld(status.kind);
  redraw(part, [blocks, presentation?.joint, filter, question?.setsChoice, question?.setCount, old], () => {
    const several = blocks.length > 1;
    const strip = blocks.find((block) => block.strip)?.strip ?? null;
    const drawn = blocks.map((block) =>
      el(
        "div",
        { class: "block" },
        several && el("h3", {}, block.contrast),
        block.strip && stripOf(block, block.strip, view),
        tableOf(block, `Shifts, ${block.contrast}`, view),
      ),
    );
    return [
      head("shifts", "Shifts"),
      el(
        "div",
        { class: old ? "body old" : "body" },
        presentation?.joint ? el("p", { class: "sentence plain" }, presentation.joint) : null,
        ...drawn,
        strip && filterOf(strip.columns, view),
        tools(view),
      ),
    ];
  });
}

function tools({ state, choose, copy }: View): HTMLElement {
  const { question } = state;
  const list = { value: "list", text: "as the plan lists them", disabled: false };
  const listed = question?.setsChoice === "list" ? [list] : [];
  const choices = [...listed, ...SETS.map(({ value, text }) => ({ value, text, disabled: false }))];
  const sets =
    question &&
    select("sets", "Which sets to compare", choices, question.setsChoice, (value) => {
      if (value === "each" || value === "steps" || value === "every") choose({ key: "sets", sets: value });
    });
  const count =
    question && question.setCount > 0
      ? `${question.setCount.toLocaleString("en")} ${question.setCount === 1 ? "set" : "sets"}`
      : "";
  return el(
    "div",
    { class: "tools" },
    sets && el("span", { class: "sets" }, el("span", { class: "quiet" }, count ? `${count}: ` : "Sets: "), sets),
    button("Copy as Markdown", "copy-markdown", () => copy("markdown"), { "data-copy": "markdown" }),
    button("Copy as Table", "copy-table", () => copy("table"), { "data-copy": "table" }),
    el("span", { class: "copied", role: "status" }),
  );
}

let fading = 0;

/** The host's answer to a copy, beside the buttons for a while; a failure stays. */
export function showCopied(part: HTMLElement, text: string, ok: boolean): void {
  const place = part.querySelector<HTMLElement>(".copied");
  if (!place) return;
  window.clearTimeout(fading);
  place.textContent = text;
  place.classList.toggle("failed", !ok);
  if (ok) fading = window.setTimeout(() => place.replaceChildren(), 6000);
}
