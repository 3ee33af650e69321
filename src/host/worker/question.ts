import type { Comparison } from "../../engine/comparison";
import type { Plan } from "../../engine/plan";
import type { Table } from "../../engine/table";
import { naturalCompare } from "../../engine/question/natural";
import { describeColumns } from "../../plan/describe";
import type { QuestionState } from "../../protocol";
import { sayRoles } from "../../report/wording/role";

/** What the Question section shows: the plan, the columns it may choose from, and how the engine took it (if it could). */
export function questionState(table: Table, plan: Plan, guessed: boolean, comparison: Comparison | null): QuestionState {
  return {
    plan,
    guessed,
    columns: describeColumns(table).map(sayRoles),
    levels: exposureLevels(table, plan, comparison),
    reference: comparison?.question.reference ?? null,
    kind: comparison?.question.kind ?? plan.exposure.kind ?? "groups",
    setsChoice: typeof plan.sets === "object" ? "list" : (plan.sets ?? "each"),
    setCount: comparison?.sets.length ?? 0,
  };
}

/** In natural order, so that the list does not jump when another reference is chosen. */
function exposureLevels(table: Table, plan: Plan, comparison: Comparison | null): readonly string[] {
  if (comparison) return comparison.question.groups.map((group) => group.level).sort(naturalCompare);
  const column = table.columns.find((candidate) => candidate.name === plan.exposure.column);
  return column && "levels" in column && column.kind !== "text" ? column.levels : [];
}
