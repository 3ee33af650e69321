import type { SlopesSection } from "../../src/protocol";
import { el } from "../dom";
import type { View } from "../view";
import { select } from "./select";

/** What is looked at, as a sentence of lists: the set, the modifier with its verdict, and the contrast where there are several. */
export function chooserOf({ sets, set, modifiers, modifier, contrasts, contrast }: SlopesSection, { want }: View): HTMLElement {
  const setList = select(
    "slopes-set",
    "Columns held fixed",
    listed(sets.map(({ label }) => label)),
    labelOf(sets, set),
    (label) => want({ set: label }),
  );
  const modifierList =
    modifiers.length > 0 &&
    select(
      "slopes-modifier",
      "Along which column",
      modifiers.map(({ name, label, word }) => ({ value: name, text: word ? `${label}: ${word}` : label, disabled: false })),
      modifier,
      (name) => want({ modifier: name }),
    );
  const contrastList =
    contrasts.length > 1 &&
    select("slopes-contrast", "Contrast", listed(contrasts), contrasts[contrast] ?? "", (name) => want({ contrast: name }));
  return el(
    "p",
    { class: "chosen" },
    piece("Holding", setList, modifierList ? "fixed," : "fixed"),
    modifierList && piece("along", modifierList),
    contrastList && piece("for", contrastList),
  );
}

/** Words and the list between them, kept on one line where it has room. */
function piece(before: string, list: HTMLElement, after = ""): HTMLElement {
  return el("span", { class: "piece" }, el("span", {}, before), list, after !== "" && el("span", {}, after));
}

function listed(labels: readonly string[]) {
  return [...new Set(labels)].map((label) => ({ value: label, text: label, disabled: false }));
}

function labelOf(sets: SlopesSection["sets"], set: number): string {
  return sets.find(({ index }) => index === set)?.label ?? "";
}
