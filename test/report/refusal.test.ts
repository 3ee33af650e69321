import { describe, expect, it } from "vitest";
import { compare } from "../../src/engine/compare";
import type { Plan } from "../../src/engine/plan";
import { everyOutput, openData, sample } from "./outputs";

/** Whole numeric tokens of a text, signs and thousands marks off. */
const tokens = (text: string): Set<string> =>
  new Set((text.replaceAll(",", "").match(/\d+(?:\.\d+)?(?:e[+-]?\d+)?/g) ?? []).map((token) => String(Number(token))));

/** The common-slope estimates that must not be printed: what the sets would say if slopes were never held to differ. */
function hidden(table: Parameters<typeof compare>[0], plan: Plan, varying: readonly number[]): number[] {
  const forced = compare(table, { ...plan, slopesAlpha: 1e-300 });
  return varying.flatMap((i) =>
    forced.sets[i].contrasts.flatMap(({ readout }) =>
      readout.kind === "single" || readout.kind === "undecided" ? [readout.estimate] : [],
    ),
  );
}

/** A difference as it stands, as a share in percent, and of logarithms as a ratio and a percent difference. */
function asPrinted(value: number, { outcome }: Plan): number[] {
  return outcome.form === "log" ? [value, Math.exp(value), 100 * Math.expm1(value)] : [value, 100 * value];
}

const CASES: Record<string, { table: Parameters<typeof compare>[0]; plan: Plan }> = {
  "the glazing sample": sample("glazing"),
  "mtcars by weight": openData("mtcars", {
    outcome: { column: "mpg" },
    exposure: { column: "am", reference: 0 },
    covariates: [{ column: "wt" }, { column: "hp" }],
    modifiers: ["wt"],
  }),
  "an amount: airquality": openData("airquality", {
    outcome: { column: "Ozone" },
    exposure: { column: "Temp" },
    covariates: [{ column: "Wind" }],
  }),
  "several groups: anorexia": openData("anorexia", {
    outcome: { column: "Postwt" },
    exposure: { column: "Treat", reference: "Cont" },
    covariates: [{ column: "Prewt" }],
  }),
};

/** Refused whatever the test says, so that surfaces are searched on data of other kinds too. */
const refusing = { slopesAlpha: 0.999999 };
Object.assign(CASES, {
  "a log outcome: airquality": openData("airquality", {
    outcome: { column: "Ozone", form: "log" },
    exposure: { column: "Temp" },
    covariates: [{ column: "Wind" }],
    ...refusing,
  }),
  "a yes/no outcome: birthwt": openData("birthwt", {
    outcome: { column: "low" },
    exposure: { column: "smoke", reference: 0 },
    covariates: [{ column: "lwt" }],
    ...refusing,
  }),
  "columns in every set: mtcars": openData("mtcars", {
    outcome: { column: "mpg" },
    exposure: { column: "am", reference: 0 },
    covariates: [{ column: "wt" }, { column: "hp" }],
    always: ["wt"],
    modifiers: ["wt"],
    ...refusing,
  }),
  "two modifiers: mtcars": openData("mtcars", {
    outcome: { column: "mpg" },
    exposure: { column: "am", reference: 0 },
    covariates: [{ column: "wt" }, { column: "qsec" }],
    ...refusing,
  }),
  "an average over stated rows: anorexia": openData("anorexia", {
    outcome: { column: "Postwt" },
    exposure: { column: "Treat", reference: "Cont" },
    covariates: [{ column: "Prewt" }],
    average: "all rows",
  }),
});

describe("where slopes differ no output holds the common-slope number", () => {
  for (const [name, { table, plan }] of Object.entries(CASES)) {
    it(name, () => {
      const comparison = compare(table, plan);
      const varying = comparison.sets.flatMap((set, i) => (set.contrasts.some((c) => c.readout.kind === "varies") ? [i] : []));
      expect(varying.length).toBeGreaterThan(0);
      const numbers = hidden(table, plan, varying).flatMap((value) => asPrinted(value, plan));
      expect(numbers.length).toBeGreaterThan(0);
      for (const [surface, text] of Object.entries(everyOutput(table, plan))) {
        const seen = tokens(text);
        for (const value of numbers) {
          for (let digits = 3; digits <= 6; digits++) {
            const token = String(Number(Math.abs(value).toPrecision(digits)));
            expect(seen.has(token), `${surface} shows ${token}`).toBe(false);
          }
        }
      }
    });
  }
  it("and says so in words on every surface a person reads", () => {
    const { table, plan } = CASES["the glazing sample"];
    const outputs = everyOutput(table, plan);
    for (const surface of ["panel", "markdown", "text", "table"])
      expect(outputs[surface]).toContain("no single difference: slopes differ in mean wind");
  });
  it("the base set's number is called a difference in means", () => {
    const { table, plan } = CASES["the glazing sample"];
    expect(everyOutput(table, plan)["text"]).toContain("difference in means only");
  });
});
