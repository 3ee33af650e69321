import { el } from "../dom";
import { redraw } from "../redraw";
import { ago, clock } from "../time";
import type { View } from "../view";

/** The small line under the question: file, rows, errors, and how fresh the result is. */
export function drawFacts(part: HTMLElement, { state }: View): void {
  const { presentation, reading, status, file } = state;
  const given = presentation?.facts ?? [file];
  redraw(part, [given, reading, status.kind], () => {
    const items = given.map((text) => el("span", { class: "fact" }, text));
    if (reading) {
      const at = el("time", { datetime: reading.at }, `reading ${reading.number}, ${clock(reading.at)}`);
      const age = el("span", { class: "age", "data-at": status.kind === "updating" ? null : reading.at });
      age.textContent = status.kind === "updating" ? "updating…" : ago(reading.at, Date.now());
      items.push(el("span", { class: "fact" }, at, ", ", age));
    }
    return items;
  });
}

/** Lets the age of the reading move on, silently. */
export function tickAge(part: HTMLElement, now: number): void {
  const age = part.querySelector<HTMLElement>("[data-at]");
  const text = age?.dataset["at"] === undefined ? null : ago(age.dataset["at"], now);
  if (age && text !== null && age.textContent !== text) age.textContent = text;
}
