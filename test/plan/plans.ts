import fc from "fast-check";
import type { Plan } from "../../src/engine/plan";

const word = fc.string({ minLength: 1, maxLength: 12 }).filter((text) => text.trim() !== "");
const level = fc.oneof(
  word,
  fc.double({ noNaN: true, noDefaultInfinity: true }).filter((value) => !Object.is(value, -0)),
);
const positive = fc.double({ min: 1e-9, max: 1e9, noNaN: true });
const inside = fc.double({ min: 0.001, max: 0.999, noNaN: true });
const words = fc.array(word, { maxLength: 4 });
const part = <T>(arbitrary: fc.Arbitrary<T>) => fc.option(arbitrary, { nil: undefined });

const form = fc.oneof(
  fc.constantFrom("as is" as const, "log" as const, "category" as const),
  fc.record({ polynomial: fc.integer({ min: 2, max: 10 }) }),
  fc.record({ spline: fc.constantFrom(3, 4, 5) }),
);
const covariate = fc.record({
  column: word,
  form: part(form),
  timing: part(fc.constantFrom("before" as const, "after" as const, "unsure" as const)),
  reason: part(word),
  label: part(word),
  reference: part(level),
});
const keep = fc.oneof(
  fc.record({
    column: word,
    from: fc.double({ max: 0, noNaN: true, noDefaultInfinity: true, min: -1e9 }).map((v) => v + 0),
    to: part(positive),
  }),
  fc.record({ column: word, from: word }),
  fc.record({ column: word, not: fc.array(level, { minLength: 1, maxLength: 3 }) }),
  fc.record({ column: word, only: fc.array(level, { minLength: 1, maxLength: 3 }) }),
);

/** Any plan a file may hold, as the value that comes back from its JSON. */
export const anyPlan: fc.Arbitrary<Plan> = fc
  .record({
    data: fc.stringMatching(/^[a-z_]{2,9}\.csv$/),
    design: part(fc.constantFrom("randomised" as const, "observational" as const)),
    outcome: fc.record({
      column: word,
      unit: part(word),
      label: part(word),
      kind: part(fc.constantFrom("amount" as const, "binary" as const, "count" as const)),
      form: part(fc.constantFrom("as is" as const, "log" as const)),
    }),
    exposure: fc.record({
      column: word,
      label: part(word),
      unit: part(word),
      reference: part(level),
      per: part(positive),
      kind: part(fc.constantFrom("groups" as const, "amount" as const)),
    }),
    covariates: part(fc.array(covariate, { maxLength: 4 })),
    always: part(words),
    sets: part(fc.oneof(fc.constantFrom("each" as const, "steps" as const, "every" as const), fc.array(words, { maxLength: 3 }))),
    report: part(words),
    modifiers: part(words),
    margin: part(fc.option(positive)),
    slopesAlpha: part(inside),
    reportAt: part(fc.dictionary(word, fc.array(level, { minLength: 1, maxLength: 3 }), { maxKeys: 3 })),
    average: part(fc.option(word)),
    cluster: part(fc.option(word)),
    weights: part(fc.option(word)),
    variance: part(fc.option(fc.constantFrom("classical" as const, "HC0" as const, "HC3" as const, "CR2" as const))),
    level: part(inside),
    missing: part(fc.oneof(words, fc.record({ only: words }))),
    id: part(words),
    keep: part(fc.array(keep, { maxLength: 3 })),
    rowsAre: part(word),
    script: part(word),
  })
  .map((plan) => JSON.parse(JSON.stringify(plan)) as Plan);
