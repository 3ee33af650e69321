import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { Plan } from "../../src/engine/plan";
import { choose, settlesGuess } from "../../src/host/choose";
import type { PlanChange } from "../../src/protocol";

const plan: Plan = {
  data: "heating.csv",
  outcome: { column: "kwh", unit: "kWh per winter" },
  exposure: { column: "retrofit", reference: "none" },
  covariates: [{ column: "floor_m2", form: "log", reason: "larger flats first" }, { column: "tenure" }, { column: "persons" }],
  always: ["persons"],
  sets: [["floor_m2"], ["floor_m2", "tenure"]],
  report: ["floor_m2", "tenure"],
  modifiers: ["floor_m2"],
  reportAt: { floor_m2: [50, 90] },
  margin: 150,
  average: "none",
};

describe("a choice in the panel", () => {
  test("keeps everything it does not touch", () => {
    expect(choose(plan, { key: "margin", value: 200 })).toEqual({ ...plan, margin: 200 });
    expect(choose(plan, { key: "reference", level: "full" }).exposure).toEqual({ column: "retrofit", reference: "full" });
    expect(choose(plan, { key: "outcome", column: "kwh" })).toBe(plan);
  });
  test("a new outcome drops the margin, which was in the old one's units, and the old unit", () => {
    const next = choose(plan, { key: "outcome", column: "cost" });
    expect(next.outcome).toEqual({ column: "cost" });
    expect("margin" in next).toBe(false);
    expect(next.exposure).toEqual(plan.exposure);
  });
  test("an outcome that was a covariate stops being one, everywhere", () => {
    const next = choose(plan, { key: "outcome", column: "floor_m2" });
    expect(next.covariates?.map(({ column }) => column)).toEqual(["tenure", "persons"]);
    expect(next.sets).toEqual([[], ["tenure"]]);
    expect("report" in next).toBe(false);
    expect("modifiers" in next).toBe(false);
    expect(next.reportAt).toEqual({});
  });
  test("outcome and exposure change places where one takes the other's column", () => {
    const next = choose(plan, { key: "exposure", column: "kwh" });
    expect([next.outcome, next.exposure]).toEqual([{ column: "retrofit" }, { column: "kwh" }]);
    expect([choose(next, { key: "outcome", column: "kwh" }).exposure]).toEqual([{ column: "retrofit" }]);
  });
  test("covariates that stay keep their form and reason; an added one puts an end to hand-listed sets", () => {
    const fewer = choose(plan, { key: "covariates", columns: ["floor_m2", "persons"] });
    expect(fewer.covariates).toEqual([plan.covariates![0], plan.covariates![2]]);
    expect(fewer.sets).toEqual([["floor_m2"], ["floor_m2"]]);
    const more = choose(plan, { key: "covariates", columns: ["floor_m2", "tenure", "persons", "storey"] });
    expect(more.covariates?.at(-1)).toEqual({ column: "storey" });
    expect("sets" in more).toBe(false);
  });
  test("only columns settle a guess", () => {
    expect(settlesGuess({ key: "margin", value: 1 })).toBe(false);
    expect(settlesGuess({ key: "covariates", columns: [] })).toBe(true);
  });

  const column = fc.constantFrom("kwh", "retrofit", "floor_m2", "tenure", "persons", "storey");
  const change: fc.Arbitrary<PlanChange> = fc.oneof(
    fc.record({ key: fc.constant("outcome" as const), column }),
    fc.record({ key: fc.constant("exposure" as const), column }),
  );
  test("no column is named twice after any row of choices", () => {
    fc.assert(
      fc.property(fc.array(change, { maxLength: 8 }), (changes) => {
        const end = changes.reduce(choose, plan);
        const covariates = end.covariates?.map((covariate) => covariate.column) ?? [];
        const named = [end.outcome.column, end.exposure.column, ...covariates];
        expect(new Set(named).size).toBe(named.length);
        const listed = [
          ...(end.always ?? []),
          ...(end.report ?? []),
          ...(end.modifiers ?? []),
          ...(end.sets as string[][]).flat(),
        ];
        expect(listed.filter((name) => !covariates.includes(name))).toEqual([]);
      }),
    );
  });
});
