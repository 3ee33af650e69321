import { realpathSync } from "node:fs";
import { basename, dirname, relative, resolve, sep } from "node:path";
import { readTable } from "../data/read";
import type { Problem } from "../engine/findings";
import type { Plan } from "../engine/plan";
import type { Table } from "../engine/table";
import { parsePlan } from "../plan/parse";
import type { ParsedPlan } from "../plan/parse";
import { resolveData } from "../plan/resolve";
import { readBytes } from "./read";

export interface Input {
  readonly table: Table;
  readonly parsed: ParsedPlan | null;
  /** Path of the CSV as a person would write it, for sentences. */
  readonly shown: string;
  /** Every file that was read. */
  readonly files: readonly string[];
}

export const isPlan = (path: string): boolean => path.toLowerCase().endsWith(".slantwise.json");

/** A CSV, or a plan and the CSV it names; or the problem with one of them. Marks given as an option take the place of the plan's. */
export function readInput(
  path: string,
  missing: Plan["missing"],
): { readonly ok: true; readonly input: Input } | { readonly ok: false; readonly problem: Problem } {
  if (!isPlan(path)) return readData(path, path, missing, null, []);
  const file = readBytes(path, path);
  if (!file.ok) return file;
  const parsed = parsePlan(new TextDecoder().decode(file.bytes), path);
  if (!parsed.ok) return { ok: false, problem: parsed.problems[0] };
  const data = parsed.plan.data!; // a plan file without it is not understood
  const csv = pathNamed(path, data);
  if (csv === null) return { ok: false, problem: { code: "outside-folder", path: data, file: path, ...parsed.at(["data"]) } };
  const shown = relative(process.cwd(), csv);
  return readData(csv, shown.startsWith("..") ? csv : shown, missing ?? parsed.plan.missing, parsed, [path]);
}

/**
 * The file another one names (a plan its CSV, a document its plan), inside that one's folder or the current one, wherever symbolic links
 * lead; null outside of both.
 */
export function pathNamed(by: string, path: string): string | null {
  const roots = [dirname(resolve(by)), process.cwd()];
  const named = resolveData(resolve(by), path, roots);
  if (!named.ok) return null;
  let real: string;
  try {
    real = realpathSync(named.path);
  } catch {
    return named.path; // not there: reading it says so
  }
  const within = (root: string) => real.startsWith(root.endsWith(sep) ? root : root + sep);
  return roots.map((root) => realpathSync(root)).some(within) ? named.path : null;
}

function readData(
  path: string,
  shown: string,
  missing: Plan["missing"],
  parsed: ParsedPlan | null,
  before: readonly string[],
): ReturnType<typeof readInput> {
  const file = readBytes(path, shown);
  if (!file.ok) return file;
  const read = readTable(file.bytes, { file: basename(path), missing });
  if (!read.ok) return { ok: false, problem: { ...read.problem, file: shown } };
  return { ok: true, input: { table: read.table, parsed, shown, files: [...before, path] } };
}
