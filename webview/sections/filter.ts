import { button, el } from "../dom";
import type { View } from "../view";

/** Which rows of a long list to show: for each column held, not held, or either. */
export function filterOf(columns: readonly string[], { state, post, isOpen, setOpen }: View): HTMLElement {
  const holds = new Set(state.filter?.holds);
  const omits = new Set(state.filter?.omits);
  const send = () =>
    post({ type: "filter", filter: holds.size + omits.size > 0 ? { holds: [...holds], omits: [...omits] } : null });
  const clear = () => {
    holds.clear();
    omits.clear();
    send();
  };
  const fields = columns.map((column) => {
    const list = el("select", { "data-focus": `filter ${column}`, "data-filter": column });
    list.append(
      el("option", { value: "either" }, "either way"),
      el("option", { value: "holds" }, "held fixed"),
      el("option", { value: "omits" }, "not held"),
    );
    list.value = holds.has(column) ? "holds" : omits.has(column) ? "omits" : "either";
    list.addEventListener("change", () => {
      holds.delete(column);
      omits.delete(column);
      if (list.value === "holds") holds.add(column);
      if (list.value === "omits") omits.add(column);
      send();
    });
    return el("label", { class: "filter-field" }, el("span", { class: "name", title: column }, column), list);
  });
  const fold = el("details", { class: "filter", open: isOpen("filter") || state.filter !== null });
  fold.addEventListener("toggle", () => setOpen("filter", fold.open));
  const count = holds.size + omits.size;
  fold.append(
    el(
      "summary",
      { "data-focus": "filter" },
      count > 0 ? `Rows of the sets chosen by ${count} ${count === 1 ? "column" : "columns"}` : "Show the rows of more sets",
    ),
    el("div", { class: "filter-fields" }, ...fields),
    ...(count > 0 ? [button("Show the main rows only", "filter-clear", clear, { class: "link" })] : []),
  );
  return fold;
}
