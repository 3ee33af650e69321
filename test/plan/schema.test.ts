import Ajv from "ajv";
import fc from "fast-check";
import { expect, test } from "vitest";
import type { Plan } from "../../src/engine/plan";
import { planShape } from "../../src/plan/keys";
import { parsePlan } from "../../src/plan/parse";
import schema from "../../src/plan/plan.schema.json";
import { anyPlan } from "./plans";

// editors know three keywords that the standard does not
const ajv = new Ajv({ strict: true, strictTypes: false, strictRequired: false, allErrors: true });
for (const keyword of ["defaultSnippets", "doNotSuggest"]) ajv.addKeyword(keyword);
const bySchema = ajv.compile(schema);

const FILE = "p.slantwise.json";
type Json = null | boolean | number | string | Json[] | { [key: string]: Json };

test("every plan survives being printed and parsed, by the parser and by the schema", () => {
  fc.assert(
    fc.property(anyPlan, fc.constantFrom(0, 2, "\t"), (plan, indent) => {
      expect(parsePlan(JSON.stringify(plan, null, indent), FILE)).toMatchObject({ ok: true });
      const parsed = parsePlan(JSON.stringify(plan, null, indent), FILE);
      expect(parsed.ok && parsed.plan).toEqual(plan);
      expect(bySchema(plan), JSON.stringify(bySchema.errors)).toBe(true);
    }),
    { seed: 7, numRuns: 300 },
  );
});

/** Every place of a value where something can be put in its stead. */
function places(value: Json, path: (string | number)[] = []): (string | number)[][] {
  const inner = Array.isArray(value)
    ? value.flatMap((item, i) => places(item, [...path, i]))
    : typeof value === "object" && value !== null
      ? Object.entries(value).flatMap(([key, item]) => places(item, [...path, key]))
      : [];
  return path.length > 0 ? [path, ...inner] : inner;
}

function put(
  value: Json,
  [key, ...rest]: (string | number)[],
  change: (old: Json, key: string | number) => [string | number, Json],
): Json {
  const [entries, isList] = [Object.entries(value as object) as [string, Json][], Array.isArray(value)];
  const next = entries.map(([name, item]): [string, Json] => {
    if (name !== String(key)) return [name, item];
    if (rest.length > 0) return [name, put(item, rest, change)];
    const [newName, newItem] = change(item, key);
    return [String(newName), newItem];
  });
  return isList ? next.map(([, item]) => item) : Object.fromEntries(next);
}

test("parser and schema judge alike whatever stands in the place of one value", () => {
  const anything: fc.Arbitrary<Json> = fc.constantFrom<Json>(
    null,
    true,
    0,
    -1,
    0.5,
    7,
    "",
    " ",
    "x",
    "log",
    "each",
    [],
    [[]],
    ["x"],
    [1],
    {},
    { column: "x" },
    { only: [] },
    { spline: 4 },
  );
  let refused = 0;
  fc.assert(
    fc.property(anyPlan, anything, fc.nat(), (plan, other, pick) => {
      const all = places(plan as unknown as Json);
      const changed = put(plan as unknown as Json, all[pick % all.length], (_, key) => [key, other]);
      const parsed = parsePlan(JSON.stringify(changed), FILE);
      if (!parsed.ok) refused++;
      expect([parsed.ok, JSON.stringify(changed)]).toEqual([bySchema(changed), JSON.stringify(changed)]);
    }),
    { seed: 11, numRuns: 1500 },
  );
  expect(refused).toBeGreaterThan(300);
});

test("a misspelt key anywhere is a problem on its own line", () => {
  const free = (path: (string | number)[]) => path[0] === "reportAt" && path.length === 2;
  fc.assert(
    fc.property(anyPlan, fc.nat(), (plan, pick) => {
      const named = places(plan as unknown as Json).filter((path) => typeof path.at(-1) === "string" && !free(path));
      const path = named[pick % named.length];
      const wrong = `${String(path.at(-1))}~`;
      const changed = put(plan as unknown as Json, path, (old) => [wrong, old]);
      // ASCII escapes keep line separators inside strings from counting as lines here
      const text = JSON.stringify(changed, null, 2);
      const parsed = parsePlan(text, FILE);
      expect(parsed.ok).toBe(false);
      expect(bySchema(changed)).toBe(false);
      const found = parsed.ok
        ? undefined
        : parsed.problems.find((problem) => problem.code === "unknown-key" && problem.key === wrong);
      expect(text.split("\n")[found!.line! - 1]).toContain(`"${wrong}":`);
    }),
    { seed: 13, numRuns: 300 },
  );
});

test("the schema offers every key the parser knows, each with a description", () => {
  const known = Object.entries(schema.properties);
  const described = (value: object): boolean => "description" in value || "$ref" in value;
  expect(
    known
      .filter(([, value]) => !described(value))
      .map(([name]) => name)
      .filter((name) => name !== "covariates"),
  ).toEqual([]);
  const everything: Record<keyof Plan, true> = {
    data: true,
    design: true,
    outcome: true,
    exposure: true,
    covariates: true,
    always: true,
    sets: true,
    report: true,
    modifiers: true,
    margin: true,
    slopesAlpha: true,
    reportAt: true,
    average: true,
    cluster: true,
    weights: true,
    variance: true,
    level: true,
    missing: true,
    id: true,
    keep: true,
    rowsAre: true,
    script: true,
  };
  expect(
    known
      .map(([name]) => name)
      .filter((name) => name !== "$schema")
      .sort(),
  ).toEqual(Object.keys(everything).sort());
  expect(planShape.expected).toEqual(["an object in braces"]);
});
