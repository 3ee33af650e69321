import type { Problem } from "../engine/findings";
import type { Plan } from "../engine/plan";
import { findProblems } from "../engine/question/problems";
import type { Table } from "../engine/table";
import { nearestName } from "./nearest";
import type { ParsedPlan } from "./parse";
import { placeOf } from "./place";

/**
 * Everything that makes a plan unusable on a table, in the order a person would mend it; empty where it may be compared.
 * A problem names the plan file with line and character where the plan says what is wrong, else the table's file; a misspelt column comes
 * with the nearest one there is.
 * @param parsed the plan file `plan` came from, though options or choices may have changed parts of it since
 */
export function checkPlan(table: Table, plan: Plan, parsed?: ParsedPlan | null): Problem[] {
  const names = table.columns.map(({ name }) => name);
  const seen = new Map<string, number>();
  return findProblems(table, plan).map((found) => {
    const problem = found.code === "unknown-column" ? { ...found, nearest: nearestName(found.column, names) } : found;
    if (problem.line !== undefined) return { ...problem, file: table.source.file };
    const key = found.code === "unknown-column" ? JSON.stringify([found.role, found.column]) : found.code;
    const occurrence = seen.get(key) ?? 0;
    seen.set(key, occurrence + 1);
    const path = parsed ? placeOf(problem, parsed.plan, occurrence) : null;
    return parsed && path ? { ...problem, file: parsed.file, ...parsed.at(path) } : { ...problem, file: table.source.file };
  });
}
