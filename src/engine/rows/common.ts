import type { RowCount } from "../comparison";
import type { Finding } from "../findings";
import type { Keep, Plan } from "../plan";
import { asGroups, findColumn, isAmount } from "../question/columns";
import type { Resolved, Source } from "../question/resolve";
import type { Table } from "../table";

/** Which rows take part. Indexes are table rows, ascending. */
export interface Rows {
  /** Rows of every fit. */
  readonly common: Int32Array;
  /** For each set, the rows complete for that set alone (and kept, with weight above 0). */
  readonly own: (set: number) => Int32Array;
  /** How many these are, without listing them. */
  readonly ownCount: (set: number) => number;
  readonly count: RowCount;
  readonly findings: readonly Finding[];
}

/** Sets 1 for each row that a condition costs; one entry a table row. */
type Condition = (lost: Uint8Array) => void;

/**
 * Rows complete in outcome, exposure, weights, cluster, every covariate of every set and every modifier (METHODS 1); each lost row is counted
 * under every column it is missing in. Rows of weight 0 are lost to the weights column. `keep` is applied first, under its own columns.
 */
export function findRows(table: Table, plan: Plan, resolved: Resolved): Rows {
  const n = table.rows;
  const losses = new Losses(n);
  const kept = new Uint8Array(n).fill(1);
  for (const rule of plan.keep ?? []) {
    const out = fails(table, rule);
    losses.add(rule.column, (lost) => {
      for (let i = 0; i < n; i++) {
        if (!out(i)) continue;
        lost[i] = 1;
        kept[i] = 0;
      }
    });
  }
  for (const [column, condition] of neededOf(resolved)) losses.add(column, condition);
  const whole = losses.rows();
  const { sources } = resolved;
  for (const [column, source] of sources) losses.add(column, missingIn(source));
  const complete = losses.rows();
  const common = indexes(n, (i) => complete[i] === 0);
  const { pattern, patterns } = patternsOf(n, whole, sources);
  const takes = (set: number) => patterns.map(({ missing }) => resolved.sets[set].every((column) => !missing.has(column)));
  const own = (set: number): Int32Array => {
    const taken = takes(set);
    // no modifier or covariate beyond the set's own has cost a row: the common rows are the set's own
    if (ownCount(set) === common.length) return common;
    return indexes(n, (i) => pattern[i] >= 0 && taken[pattern[i]]);
  };
  const ownCount = (set: number): number => {
    const taken = takes(set);
    return patterns.reduce((sum, { rows }, i) => sum + (taken[i] ? rows : 0), 0);
  };
  const findings: Finding[] = plan.keep?.length
    ? [{ code: "kept-rows", rows: kept.reduce((sum, k) => sum + k, 0), columns: [...new Set(plan.keep.map((k) => k.column))] }]
    : [];
  return { common, own, ownCount, count: { read: n, common: common.length, droppedBy: losses.byColumn() }, findings };
}

/** Rows lost, under each column once, however many places name it. */
class Losses {
  private readonly lost = new Map<string, Uint8Array>();

  constructor(private readonly n: number) {}

  add(column: string, condition: Condition): void {
    let lost = this.lost.get(column);
    if (!lost) this.lost.set(column, (lost = new Uint8Array(this.n)));
    condition(lost);
  }

  /** 1 for each row lost to any column so far. */
  rows(): Uint8Array {
    const all = new Uint8Array(this.n);
    for (const lost of this.lost.values()) if (lost.includes(1)) for (let i = 0; i < all.length; i++) all[i] |= lost[i];
    return all;
  }

  byColumn(): RowCount["droppedBy"] {
    return [...this.lost].flatMap(([column, lost]) => {
      if (!lost.includes(1)) return [];
      let rows = 0;
      for (let i = 0; i < lost.length; i++) rows += lost[i];
      return [{ column, rows }];
    });
  }
}

/** What every set needs, by column. */
function neededOf({ question, outcome, exposure, weights, cluster }: Resolved): [string, Condition][] {
  const needed: [string, Condition][] = [
    [question.outcome, notANumber(outcome)],
    [exposure.column, exposure.kind === "amount" ? notANumber(exposure.values) : noLevel(exposure.groups.codes)],
  ];
  if (weights) {
    needed.push([
      question.weights!,
      (lost) => {
        for (let i = 0; i < lost.length; i++) if (!(weights[i] > 0)) lost[i] = 1;
      },
    ]);
  }
  if (cluster) needed.push([question.cluster!, noLevel(cluster.codes)]);
  return needed;
}

function missingIn(source: Source): Condition {
  return source.kind === "category" ? noLevel(source.groups.codes) : notANumber(source.values);
}

function notANumber(values: Float64Array): Condition {
  return (lost) => {
    for (let i = 0; i < lost.length; i++) if (values[i] !== values[i]) lost[i] = 1;
  };
}

function noLevel(codes: Int32Array): Condition {
  return (lost) => {
    for (let i = 0; i < lost.length; i++) if (codes[i] < 0) lost[i] = 1;
  };
}

/**
 * Rows put together by which covariates and modifiers they miss: there are few such patterns, so that a set's own rows are counted without
 * looking at the rows again.
 * @param lost 1 for rows that no set can use; their pattern is −1
 */
function patternsOf(
  n: number,
  lost: Uint8Array,
  sources: Resolved["sources"],
): { pattern: Int32Array; patterns: { missing: Set<string>; rows: number }[] } {
  const pattern = new Int32Array(n);
  for (let i = 0; i < n; i++) pattern[i] = -lost[i];
  const patterns = [{ missing: new Set<string>(), rows: 0 }];
  const mark = new Uint8Array(n);
  for (const [column, source] of sources) {
    missingIn(source)(mark.fill(0));
    if (!mark.includes(1)) continue;
    const split = new Map<number, number>();
    for (let i = 0; i < n; i++) {
      if (mark[i] === 0 || pattern[i] < 0) continue;
      let to = split.get(pattern[i]);
      if (to === undefined) {
        to = patterns.push({ missing: new Set([...patterns[pattern[i]].missing, column]), rows: 0 }) - 1;
        split.set(pattern[i], to);
      }
      pattern[i] = to;
    }
  }
  const counts = new Float64Array(patterns.length);
  for (let i = 0; i < n; i++) if (pattern[i] >= 0) counts[pattern[i]]++;
  patterns.forEach((each, i) => (each.rows = counts[i]));
  return { pattern, patterns };
}

/** Whether a row fails one condition of `keep`; a missing cell fails it. */
function fails(table: Table, rule: Keep): (i: number) => boolean {
  const column = findColumn(table, rule.column)!;
  if ("not" in rule || "only" in rule) {
    const { levels, codes } = asGroups(column);
    const named = new Set(("not" in rule ? rule.not : rule.only).map(String));
    const pass = levels.map((level) => named.has(level) === "only" in rule);
    return (i) => codes[i] < 0 || !pass[codes[i]];
  }
  const bound = (value: number | string | undefined) =>
    value === undefined ? null : typeof value === "number" ? value : Date.parse(`${value}T00:00:00Z`) / 86_400_000;
  const from = bound(rule.from);
  const to = bound(rule.to);
  if (!isAmount(column)) return () => false;
  return (i) =>
    Number.isNaN(column.values[i]) || (from !== null && column.values[i] < from) || (to !== null && column.values[i] > to);
}

function indexes(n: number, take: (i: number) => boolean): Int32Array {
  const found = new Int32Array(n);
  let count = 0;
  for (let i = 0; i < n; i++) if (take(i)) found[count++] = i;
  return found.slice(0, count);
}
