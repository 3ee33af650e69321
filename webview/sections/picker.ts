import type { ColumnInfo } from "../../src/protocol";
import { button, el } from "../dom";

interface Picker {
  readonly button: HTMLElement[];
  readonly list: HTMLElement;
}

/** A list of columns that narrows while one types; a column that cannot be held fixed stays in it with the reason. */
export function picker(
  columns: readonly ColumnInfo[],
  reasonOf: (column: ColumnInfo) => string | null,
  choose: (column: string) => void,
): Picker {
  const offered = columns.filter((column) => reasonOf(column) !== "held");
  const opener = button("+ hold another", "add", () => (box.hidden ? open() : close()), {
    class: "add",
    "aria-expanded": "false",
    "aria-haspopup": "listbox",
  });
  const input = el("input", {
    type: "text",
    role: "combobox",
    placeholder: "Type to find a column",
    "aria-label": "Column to hold fixed",
    "aria-expanded": "true",
    "aria-controls": "columns",
    "aria-autocomplete": "list",
    autocomplete: "off",
    spellcheck: "false",
  });
  const list = el("ul", { role: "listbox", id: "columns", "aria-label": "Columns" });
  const none = el("p", { class: "quiet", hidden: true }, "No such column.");
  const box = el("div", { class: "picker", hidden: true }, input, list, none);
  let at = 0;

  const options = () => [...list.querySelectorAll<HTMLElement>("[role=option]")];
  const mark = (index: number) => {
    const all = options();
    at = Math.min(Math.max(index, 0), all.length - 1);
    all.forEach((option, i) => option.setAttribute("aria-selected", String(i === at)));
    all[at]?.scrollIntoView({ block: "nearest" });
    if (all[at]) input.setAttribute("aria-activedescendant", all[at].id);
    else input.removeAttribute("aria-activedescendant");
  };
  const fill = () => {
    const wanted = input.value.trim().toLowerCase();
    const found = offered.filter(({ name }) => name.toLowerCase().includes(wanted));
    list.replaceChildren(
      ...found.map((column, i) => {
        const reason = reasonOf(column);
        const option = el(
          "li",
          {
            role: "option",
            id: `column-${i}`,
            "aria-disabled": reason !== null && "true",
            "aria-selected": "false",
            title: column.name,
          },
          el("span", { class: "name" }, column.name),
          el("span", { class: "why" }, reason ?? column.kind),
        );
        option.addEventListener("mousedown", (event) => event.preventDefault());
        option.addEventListener("click", () => take(column));
        return option;
      }),
    );
    none.hidden = found.length > 0;
    list.hidden = found.length === 0;
    mark(
      Math.max(
        0,
        found.findIndex((column) => reasonOf(column) === null),
      ),
    );
    return found;
  };
  const take = (column: ColumnInfo | undefined) => {
    if (!column || reasonOf(column) !== null) return;
    close();
    choose(column.name);
  };
  let found = offered;
  const open = () => {
    box.hidden = false;
    opener.setAttribute("aria-expanded", "true");
    input.value = "";
    found = fill();
    input.focus();
  };
  const close = (back = true) => {
    if (box.hidden) return;
    if (back) opener.focus({ preventScroll: true });
    box.hidden = true;
    opener.setAttribute("aria-expanded", "false");
  };
  input.addEventListener("input", () => (found = fill()));
  input.addEventListener("blur", () => close(false));
  opener.addEventListener("mousedown", (event) => {
    if (!box.hidden) event.preventDefault();
  });
  input.addEventListener("keydown", (event) => {
    if (event.isComposing) return;
    if (event.key === "ArrowDown") mark(at + 1);
    else if (event.key === "ArrowUp") mark(at - 1);
    else if (event.key === "Enter") take(found[at]);
    else if (event.key === "Escape") close();
    else return;
    event.preventDefault();
    event.stopPropagation();
  });
  return { button: [opener], list: box };
}
