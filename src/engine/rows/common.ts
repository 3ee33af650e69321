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
  readonly count: RowCount;
  readonly findings: readonly Finding[];
}

/**
 * Rows complete in outcome, exposure, weights, cluster, every covariate of every set and every modifier (METHODS 1); each lost row is counted
 * under every column it is missing in. Rows of weight 0 are lost to the weights column. `keep` is applied first, under its own columns.
 */
export function findRows(table: Table, plan: Plan, resolved: Resolved): Rows {
  const n = table.rows;
  const lost = new Map<string, number>();
  const usable = new Uint8Array(n).fill(1);
  const kept = new Uint8Array(n).fill(1);
  // A column may stand in several places (kept by and held fixed, say); a row is lost to it once.
  const losses = new Map<string, ((i: number) => boolean)[]>();
  const lose = (column: string, gone: (i: number) => boolean) => losses.set(column, [...(losses.get(column) ?? []), gone]);
  for (const rule of plan.keep ?? []) {
    const out = fails(table, rule);
    lose(rule.column, out);
    for (let i = 0; i < n; i++) if (out(i)) kept[i] = 0;
  }
  const { outcome, exposure, weights, cluster, sources } = resolved;
  const needed: [string, (i: number) => boolean][] = [
    [resolved.question.outcome, (i) => Number.isNaN(outcome[i])],
    [exposure.column, exposure.kind === "amount" ? (i) => Number.isNaN(exposure.values[i]) : (i) => exposure.groups.codes[i] < 0],
  ];
  if (weights) needed.push([resolved.question.weights!, (i) => !(weights[i] > 0)]);
  if (cluster) needed.push([resolved.question.cluster!, (i) => cluster.codes[i] < 0]);
  for (const [column, gone] of needed) lose(column, gone);
  for (const [column, source] of sources) lose(column, missingIn(source));
  for (const [column, tests] of losses) {
    let count = 0;
    for (let i = 0; i < n; i++) {
      if (!tests.some((gone) => gone(i))) continue;
      usable[i] = 0;
      count++;
    }
    if (count > 0) lost.set(column, count);
  }
  const common = indexes(n, (i) => usable[i] === 1);
  const own = (set: number): Int32Array => {
    // No modifier or covariate beyond the set's own has cost a row: the common rows are the set's own.
    const others = [...sources.keys()].filter((column) => !resolved.sets[set].includes(column));
    if (others.every((column) => !lost.has(column))) return common;
    const tests = [...needed.map(([, gone]) => gone), ...resolved.sets[set].map((column) => missingIn(sources.get(column)!))];
    return indexes(n, (i) => kept[i] === 1 && tests.every((gone) => !gone(i)));
  };
  const droppedBy = [...lost].map(([column, rows]) => ({ column, rows }));
  const keptRows = kept.reduce((sum, k) => sum + k, 0);
  const findings: Finding[] = plan.keep?.length
    ? [{ code: "kept-rows", rows: keptRows, columns: [...new Set(plan.keep.map((k) => k.column))] }]
    : [];
  return { common, own, count: { read: n, common: common.length, droppedBy }, findings };
}

export function missingIn(source: Source): (i: number) => boolean {
  if (source.kind === "category") return (i) => source.groups.codes[i] < 0;
  return (i) => Number.isNaN(source.values[i]);
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
