import type { Comparison, ContrastResult } from "../engine/comparison";
import type { Plan } from "../engine/plan";
import { count, decimalsFor, fixed } from "./digits";
import { columnName, heldName, listed, rowsName } from "./names";
import type { Line, ShiftRow } from "./presentation";
import { scaleOf } from "./scale";
import type { Scale } from "./scale";
import { noSingle } from "./wording/difference";
import { plainName } from "./wording/readout";
import { sayReason } from "./wording/reason";

/** Stands in a cell that has nothing to say. */
export const DASH = "–";

/** Decimals of the two number columns of one contrast's table. */
interface Columns {
  readonly difference: number;
  readonly shift: number;
}

/** One contrast's rows for the given sets, their numbers alike in digits. */
export function shiftRows(
  comparison: Comparison,
  plan: Plan,
  contrast: number,
  sets: readonly number[],
  checking: boolean,
): ShiftRow[] {
  const scale = scaleOf(comparison.question, plan);
  const columns = columnsOf(comparison, scale, contrast, sets);
  return sets.map((set) => shiftRow(comparison, plan, scale, columns, contrast, set, checking));
}

function columnsOf({ sets }: Comparison, scale: Scale, contrast: number, which: readonly number[]): Columns {
  const estimates: { value: number; error: number | null }[] = [];
  const shifts: { value: number; error: number | null }[] = [];
  for (const index of which) {
    const { readout } = sets[index].contrasts[contrast];
    if (readout.kind === "varies" || readout.kind === "none") continue;
    estimates.push({ value: scale.show(readout.estimate), error: scale.showError(readout.standardError, readout.estimate) });
    if (readout.kind !== "plain" && readout.shift) {
      shifts.push({
        value: scale.show(readout.shift.estimate),
        error: scale.showError(readout.shift.standardError, readout.shift.estimate),
      });
    }
  }
  const place = (list: typeof estimates) =>
    decimalsFor(
      list.map((x) => x.error),
      Math.max(0, ...list.map((x) => Math.abs(x.value))),
    );
  return { difference: place(estimates), shift: place(shifts) };
}

function shiftRow(
  comparison: Comparison,
  plan: Plan,
  scale: Scale,
  columns: Columns,
  contrast: number,
  index: number,
  checking: boolean,
): ShiftRow {
  const set = comparison.sets[index];
  const own = set.contrasts[contrast];
  const { readout } = own;
  const held = heldName(set.adjustedFor, plan);
  const difference = differenceText(comparison, plan, scale, columns.difference, own);
  const shift = shiftText(scale, columns.shift, own);
  const word = wordOf(own, checking);
  const rows = count(comparison.rows.common);
  return {
    set: index,
    held,
    adjustedFor: set.adjustedFor,
    rows,
    kind: readout.kind,
    difference,
    line: lineOf(scale, own),
    shift,
    word,
    base: index === 0,
    reported: index === comparison.reported,
    place: null,
    aloud: aloud(plan, held, rows, difference, shift, word),
  };
}

/** "+340 (290, 390)", "no single difference: slopes differ in floor_m2", or the reason there is none. */
function differenceText(comparison: Comparison, plan: Plan, scale: Scale, decimals: number, { readout }: ContrastResult): string {
  switch (readout.kind) {
    case "none":
      return `none: ${sayReason(readout.reason, plan)}`;
    case "varies":
      return `${noSingle(comparison.question)}: slopes differ in ${listed(readout.modifiers.map((m) => columnName(m, plan)))}`;
    case "plain":
    case "single":
    case "undecided": {
      const text = fixed(scale.show(readout.estimate), decimals, true);
      const interval = readout.interval ? ` (${readout.interval.map((v) => fixed(scale.show(v), decimals)).join(", ")})` : "";
      return readout.kind === "plain" ? `${text}${interval}, ${plainName(comparison)} only` : `${text}${interval}`;
    }
  }
}

function shiftText(scale: Scale, decimals: number, { readout }: ContrastResult): string {
  if ((readout.kind !== "single" && readout.kind !== "undecided") || !readout.shift) return DASH;
  const { estimate, interval } = readout.shift;
  const range = interval ? ` (${interval.map((v) => fixed(scale.show(v), decimals)).join(", ")})` : "";
  return `${fixed(scale.show(estimate), decimals, true)}${range}`;
}

function wordOf({ readout }: ContrastResult, checking: boolean): string {
  if (readout.kind === "varies" || readout.kind === "none" || readout.kind === "plain") return DASH;
  if (checking) return "checking";
  return readout.change ?? DASH;
}

/** What is drawn, on the printed scale. Where slopes differ: from the smallest to the largest of the reported differences, without a point. */
export function lineOf(scale: Scale, { readout }: ContrastResult): Line | null {
  switch (readout.kind) {
    case "none":
      return null;
    case "varies": {
      const values = readout.profiles.map((p) => scale.show(p.estimate));
      return values.length === 0 ? null : { kind: "span", low: Math.min(...values), high: Math.max(...values) };
    }
    case "plain":
    case "single":
    case "undecided": {
      const mid = scale.show(readout.estimate);
      if (!readout.interval) return { kind: "point", mid };
      return { kind: "interval", low: scale.show(readout.interval[0]), mid, high: scale.show(readout.interval[1]) };
    }
  }
}

function aloud(plan: Plan, held: string, rows: string, difference: string, shift: string, word: string): string {
  const moved = shift === DASH ? "" : `, shift ${shift}`;
  const said = word === DASH ? "" : `, ${word}`;
  return `Held fixed: ${held}; ${rows} ${rowsName(plan)}; ${difference}${moved}${said}.`;
}
