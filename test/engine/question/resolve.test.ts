import { describe, expect, it } from "vitest";
import type { Plan } from "../../../src/engine/plan";
import { resolveQuestion } from "../../../src/engine/question/resolve";
import { planOf, tableOf } from "../fixtures";

const cells = <T>(list: readonly T[], n = 12) => Array.from({ length: n }, (_, i) => list[i % list.length]);
const table = tableOf({
  y: cells([3, 1, 4, 1.5, 9]),
  won: cells(["No", "Yes", "Yes"]),
  grade: cells(["level 10", "level 9"]),
  two: cells([2, 7]),
  g: cells(["B", "A", "B", "c"]),
  arm: cells(["x", "Control", "y"]),
  both: cells(["none", "control", "m", "m"]),
  dose: cells([0, 1, 2]),
  x: cells([1, 2, 3, -4]),
  w: cells([1]),
  k: cells(["p", "q", "r"]),
});
const resolve = (plan: Plan) => resolveQuestion(table, plan);
const reference = (exposure: Plan["exposure"]) => resolve({ ...planOf("y", exposure.column), exposure }).question.reference;

describe("a question settled on a table", () => {
  it("words for yes are 1, else the later level in natural order, and it says which", () => {
    const won = resolve(planOf("won", "g"));
    expect([...won.outcome.slice(0, 3)]).toEqual([0, 1, 1]);
    expect(won.question.outcomeKind).toBe("binary");
    expect(won.findings).toContainEqual({ code: "two-valued-outcome", yes: "Yes", no: "No" });
    expect(resolve(planOf("grade", "g")).findings).toContainEqual({
      code: "two-valued-outcome",
      yes: "level 10",
      no: "level 9",
    });
    expect([...resolve(planOf("two", "g")).outcome.slice(0, 2)]).toEqual([0, 1]);
    expect(resolve({ ...planOf("two", "g"), outcome: { column: "two", kind: "amount" } }).outcome[1]).toBe(7);
  });

  it("a reference is the plan's, else the one level with a reference's name, else the most frequent", () => {
    expect(reference({ column: "g", reference: "c" })).toBe("c");
    expect(reference({ column: "arm" })).toBe("Control");
    expect(reference({ column: "both" })).toBe("m");
    expect(reference({ column: "g" })).toBe("B");
    expect(reference({ column: "k" })).toBe("p");
    expect(reference({ column: "two" })).toBe("2");
    expect(reference({ column: "dose", kind: "groups" })).toBe("0");
  });

  it("two numbers or any words are groups, other numbers an amount, unless the plan says otherwise", () => {
    const kind = (exposure: Plan["exposure"]) => resolve({ ...planOf("y", exposure.column), exposure }).question.kind;
    expect(kind({ column: "two" })).toBe("groups");
    expect(kind({ column: "g" })).toBe("groups");
    expect(kind({ column: "dose" })).toBe("amount");
    expect(kind({ column: "dose", kind: "groups" })).toBe("groups");
    expect(kind({ column: "two", kind: "amount" })).toBe("amount");
  });

  it("errors are HC3, or CR2 where a cluster is named, or the plan's with what must be said of them", () => {
    const of = (plan: Plan) => {
      const { question, findings } = resolve(plan);
      return [question.variance, ...findings.map((f) => f.code)];
    };
    const quiet = { modifiers: ["x"] };
    expect(of(planOf("y", "g", [], quiet))).toEqual(["HC3"]);
    expect(of(planOf("y", "g", [], { ...quiet, cluster: "k" }))).toEqual(["CR2"]);
    expect(of(planOf("y", "g", [], { ...quiet, cluster: "k", variance: "HC1" }))).toEqual(["HC1", "clusters-ignored"]);
    expect(of(planOf("y", "g", [], { ...quiet, weights: "w", variance: "classical" }))).toEqual([
      "classical",
      "classical-weights",
    ]);
    expect(of(planOf("won", "g", [], { ...quiet, variance: "classical" }))).toEqual([
      "HC3",
      "two-valued-outcome",
      "classical-binary",
    ]);
    expect(of({ ...planOf("y", "g", [], quiet), outcome: { column: "y", kind: "count" } })).toEqual(["HC3", "count-as-amount"]);
  });

  it("modifiers are all covariates of all sets unless the plan names them, none twice", () => {
    expect(resolve(planOf("y", "g", ["x", "k"])).question.modifiers).toEqual(["x", "k"]);
    expect(resolve(planOf("y", "g", ["x", "k"], { modifiers: ["k", "k"] })).question.modifiers).toEqual(["k"]);
    expect(resolve(planOf("y", "g")).findings).toContainEqual({ code: "no-modifier" });
  });

  it("what has no logarithm is missing and listed by line, in outcome and covariate", () => {
    const lines = [5, 9, 13];
    const { findings, sources } = resolve({ ...planOf("y", "g"), covariates: [{ column: "x", form: "log" }] });
    expect(findings).toContainEqual({ code: "log-not-positive", column: "x", lines });
    expect(sources.get("x")).toMatchObject({ kind: "amount", form: "log" });
    const logged = resolve({ ...planOf("x", "g"), outcome: { column: "x", form: "log" } });
    expect(logged.findings).toContainEqual({ code: "log-not-positive", column: "x", lines });
    expect([...logged.outcome.slice(0, 4)]).toEqual([0, Math.log(2), Math.log(3), NaN]);
  });

  it("a covariate after the exposure is told wherever a set holds it", () => {
    const plan: Plan = { ...planOf("y", "g"), covariates: [{ column: "x", timing: "after" }, { column: "k" }] };
    expect(resolve(plan).findings).toContainEqual({ code: "after-exposure", columns: ["x"] });
    expect(resolve({ ...plan, sets: [["k"]] }).findings.map((f) => f.code)).not.toContain("after-exposure");
  });
});
