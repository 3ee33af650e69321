import { describe, expect, test } from "vitest";
import { readArguments } from "../../src/cli/arguments";
import { questionOf } from "../../src/cli/question";
import { checkPlan } from "../../src/plan/check";
import { parsePlan } from "../../src/plan/parse";
import { flats } from "../plan/tables";

const TEXT = JSON.stringify({
  data: "flats.csv",
  outcome: { column: "kwh", unit: "kWh" },
  exposure: { column: "retrofit", reference: "none" },
  covariates: [{ column: "floor_m2", reason: "larger flats first" }, { column: "tenure" }],
  report: ["floor_m2"],
  margin: 150,
  level: 0.9,
});
const parsed = parsePlan(TEXT, "p.slantwise.json");
if (!parsed.ok) throw new Error("the plan is good");

const ask = (over: typeof parsed | null, ...args: string[]) => {
  const question = questionOf(flats, readArguments(args).values, over && over.ok ? over : null);
  if ("problem" in question) throw new Error(question.problem.code);
  return question;
};
const bare = (...args: string[]) => ask(null, ...args);
const over = (...args: string[]) => ask(parsed, ...args).plan;
const columns = ({ plan }: ReturnType<typeof bare>) =>
  [plan.outcome.column, plan.exposure.column, ...(plan.covariates ?? []).map(({ column }) => column)].join(" ");

describe("a question without a plan", () => {
  test("is guessed, and says so until one column is named", () => {
    expect([columns(bare()), bare().guessed, bare().filledIn]).toEqual(["kwh retrofit floor_m2 tenure block", true, []]);
    expect([bare("--margin", "5").guessed, bare("--covariates", "").guessed]).toEqual([true, false]);
  });
  test("is filled in beside the columns that are named, and tells which", () => {
    expect(bare("--outcome", "floor_m2").filledIn).toEqual(["exposure retrofit", "covariates tenure, kwh, block"]);
    expect(bare("--outcome", "kwh", "--exposure", "tenure", "--covariates", "").filledIn).toEqual([]);
    expect(columns(bare("--outcome", "kwh", "--exposure", "tenure", "--covariates", ""))).toBe("kwh tenure");
  });
  test("guesses no column that has another role", () => {
    expect(columns(bare("--cluster", "block", "--always", "tenure"))).toBe("kwh retrofit floor_m2");
  });
});

describe("options over a plan", () => {
  test("change what they name and nothing else", () => {
    expect(over()).toEqual(parsed.plan);
    expect(over("--margin", "20", "--reference", "full", "--variance", "HC1")).toEqual({
      ...parsed.plan,
      margin: 20,
      variance: "HC1",
      exposure: { column: "retrofit", reference: "full" },
    });
  });
  test("another outcome takes the margin with it, another listing of sets the reported one", () => {
    expect(over("--outcome", "built")).toMatchObject({ outcome: { column: "built" }, exposure: { column: "retrofit" } });
    expect("margin" in over("--outcome", "built")).toBe(false);
    expect(over("--outcome", "built", "--margin", "3").margin).toBe(3);
    expect([over("--sets", "steps").report, over("--sets", "every", "--report", "tenure").report]).toEqual([
      undefined,
      ["tenure"],
    ]);
  });
  test("covariates keep their reasons", () => {
    expect(over("--covariates", "block,floor_m2").covariates).toEqual([
      { column: "block" },
      { column: "floor_m2", reason: "larger flats first" },
    ]);
  });
  test("outcome and exposure may change places, but one column cannot be both", () => {
    expect(over("--outcome", "retrofit", "--exposure", "kwh")).toMatchObject({
      outcome: { column: "retrofit" },
      exposure: { column: "kwh" },
    });
    for (const args of [
      ["--exposure", "kwh"],
      ["--outcome", "retrofit"],
      ["--outcome", "block", "--exposure", "block"],
    ])
      expect(checkPlan(flats, over(...args), parsed)[0].code, args.join(" ")).toBe("named-twice");
  });
  test("categories must be held fixed", () => {
    expect(over("--category", "floor_m2").covariates?.[0]).toEqual({
      column: "floor_m2",
      reason: "larger flats first",
      form: "category",
    });
    expect(over("--always", "block", "--category", "block").covariates?.at(-1)).toEqual({ column: "block", form: "category" });
    expect(() => over("--category", "kwh")).toThrow("--category names kwh, which is not among the covariates");
  });
});
