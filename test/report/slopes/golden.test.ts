import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import type { Plot, SlopesSection } from "../../../src/report/slopes/presentation";
import { CASES, sectionOf } from "./cases";

/** Everything of a section that is read, in lines. */
function said({ sets, modifiers, modifier, contrasts, sentences, plots }: SlopesSection): string {
  const list = modifiers.map(({ name, label, word }) => `${name === modifier ? "› " : ""}${label}: ${word}`);
  const lines = [sets.map((set) => set.label).join(" | "), contrasts.join(" | "), ...list, "", ...sentences];
  return [...lines, ...plots.flatMap(plotLines)].join("\n");
}

function plotLines({ kind, title, summary, x, y, groups, marks, intervals, points, stops, twin }: Plot): string[] {
  const axis = ({ label, ticks, log }: Plot["x"]) =>
    `${label}${log ? ", logarithmic" : ""}: ${ticks.map((tick) => tick.text).join(" ")}`;
  return [
    "",
    `[${kind}] ${title}`,
    summary,
    `${axis(x)} / ${axis(y)}`,
    ...(groups.length > 0 ? [`groups: ${groups.join(", ")}`] : []),
    ...marks.map((mark) => `mark: ${mark.label}${mark.stretch ? " with its stretch" : ""}`),
    ...points.flatMap(({ note }) => (note === null ? [] : [note])),
    ...intervals.map(({ name }) => `dot: ${name}`),
    ...[stops[0], stops[Math.floor(stops.length / 2)]].map((stop) => `stop: ${stop.text}`),
    ...[twin.head, ...twin.rows].map((row) => row.join(" | ")),
  ];
}

/** The texts were read aloud before they were stored; their figures are checked against R in test/engine/figure. A missing one fails. */
describe("the text of each figure is the reviewed one", () => {
  const file = new URL("./golden.txt", import.meta.url).pathname;
  const stored = new Map(
    readFileSync(file, "utf8")
      .split("\n=== ")
      .map((part) => [part.slice(0, part.indexOf("\n")).replace(/^=== /, ""), part.slice(part.indexOf("\n") + 1)]),
  );
  it("none is stored that is not drawn", () => expect([...stored.keys()].sort()).toEqual(Object.keys(CASES).sort()));
  for (const [name, wanted] of Object.entries(CASES)) {
    it(name, () => expect(said(sectionOf(wanted)).trimEnd()).toBe(stored.get(name)?.trimEnd()));
  }
});
