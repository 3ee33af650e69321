import { readdir, readFile, stat } from "node:fs/promises";
import { basename, dirname, join, resolve } from "node:path";
import { parsePlan, PLAN_LIMIT } from "../plan/parse";
import { resolveData } from "../plan/resolve";

export const PLAN_SUFFIX = ".slantwise.json";
/** More plans than this in a folder are not searched for the one about a CSV. */
const PLANS_SEARCHED = 50;

export function isPlan(path: string): boolean {
  return path.toLowerCase().endsWith(PLAN_SUFFIX);
}

export function isData(path: string): boolean {
  return /\.(csv|tsv)$/i.test(path);
}

/** What a panel is about: the plan where there is one, else the CSV itself. */
export async function targetOf(path: string): Promise<string> {
  return isPlan(path) ? path : ((await planBeside(path)) ?? path);
}

/** The plan in the CSV's folder that is about it; the one of the same name first, then in alphabetical order. */
async function planBeside(csv: string): Promise<string | null> {
  const folder = dirname(csv);
  const stem = basename(csv).replace(/\.[^.]+$/, "");
  const names = (await readdir(folder).catch(() => [])).filter(isPlan).sort();
  const own = stem + PLAN_SUFFIX;
  const ordered = names.includes(own) ? [own, ...names.filter((name) => name !== own)] : names;
  for (const name of ordered.slice(0, PLANS_SEARCHED)) {
    const plan = join(folder, name);
    const data = await dataOf(plan);
    if (data !== null && resolve(folder, data) === csv) return plan;
  }
  return null;
}

/** The `data` entry of a plan file; null where it cannot be read. */
async function dataOf(plan: string): Promise<string | null> {
  try {
    if ((await stat(plan)).size > PLAN_LIMIT) return null;
    const parsed = parsePlan(await readFile(plan, "utf8"), basename(plan));
    return parsed.ok ? (parsed.plan.data ?? null) : null;
  } catch {
    return null;
  }
}

/**
 * The CSV a plan names, as an absolute path. Null where it lies outside both the plan's folder and the workspace folders: a plan that
 * came with somebody's repository must not read elsewhere.
 */
export function dataPath(plan: string, data: string, folders: readonly string[]): string | null {
  const resolved = resolveData(plan, data, [dirname(plan), ...folders]);
  return resolved.ok ? resolved.path : null;
}
