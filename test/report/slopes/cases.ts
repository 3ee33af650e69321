import { compare } from "../../../src/engine/compare";
import type { Comparison } from "../../../src/engine/comparison";
import { slopesFigure } from "../../../src/engine/figure";
import type { Plan } from "../../../src/engine/plan";
import type { Table } from "../../../src/engine/table";
import { chosenOf } from "../../../src/report/slopes/choice";
import type { SlopesChoice, SlopesSection } from "../../../src/report/slopes/presentation";
import { slopesSection } from "../../../src/report/slopes/section";
import { openData, sample } from "../outputs";

export interface Case {
  readonly table: Table;
  readonly plan: Plan;
  readonly choice?: Partial<SlopesChoice>;
}

const births = (more: Partial<Plan>): Plan => ({
  outcome: { column: "bwt", unit: "g", label: "birth weight" },
  exposure: { column: "smoke", reference: 0 },
  rowsAre: "births",
  ...more,
});
const swiss: Plan = {
  outcome: { column: "Fertility", unit: "points" },
  exposure: { column: "Education", per: 10 },
  covariates: [{ column: "Catholic" }],
  rowsAre: "districts",
};

/** One of each kind of figure. */
export const CASES: Readonly<Record<string, Case>> = {
  "groups whose slopes differ": sample("glazing"),
  "another modifier than the one that differs": { ...sample("glazing"), choice: { modifier: "floor_m2" } },
  "groups whose slopes agree, a set of one column": { ...sample("heating"), choice: { set: 1, modifier: "floor_m2" } },
  "a modifier that the set does not hold": { ...sample("heating"), choice: { set: 2, modifier: "floor_m2" } },
  "a category": { ...sample("heating"), choice: { modifier: "tenure" } },
  "three groups, the second contrast": {
    ...openData("anorexia", {
      outcome: { column: "Postwt", unit: "lb" },
      exposure: { column: "Treat", reference: "Cont" },
      covariates: [{ column: "Prewt" }],
      rowsAre: "patients",
    }),
    choice: { contrast: 1 },
  },
  "groups that share no range": openData("iris", {
    outcome: { column: "Sepal.Width" },
    exposure: { column: "Species", reference: "setosa" },
    covariates: [{ column: "Petal.Length" }],
    rowsAre: "flowers",
  }),
  "a logarithm of the outcome": openData(
    "birthwt",
    births({
      outcome: { column: "bwt", form: "log", unit: "g", label: "birth weight" },
      covariates: [{ column: "age" }, { column: "race", form: "category" }],
    }),
  ),
  "a logarithm of the modifier": openData("birthwt", births({ covariates: [{ column: "lwt", form: "log" }] })),
  "a curve, two-valued outcome": openData(
    "birthwt",
    births({ outcome: { column: "low" }, covariates: [{ column: "age", form: { spline: 3 } }] }),
  ),
  "an amount with one slope": openData("swiss", swiss),
  "an amount whose slope changes": openData("airquality", {
    outcome: { column: "Ozone" },
    exposure: { column: "Temp" },
    covariates: [{ column: "Wind" }],
  }),
  "an amount without modifiers": openData("swiss", { ...swiss, modifiers: [] }),
  "groups without modifiers": openData("birthwt", births({})),
  "the base set where slopes differ": { ...sample("glazing"), choice: { set: 0 } },
  "a group without rows": openData("birthwt", births({ keep: [{ column: "smoke", not: [1] }], covariates: [{ column: "age" }] })),
};

export function sectionOf({ table, plan, choice }: Case, comparison: Comparison = compare(table, plan)): SlopesSection {
  const chosen = chosenOf(comparison, { set: null, modifier: null, contrast: null, ...choice });
  return slopesSection(comparison, plan, chosen, slopesFigure(table, plan, comparison, chosen));
}
