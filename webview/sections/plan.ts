import { button, el } from "../dom";
import type { View } from "../view";

/** Where the question is kept: the plan file's name, or a button that makes one; and why it is not kept, where it is not. */
export function planLine({ state, post }: View): HTMLElement {
  const { plan, note } = state.keptIn;
  const keep =
    plan === null
      ? button("Save the question as a plan", "plan", () => post({ type: "savePlan" }), { "data-plan": "save" })
      : button(plan, "plan", () => post({ type: "openLine", line: 1, inPlan: true }), {
          class: "link",
          "data-plan": "open",
          title: "Open the plan",
        });
  return el(
    "p",
    { class: "plan" },
    plan !== null && el("span", { class: "quiet" }, "Kept in "),
    keep,
    el("span", { class: "note", role: "status" }, note),
  );
}
