import type { Plot } from "../../src/protocol";
import { el } from "../dom";

/** What a plot shows, as a table: the first column names the row. */
export function twinOf({ title, twin }: Plot): HTMLElement {
  const cell = (text: string, i: number) => (i === 0 ? el("th", { scope: "row" }, text) : el("td", {}, text));
  return el(
    "table",
    { "aria-label": title },
    el("thead", {}, el("tr", {}, ...twin.head.map((text) => el("th", { scope: "col" }, text)))),
    el("tbody", {}, ...twin.rows.map((row) => el("tr", {}, ...row.map(cell)))),
  );
}
