import type { ColumnRoles, RoleReason } from "../../plan/describe";

/** Why a column cannot stand in a role, as a short phrase to follow the column's name. */
export function sayRoleReason(reason: RoleReason): string {
  switch (reason.code) {
    case "empty":
      return "no filled cells";
    case "constant":
      return "one value only";
    case "words":
      return `words, ${reason.levels.toLocaleString("en")} of them; an outcome is numbers or two words`;
    case "too-many-groups":
      return `${reason.levels.toLocaleString("en")} different words, more than ${reason.limit}`;
  }
}

/** A described column with its reasons in words, as the panel shows it. */
export function sayRoles({ notOutcome, notExposure, notCovariate, ...column }: ColumnRoles) {
  const say = (reason: RoleReason | null) => reason && sayRoleReason(reason);
  return { ...column, notOutcome: say(notOutcome), notExposure: say(notExposure), notCovariate: say(notCovariate) };
}
