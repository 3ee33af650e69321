import { el } from "../dom";

export type Choice = { readonly value: string; readonly text: string; readonly disabled: boolean };

/** A native list: type-ahead, arrow keys and long lists are the browser's own. */
export function select(
  role: string,
  label: string,
  choices: readonly Choice[],
  chosen: string,
  choose: (value: string) => void,
): HTMLElement {
  const list = el("select", { "data-role": role, "data-focus": role, "aria-label": label });
  if (!choices.some(({ value }) => value === chosen))
    list.append(el("option", { value: chosen, disabled: true }, chosen || "choose"));
  for (const { value, text, disabled } of choices) {
    const here = value === chosen;
    list.append(el("option", { value, disabled: disabled && !here }, here && disabled ? value : text));
  }
  list.value = chosen;
  // a long text is cut off in the closed list
  list.title = list.selectedOptions[0]?.textContent ?? chosen;
  list.addEventListener("change", () => choose(list.value));
  return list;
}
