import { el } from "../dom";

/** A section's heading; its id names the section for a screen reader. */
export function head(name: string, text: string): HTMLElement {
  return el("h2", { id: `head-${name}` }, text);
}

/** True while what is on screen comes from an earlier state of the file or question. */
export function isOld(kind: string): boolean {
  return kind === "missing" || kind === "unusable";
}
