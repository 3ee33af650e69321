import Ajv from "ajv";
import { describe, expect, it } from "vitest";
import type { Plan } from "../../src/engine/plan";
import { everyOutput, openData, sample } from "./outputs";
import schema from "./schema.json";

/** The JSON contract `slantwise.comparison/1`, key for key; members beyond it are optional there. */
const valid = new Ajv({ allErrors: true, allowUnionTypes: true }).compile(schema);
const birthwt: Plan = {
  outcome: { column: "bwt" },
  exposure: { column: "smoke", reference: 0 },
  covariates: [
    { column: "race", form: "category" },
    { column: "age", form: { polynomial: 2 } },
    { column: "lwt", form: { spline: 4 } },
  ],
};
const CASES = {
  heating: sample("heating"),
  seals: sample("seals"),
  valves: sample("valves"),
  glazing: sample("glazing"),
  "glazing, averaged": sample("glazing", { average: "all rows" }),
  "several groups": openData("iris", {
    outcome: { column: "Sepal.Width" },
    exposure: { column: "Species" },
    covariates: [{ column: "Petal.Length" }],
  }),
  "an amount": openData("swiss", {
    outcome: { column: "Fertility" },
    exposure: { column: "Education", per: 10 },
    covariates: [{ column: "Catholic" }],
  }),
  "forms of covariates": openData("birthwt", birthwt),
  "a log outcome": openData("birthwt", { ...birthwt, outcome: { column: "bwt", form: "log" } }),
  "a set that tells the exposure": openData("mtcars", {
    outcome: { column: "mpg" },
    exposure: { column: "am" },
    covariates: [{ column: "car" }],
  }),
};

describe("the JSON is the contract's, key for key", () => {
  for (const [name, { table, plan }] of Object.entries(CASES)) {
    it(name, () => {
      const json: unknown = JSON.parse(everyOutput(table, plan)["json"]);
      valid(json);
      expect(valid.errors ?? []).toEqual([]);
    });
  }
  it("the check itself fails on a key too many and a key too few", () => {
    const json = JSON.parse(everyOutput(CASES.seals.table, CASES.seals.plan)["json"]) as Record<string, unknown>;
    expect(valid({ ...json, extra: 1 })).toBe(false);
    expect(valid({ ...json, rows: undefined })).toBe(false);
  });
});
