import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { listSets, reportedSet } from "../../../src/engine/question/sets";
import { planOf } from "../fixtures";

const list = (more = {}, covariates = ["a", "b", "c"]) => listSets(planOf("y", "g", covariates, more));

describe("the sets of a plan", () => {
  it("each: none, each alone, all together", () => expect(list()).toEqual([[], ["a"], ["b"], ["c"], ["a", "b", "c"]]));
  it("steps: one more at a time", () => expect(list({ sets: "steps" })).toEqual([[], ["a"], ["a", "b"], ["a", "b", "c"]]));
  it("every: by size, then plan order", () =>
    expect(list({ sets: "every" })).toEqual([[], ["a"], ["b"], ["c"], ["a", "b"], ["a", "c"], ["b", "c"], ["a", "b", "c"]]));
  it("a list gets the base set, and loses what it says twice", () =>
    expect(
      list({
        sets: [["b", "a"], ["c"], ["a", "b"], ["c", "c"]],
      }),
    ).toEqual([[], ["a", "b"], ["c"]]));
  it("always-adjusted columns stand first in every set", () =>
    expect(list({ always: ["c"] })).toEqual([["c"], ["c", "a"], ["c", "b"], ["c", "a", "b"]]));
  it("one covariate alone is all together: no set appears twice", () => expect(list({}, ["a"])).toEqual([[], ["a"]]));
  it("no covariate leaves the base set", () => expect(list({}, [])).toEqual([[]]));

  it("every has each combination once", () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 8 }), (k) => {
        const names = Array.from({ length: k }, (_, i) => `v${i}`);
        const sets = list({ sets: "every" }, names);
        expect(sets).toHaveLength(2 ** k);
        expect(new Set(sets.map(String)).size).toBe(2 ** k);
      }),
      { seed: 5 },
    );
  });

  it("the widest is reported unless the plan says which", () => {
    const plan = planOf("y", "g", ["a", "b"], { always: ["z"] });
    const sets = listSets(plan);
    expect(sets[reportedSet(plan, sets)]).toEqual(["z", "a", "b"]);
    expect(sets[reportedSet({ ...plan, report: ["b"] }, sets)]).toEqual(["z", "b"]);
    expect(sets[reportedSet({ ...plan, report: [] }, sets)]).toEqual(["z"]);
  });
});
