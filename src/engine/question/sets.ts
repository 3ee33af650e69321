import type { Plan } from "../plan";

/** Combinations beyond this many covariates would be more sets than anyone can read. */
export const EVERY_LIMIT = 12;
/** Sets of one comparison. */
export const SETS_LIMIT = 4096;

/**
 * The adjustment sets in plan order, the base set (the always-adjusted columns alone) first, none twice; within a set the always-adjusted
 * columns come first, the rest in plan order.
 */
export function listSets(plan: Plan): string[][] {
  const always = [...(plan.always ?? [])];
  const free = (plan.covariates ?? []).map((c) => c.column).filter((column) => !always.includes(column));
  const order = [...always, ...free];
  const sets = plan.sets ?? "each";
  const wanted: readonly (readonly string[])[] =
    sets === "each"
      ? [...free.map((column) => [column]), free]
      : sets === "steps"
        ? free.map((_, i) => free.slice(0, i + 1))
        : sets === "every"
          ? everyCombination(free)
          : sets;
  const seen = new Set<string>();
  const listed: string[][] = [];
  for (const columns of [[], ...wanted]) {
    const all = new Set([...always, ...columns]);
    const sorted = [...all].sort((a, b) => place(order, a) - place(order, b));
    const key = JSON.stringify(sorted);
    if (seen.has(key)) continue;
    seen.add(key);
    listed.push(sorted);
  }
  return listed;
}

/** Index of the reported set: the plan's, else the widest listed (the first of them). */
export function reportedSet(plan: Plan, sets: readonly (readonly string[])[]): number {
  if (plan.report) {
    const wanted = new Set([...(plan.always ?? []), ...plan.report]);
    const at = sets.findIndex((set) => set.length === wanted.size && set.every((column) => wanted.has(column)));
    if (at >= 0) return at;
  }
  let widest = 0;
  sets.forEach((set, i) => {
    if (set.length > sets[widest].length) widest = i;
  });
  return widest;
}

/** By size, then plan order. */
function everyCombination(columns: readonly string[]): string[][] {
  const found: string[][] = [];
  const walk = (from: number, chosen: string[], size: number) => {
    if (chosen.length === size) {
      found.push(chosen);
      return;
    }
    for (let i = from; i < columns.length; i++) walk(i + 1, [...chosen, columns[i]], size);
  };
  for (let size = 1; size <= columns.length; size++) walk(0, [], size);
  return found;
}

function place(order: readonly string[], column: string): number {
  const at = order.indexOf(column);
  return at < 0 ? order.length : at;
}
