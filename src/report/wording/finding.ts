import type { Comparison } from "../../engine/comparison";
import type { Finding } from "../../engine/findings";
import type { Plan } from "../../engine/plan";
import { count } from "../digits";
import { columnName, listed, rowsName, word } from "../names";

/** Lines named in a sentence; the rest are counted. */
const LINES = 5;

/** One sentence for what the data or a fit brought to light. */
export function sayFinding(finding: Finding, { sets }: Pick<Comparison, "sets">, plan: Plan): string {
  const name = (column: string) => columnName(column, plan);
  const names = (columns: readonly string[]) => listed(columns.map(name));
  const set = (index: number) =>
    sets[index]?.adjustedFor.length ? `With ${names(sets[index].adjustedFor)} held fixed` : "With nothing held fixed";
  switch (finding.code) {
    case "duplicate-header":
      return `The header ${word(finding.original)} occurs again; that column is called ${word(finding.column)}.`;
    case "empty-header":
      return `A column without a header is called ${word(finding.column)}.`;
    case "unreadable-cells":
      return `${cells(finding.lines)} of ${name(finding.column)} ${finding.lines.length === 1 ? "is" : "are"} no ${finding.dates ? "date" : "number"} (${finding.examples.map(word).join(", ")}) and ${finding.lines.length === 1 ? "counts" : "count"} as missing: ${lines(finding.lines)}.`;
    case "beyond-double-range":
      return `${cells(finding.lines)} of ${name(finding.column)} ${finding.lines.length === 1 ? "is" : "are"} too large to be read and ${finding.lines.length === 1 ? "counts" : "count"} as missing: ${lines(finding.lines)}.`;
    case "short-rows":
      return `${rows(finding.lines)} ${finding.lines.length === 1 ? "has" : "have"} too few cells; the rest ${finding.lines.length === 1 ? "of it counts" : "of them count"} as missing: ${lines(finding.lines)}.`;
    case "long-rows":
      return `${rows(finding.lines)} ${finding.lines.length === 1 ? "has" : "have"} too many cells and ${finding.lines.length === 1 ? "was" : "were"} set aside: ${lines(finding.lines)}.`;
    case "blank-lines":
      return `${finding.lines.length === 1 ? "A blank line was" : `${count(finding.lines.length)} blank lines were`} passed over: ${lines(finding.lines)}.`;
    case "thousands-marks":
      return `Numbers of ${name(finding.column)} are written with thousands marks and were read so.`;
    case "decimal-comma":
      return "Numbers are written with a decimal comma and were read so.";
    case "two-valued-outcome":
      return `${name(plan.outcome.column)} has two values: differences are differences in the share of ${word(finding.yes)} (against ${word(finding.no)}), fitted as a linear model.`;
    case "count-as-amount":
      return `${name(plan.outcome.column)} is a count: differences are differences in its mean.`;
    case "clusters-ignored":
      return `The errors asked for ignore that ${rowsName(plan)} of the same ${name(finding.cluster)} may be alike.`;
    case "classical-weights":
      return `Classical errors with weights assume that the spread of ${name(plan.outcome.column)} is proportional to 1 over ${name(finding.weights)}.`;
    case "classical-binary":
      return `Classical errors do not hold for a two-valued outcome, whose spread follows its mean: HC3 errors are used.`;
    case "log-not-positive":
      return `${cells(finding.lines)} of ${name(finding.column)} ${finding.lines.length === 1 ? "is" : "are"} 0 or less, where there is no logarithm, and ${finding.lines.length === 1 ? "counts" : "count"} as missing: ${lines(finding.lines)}.`;
    case "no-modifier":
      return "No covariate is named, so whether slopes differ was not tested.";
    case "small-group":
      return `Only ${finding.rows === 1 ? "one complete row has" : `${count(finding.rows)} complete rows have`} ${name(plan.exposure.column)} = ${word(finding.level)}.`;
    case "kept-rows":
      return `The plan keeps ${count(finding.rows)} ${rowsName(plan)} by ${names(finding.columns)}.`;
    case "after-exposure":
      return `${names(finding.columns)} ${finding.columns.length === 1 ? "is" : "are"} marked as coming after the exposure: holding ${finding.columns.length === 1 ? "it" : "them"} fixed can hide part of what is asked, or bring bias in.`;
    case "exact-fit":
      return `${set(finding.set)} the fit is exact: errors are 0 and there is no p value.`;
    case "leverage-one":
      return `${set(finding.set)}, ${rows(finding.lines).toLowerCase()} ${finding.lines.length === 1 ? "is" : "are"} fitted exactly whatever the outcome (${lines(finding.lines)})${finding.fallback ? `; ${finding.fallback} errors are used there` : ""}.`;
    case "standard-error-missing":
      return `${set(finding.set)} there is no standard error: ${missingError(finding.why)}.`;
    case "set-aside":
      if (finding.part) {
        const by = finding.combinationOf.length > 0 ? names(finding.combinationOf) : "the rest of it";
        return `${set(finding.set)}, part of ${name(finding.column)} is left out: ${by} already ${finding.combinationOf.length > 1 ? "determine" : "determines"} it.`;
      }
      return finding.combinationOf.length > 0
        ? `${set(finding.set)}, ${name(finding.column)} is left out: ${names(finding.combinationOf)} already ${finding.combinationOf.length === 1 ? "determines" : "determine"} it.`
        : `${set(finding.set)}, ${name(finding.column)} is left out: it does not vary.`;
    case "base-varies":
      return "Slopes differ in the base set, so there is no single number to measure shifts from.";
    case "no-shared-range":
      return `${set(finding.set)}, the groups share no range of ${name(finding.modifier)}, so its slopes cannot be compared.`;
    case "interaction-not-estimable":
      return `${set(finding.set)}, the data do not allow a test of whether slopes differ in ${name(finding.modifier)}.`;
  }
}

function missingError(why: "no-residual-df" | "one-cluster" | "not-finite"): string {
  switch (why) {
    case "no-residual-df":
      return "there are as many coefficients as rows";
    case "one-cluster":
      return "all rows are in one cluster";
    case "not-finite":
      return "the numbers are too large or too small";
  }
}

function cells(where: readonly number[]): string {
  return where.length === 1 ? "One cell" : `${count(where.length)} cells`;
}

function rows(where: readonly number[]): string {
  return where.length === 1 ? "One row" : `${count(where.length)} rows`;
}

function lines(where: readonly number[]): string {
  const shown = where.slice(0, LINES).map(count);
  const rest = where.length - shown.length;
  if (rest > 0) return `lines ${shown.join(", ")} and ${count(rest)} more`;
  return `${where.length === 1 ? "line" : "lines"} ${listed(shown)}`;
}
