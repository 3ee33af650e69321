import { el } from "../dom";
import { redraw } from "../redraw";
import type { View } from "../view";
import { head, isOld } from "./head";

/** The finding in sentences, as the host says them. */
export function drawReadout(part: HTMLElement, { state }: View): void {
  const { presentation, checking, status } = state;
  part.hidden = !presentation?.readout.length;
  const old = isOld(status.kind);
  redraw(part, [presentation?.readout, checking, old], () =>
    presentation
      ? [
          head("readout", "Readout"),
          el(
            "div",
            { class: old ? "body old" : "body" },
            ...presentation.readout.map(({ text, tone }) => el("p", { class: `sentence ${tone}` }, text)),
            checking && el("p", { class: "sentence muted" }, "Errors and slopes are still being checked…"),
          ),
        ]
      : [],
  );
}
