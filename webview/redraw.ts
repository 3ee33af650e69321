const drawn = new WeakMap<Element, string>();
let replacing = false;

/** True while old controls leave the page; what they report then is not a person's choice. */
export function isReplacing(): boolean {
  return replacing;
}

/**
 * Draws a part of the page anew, only if what it shows has changed. The focus stays on the control of the same name (`data-focus`),
 * with what was being typed in it; where that control is gone it goes to the one named by `data-focus-next` of the part.
 */
export function redraw(part: HTMLElement, shown: unknown, build: () => readonly (Node | null)[]): boolean {
  const key = JSON.stringify(shown);
  if (drawn.get(part) === key) return false;
  drawn.set(part, key);
  const active = document.activeElement;
  const kept = active instanceof HTMLElement && part.contains(active) ? active : null;
  const name = kept?.dataset["focus"];
  const typed = kept instanceof HTMLInputElement && kept.value !== kept.defaultValue ? kept.value : null;
  replacing = true;
  part.replaceChildren(...build().filter((node) => node !== null));
  replacing = false;
  if (name !== undefined) {
    const same = named(part, name) ?? named(part, part.dataset["focusNext"] ?? "");
    if (same instanceof HTMLInputElement && typed !== null) same.value = typed;
    same?.focus({ preventScroll: true });
  }
  return true;
}

function named(part: Element, name: string): HTMLElement | null {
  return part.querySelector<HTMLElement>(`[data-focus="${CSS.escape(name)}"]`);
}
