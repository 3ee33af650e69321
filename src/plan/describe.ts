import { GROUP_LIMIT, LEVEL_LIMIT } from "../engine/question/problems";
import type { Column, Table } from "../engine/table";
import { profileOf } from "./profile";
import type { Profile } from "./profile";

/** Why a column cannot stand in a role; report/wording/role says it. */
export type RoleReason =
  | { readonly code: "empty" }
  | { readonly code: "constant" }
  | { readonly code: "words"; readonly levels: number }
  | { readonly code: "too-many-groups"; readonly levels: number; readonly limit: number };

/** A column and the roles it may take: null where it may. */
export interface ColumnRoles {
  readonly name: string;
  readonly kind: Column["kind"];
  /** Missing cells. */
  readonly missing: number;
  /** Distinct levels of a column of words; null for numbers and dates. */
  readonly levels: number | null;
  readonly notOutcome: RoleReason | null;
  readonly notExposure: RoleReason | null;
  readonly notCovariate: RoleReason | null;
}

/** Every column of a table, in file order, with the roles it may take. What is refused here, `findProblems` or the fit would refuse. */
export function describeColumns(table: Table): ColumnRoles[] {
  return table.columns.map((column) => {
    const profile = profileOf(column);
    const { distinct, numeric, missing } = profile;
    const never = useless(profile);
    const many = (limit: number): RoleReason | null =>
      !numeric && distinct > limit ? { code: "too-many-groups", levels: distinct, limit } : null;
    return {
      name: column.name,
      kind: column.kind,
      missing,
      levels: numeric ? null : distinct,
      notOutcome: never ?? (numeric || distinct === 2 ? null : { code: "words", levels: distinct }),
      notExposure: never ?? many(GROUP_LIMIT),
      notCovariate: never ?? many(LEVEL_LIMIT),
    };
  });
}

function useless({ distinct }: Profile): RoleReason | null {
  if (distinct === 0) return { code: "empty" };
  return distinct === 1 ? { code: "constant" } : null;
}
