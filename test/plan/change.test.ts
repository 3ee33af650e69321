import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { Plan } from "../../src/engine/plan";
import { applyChange } from "../../src/plan/change";
import type { PlanChange } from "../../src/plan/change";
import { checkPlan } from "../../src/plan/check";
import { flats } from "./tables";

const plan: Plan = {
  data: "flats.csv",
  outcome: { column: "kwh", unit: "kWh per winter" },
  exposure: { column: "retrofit", reference: "none" },
  covariates: [{ column: "floor_m2", form: "log", reason: "larger flats first" }, { column: "tenure" }, { column: "block" }],
  always: ["block"],
  sets: [["floor_m2"], ["tenure"], ["floor_m2", "tenure"]],
  report: ["floor_m2", "tenure"],
  modifiers: ["floor_m2"],
  reportAt: { floor_m2: [50, 60] },
  margin: 150,
  average: "none",
};

describe("a change to a plan", () => {
  test("leaves the plan it came from as it was, and everything it does not touch", () => {
    const before = JSON.stringify(plan);
    expect(applyChange(plan, { key: "margin", value: null })).toEqual({ ...plan, margin: null });
    expect(applyChange(plan, { key: "average", over: "all rows" })).toEqual({ ...plan, average: "all rows" });
    expect(applyChange({ ...plan, average: "full" }, { key: "average", over: null })).not.toHaveProperty("average");
    expect(applyChange(plan, { key: "reference", level: "full" }).exposure).toEqual({ column: "retrofit", reference: "full" });
    expect(applyChange(plan, { key: "per", value: 10 }).exposure.per).toBe(10);
    expect(applyChange(plan, { key: "report", columns: ["tenure"] })).toEqual({ ...plan, report: ["tenure"] });
    expect(JSON.stringify(plan)).toBe(before);
    expect(applyChange(plan, { key: "exposure", column: "retrofit" })).toBe(plan);
    expect(applyChange(plan, { key: "outcome", column: "kwh" })).toBe(plan);
  });
  test("another outcome takes the old one's unit and margin away", () => {
    const next = applyChange({ ...plan, covariates: [], sets: "each", always: [] }, { key: "outcome", column: "built" });
    expect([next.outcome, "margin" in next]).toEqual([{ column: "built" }, false]);
  });
  test("another exposure takes the reference and the group to average over away", () => {
    const next = applyChange(plan, { key: "exposure", column: "built" });
    expect([next.exposure, "average" in next, next.margin]).toEqual([{ column: "built" }, false, 150]);
  });
  test("an exposure that was a covariate is one no longer, in any list", () => {
    const next = applyChange(plan, { key: "exposure", column: "floor_m2" });
    expect(next.covariates).toEqual([{ column: "tenure" }, { column: "block" }]);
    expect(next.sets).toEqual([[], ["tenure"]]);
    expect([next.report, next.modifiers, next.reportAt]).toEqual([undefined, undefined, {}]);
    expect(applyChange(plan, { key: "exposure", column: "block" }).always).toEqual([]);
  });
  test("outcome and exposure change places, unless what comes back cannot be an outcome", () => {
    const swapped = applyChange(plan, { key: "exposure", column: "kwh" }, flats);
    expect([swapped.outcome, swapped.exposure]).toEqual([{ column: "retrofit" }, { column: "kwh" }]);
    const tenure: Plan = { outcome: { column: "kwh" }, exposure: { column: "tenure" }, covariates: [{ column: "floor_m2" }] };
    const other = applyChange(tenure, { key: "exposure", column: "kwh" }, flats);
    expect([other.outcome, other.exposure, other.covariates]).toEqual([{ column: "floor_m2" }, { column: "kwh" }, []]);
  });
  test("weights that become the outcome are weights no longer", () => {
    expect("weights" in applyChange({ ...plan, weights: "built" }, { key: "outcome", column: "built" })).toBe(false);
  });
  test("covariates that stay keep form and reason; a new one puts an end to hand-listed sets and the reported one", () => {
    const fewer = applyChange(plan, { key: "covariates", columns: ["floor_m2", "block"] });
    expect(fewer.covariates).toEqual([plan.covariates![0], plan.covariates![2]]);
    expect(fewer.sets).toEqual([["floor_m2"], []]);
    const more = applyChange(plan, { key: "covariates", columns: ["built", "floor_m2", "tenure", "block", "built"] });
    expect(more.covariates!.map(({ column }) => column)).toEqual(["built", "floor_m2", "tenure", "block"]);
    expect(["sets" in more, "report" in more]).toEqual([false, false]);
  });
  test("another listing of sets forgets a reported set it may not hold", () => {
    const next = applyChange(plan, { key: "sets", sets: "steps" });
    expect([next.sets, "report" in next]).toEqual(["steps", false]);
  });

  const column = fc.constantFrom("retrofit", "floor_m2", "tenure", "kwh", "block");
  const change: fc.Arbitrary<PlanChange> = fc.oneof(
    fc.record({ key: fc.constant("outcome" as const), column: fc.constantFrom("floor_m2", "kwh", "retrofit") }),
    fc.record({ key: fc.constant("exposure" as const), column }),
    fc.record({ key: fc.constant("sets" as const), sets: fc.constantFrom("each" as const, "steps" as const, "every" as const) }),
  );
  test("any row of changes leaves a plan that can be compared", () => {
    fc.assert(
      fc.property(fc.array(change, { maxLength: 8 }), (changes) => {
        const end = changes.reduce((now, next) => applyChange(now, next, flats), plan);
        expect(checkPlan(flats, end)).toEqual([]);
      }),
      { seed: 23, numRuns: 300 },
    );
  });
});
