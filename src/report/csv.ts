import type { Comparison } from "../engine/comparison";
import type { Plan } from "../engine/plan";
import { escapeFormula } from "./escape";
import { sayReason } from "./wording/reason";

const HEAD = [
  "adjusted_for",
  "contrast",
  "readout",
  "rows",
  "estimate",
  "standard_error",
  "df",
  "low",
  "high",
  "p",
  "shift",
  "shift_standard_error",
  "shift_low",
  "shift_high",
  "change",
  "slopes_differ_in",
  "reason",
];

/** One row a set and contrast, numbers in full precision; where there is no single number the cells are empty. */
export function toCsv(comparison: Comparison, plan: Plan): string {
  const rows = comparison.sets.flatMap((set) =>
    set.contrasts.map(({ contrast, readout }) => {
      const has = readout.kind === "single" || readout.kind === "undecided" || readout.kind === "plain" ? readout : null;
      const shift = readout.kind === "single" || readout.kind === "undecided" ? readout.shift : null;
      return [
        set.adjustedFor.join(" + "),
        contrast,
        readout.kind,
        comparison.rows.common,
        has?.estimate,
        has?.standardError,
        has?.df,
        has?.interval?.[0],
        has?.interval?.[1],
        has?.p,
        shift?.estimate,
        shift?.standardError,
        shift?.interval?.[0],
        shift?.interval?.[1],
        readout.kind === "single" || readout.kind === "undecided" ? readout.change : null,
        readout.kind === "varies" || readout.kind === "plain" ? readout.modifiers.join(" + ") : null,
        readout.kind === "none" ? sayReason(readout.reason, plan) : null,
      ];
    }),
  );
  return [HEAD, ...rows].map((row) => row.map(cell).join(",")).join("\n") + "\n";
}

function cell(value: string | number | null | undefined): string {
  if (value === null || value === undefined) return "";
  if (typeof value === "number") return String(value);
  const text = escapeFormula(value);
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
