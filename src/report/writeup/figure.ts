import type { Comparison, ContrastResult } from "../../engine/comparison";
import type { Plan } from "../../engine/plan";
import { count, decimalsFor, fixed, pValue } from "../digits";
import { escapeMarkdown } from "../escape";
import { shiftRows } from "../rows";
import { noSingle, decimalsOf, voiceOf } from "../wording/difference";
import { plainName } from "../wording/readout";
import { NO_NUMBER } from "../wording/writeup";
import type { ValueMarker } from "./marker";

/** Why an inline number cannot be looked up; report/wording/writeup says it. */
export type ValueFault =
  | { readonly code: "no-set"; readonly set: readonly string[] }
  | { readonly code: "no-contrast"; readonly contrast: string; readonly contrasts: readonly string[] }
  | { readonly code: "several-contrasts"; readonly contrasts: readonly string[] }
  | { readonly code: "base-shift" };

/** An inline number now. `refused`: why there is none, where the text says so instead of a number. `text` is Markdown. */
export type FigureNow =
  | { readonly ok: true; readonly text: string; readonly refused: string | null }
  | { readonly ok: false; readonly fault: ValueFault };

/** The figure a marker asks for. Where the set varies there is none, and the text says so. */
export function figureNow(comparison: Comparison, plan: Plan, marker: ValueMarker): FigureNow {
  const set = setOf(comparison, marker.set);
  if (set < 0) return { ok: false, fault: { code: "no-set", set: marker.set! } };
  const contrasts = comparison.sets[set].contrasts;
  const index = contrastOf(contrasts, marker.contrast);
  if (index < 0) {
    const names = contrasts.map((each) => each.level ?? each.contrast);
    if (marker.contrast === null) return { ok: false, fault: { code: "several-contrasts", contrasts: names } };
    return { ok: false, fault: { code: "no-contrast", contrast: marker.contrast, contrasts: names } };
  }
  if (marker.of === "rows") return { ok: true, text: count(comparison.rows.common), refused: null };
  if (marker.of === "shift" && set === 0) return { ok: false, fault: { code: "base-shift" } };
  const { readout } = contrasts[index];
  const refuse = (text: string): FigureNow => ({
    ok: true,
    text: escapeMarkdown(text),
    refused: shiftRows(comparison, plan, index, [set], false)[0].difference,
  });
  if (readout.kind === "varies") return refuse(noSingle(comparison.question));
  if (readout.kind === "none") return refuse(NO_NUMBER);
  const number = numberOf(comparison, plan, contrasts[index], readout, marker);
  if (number === null) {
    // the shift of a set whose base has no single number, or what has no standard error
    const base = comparison.sets[0].contrasts[index].readout.kind;
    const open = marker.of === "shift" && (readout.kind === "plain" || base === "varies" || base === "plain");
    const text = open ? noSingle(comparison.question) : NO_NUMBER;
    return { ok: true, text: escapeMarkdown(text), refused: text };
  }
  const only = readout.kind === "plain" ? `, ${plainName(comparison)} only` : "";
  return { ok: true, text: escapeMarkdown(number + only), refused: null };
}

type Numbered = Exclude<ContrastResult["readout"], { readonly kind: "varies" | "none" }>;

function numberOf(
  comparison: Comparison,
  plan: Plan,
  contrast: ContrastResult,
  readout: Numbered,
  { of, digits }: ValueMarker,
): string | null {
  const voice = voiceOf(comparison, plan, contrast);
  const { scale } = voice;
  if (of === "p") return readout.p === null ? null : pValue(readout.p).replace(/^p (= )?/, "");
  if (of === "shift") {
    const shift = readout.kind === "plain" ? null : readout.shift;
    if (!shift) return null;
    const own = decimalsFor([scale.showError(shift.standardError, shift.estimate)], Math.abs(scale.show(shift.estimate)));
    return fixed(scale.show(shift.estimate), digits ?? own);
  }
  const value = of === "low" ? readout.interval?.[0] : of === "high" ? readout.interval?.[1] : readout.estimate;
  return value === undefined ? null : fixed(scale.show(value), digits ?? decimalsOf(voice, readout));
}

/** The set that holds exactly these columns fixed, beside the ones always held; the reported set for null; −1 where there is none. */
function setOf({ sets, reported, question }: Comparison, columns: readonly string[] | null): number {
  if (columns === null) return reported;
  const wanted = new Set([...question.always, ...columns]);
  return sets.findIndex(
    ({ adjustedFor }) => adjustedFor.length === wanted.size && adjustedFor.every((column) => wanted.has(column)),
  );
}

function contrastOf(contrasts: readonly ContrastResult[], name: string | null): number {
  if (name === null) return contrasts.length === 1 ? 0 : -1;
  return contrasts.findIndex((each) => each.level === name || each.contrast === name);
}
