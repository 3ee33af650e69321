import { button, el } from "../dom";
import { redraw } from "../redraw";
import type { View } from "../view";

/** What stands above the page when it is not simply up to date: a first read, a newer file coming, a file gone or unusable. */
export function drawStatus(part: HTMLElement, { state, post }: View): void {
  const { status, presentation, file } = state;
  redraw(part, [status, presentation === null, file], () => {
    switch (status.kind) {
      case "ready":
        return presentation ? [] : [el("p", { class: "quiet" }, "There is nothing to compare yet.")];
      case "reading":
        return [bar(null, `Reading ${file}`), el("p", { class: "quiet" }, `Reading ${file}…`)];
      case "updating":
        return [bar(status.share, `Reading ${file} again`)];
      case "missing":
      case "unusable": {
        const line = status.kind === "unusable" ? status.line : null;
        const inPlan = status.kind === "unusable" && status.inPlan;
        const open = () => line !== null && post(inPlan ? { type: "openLine", line, inPlan } : { type: "openLine", line });
        const place = inPlan ? `Open the plan at line ${line}` : `Open line ${line}`;
        return [
          el(
            "div",
            { class: "trouble" },
            el("p", {}, status.text),
            presentation && el("p", { class: "quiet" }, "What is shown below is the last result before this."),
            el(
              "p",
              { class: "actions" },
              line !== null && button(place, "status-line", open),
              button("Read Again", "status-again", () => post({ type: "readAgain" })),
            ),
          ),
        ];
      }
    }
  });
}

/** A thin bar at the top edge; without a share it only moves. */
function bar(share: number | null, name: string): HTMLElement {
  const fill = el("div", { class: share === null ? "fill moving" : "fill" });
  if (share !== null) fill.style.width = `${Math.round(Math.min(1, Math.max(0, share)) * 100)}%`;
  const now = share === null ? null : Math.round(share * 100);
  const range = { "aria-valuemin": 0, "aria-valuemax": 100, "aria-valuenow": now };
  return el("div", { class: "bar", role: "progressbar", "aria-label": name, ...range }, fill);
}
