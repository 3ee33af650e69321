import { readdirSync, readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { Problem } from "../../src/engine/findings";
import { parsePlan, PLAN_LIMIT } from "../../src/plan/parse";

const FILE = "heating.slantwise.json";
const START = '{ "data": "a.csv", "outcome": { "column": "y" }, "exposure": { "column": "g" }';
const problems = (text: string): Problem[] => {
  const parsed = parsePlan(text, FILE);
  return parsed.ok ? [] : parsed.problems;
};
/** The problems of one more key in an otherwise good plan, without file and place. */
const wrong = (more: string) =>
  problems(`${START},\n  ${more}\n}`).map(({ file, line, character, ...rest }) => {
    expect([file, line !== undefined && line >= 2, character !== undefined && character >= 1]).toEqual([FILE, true, true]);
    return rest;
  });

describe("a plan file", () => {
  test("is read as it stands, with comments, a comma after the last item and a byte-order mark", () => {
    const parsed = parsePlan(`\uFEFF// why\r\n${START}, /* units */ "margin": 150,\r\n}`, FILE);
    expect(parsed).toMatchObject({
      ok: true,
      file: FILE,
      plan: { data: "a.csv", outcome: { column: "y" }, exposure: { column: "g" }, margin: 150 },
    });
  });
  test("may name a schema, which is no part of the plan", () => {
    const parsed = parsePlan(`${START}, "$schema": "./plan.schema.json" }`, FILE);
    expect(parsed.ok && Object.keys(parsed.plan)).toEqual(["data", "outcome", "exposure"]);
  });
  test("every plan of the samples is understood", () => {
    const samples = new URL("../../samples/", import.meta.url).pathname;
    const plans = readdirSync(samples).filter((name) => name.endsWith(".slantwise.json"));
    expect(plans.length).toBeGreaterThan(3);
    for (const name of plans) expect(problems(readFileSync(samples + name, "utf8")), name).toEqual([]);
  });
  test("tells where its parts stand, and the part around one that is not there", () => {
    const parsed = parsePlan(
      `{\n  "data": "a.csv",\n  "outcome": { "column": "y" },\n  "exposure": {\n    "column": "g"\n  }\n}`,
      FILE,
    );
    if (!parsed.ok) throw new Error("the plan is good");
    expect(parsed.at(["exposure", "column"])).toEqual({ line: 5, character: 15 });
    expect(parsed.at(["exposure", "reference"])).toEqual({ line: 4, character: 15 });
    expect(parsed.at(["covariates", 3, "column"])).toEqual({ line: 1, character: 1 });
  });
});

describe("what is wrong in a plan", () => {
  test("an unknown key comes with its line and the nearest known one, not also as a missing key", () => {
    const text = '{\n  "data": "a.csv",\n  "outcom": { "column": "y" },\n  "exposure": { "column": "g" }\n}';
    expect(problems(text)).toEqual([
      { code: "unknown-key", key: "outcom", nearest: "outcome", file: FILE, line: 3, character: 3 },
    ]);
  });
  test("a key like no other has no nearest one", () => {
    expect(wrong('"zzzz": 1')).toEqual([{ code: "unknown-key", key: "zzzz", nearest: null }]);
    expect(wrong('"__proto__": { "level": 0.9 }')).toEqual([{ code: "unknown-key", key: "__proto__", nearest: null }]);
  });
  test("what a plan cannot do without is named where it should stand", () => {
    expect(problems("{}").map((problem) => ("key" in problem ? problem.key : problem.code))).toEqual([
      "data",
      "outcome",
      "exposure",
    ]);
    expect(wrong('"covariates": [{}]')).toEqual([{ code: "missing-key", key: "covariates[0].column" }]);
  });
  test("every problem is told, in the order of the text", () => {
    const found = problems(`${START},\n "level": 95,\n "variance": "HC9",\n "marginn": 3\n}`);
    expect(found.map(({ line, code }) => [line, code])).toEqual([
      [2, "bad-value"],
      [3, "bad-value"],
      [4, "unknown-key"],
    ]);
  });
  test("values say what they must be and what they are", () => {
    const bad = (key: string, expected: string, found: string) => [{ code: "bad-value", key, expected, found }];
    expect(wrong('"level": 95')).toEqual(bad("level", "a number between 0 and 1", "95"));
    expect(wrong('"margin": -1')).toEqual(bad("margin", "a number above 0 or null", "-1"));
    expect(wrong('"margin": 1e999')).toEqual(bad("margin", "a number above 0 or null", "a number beyond double range"));
    expect(wrong('"always": "age"')).toEqual(bad("always", "a list of column names", '"age"'));
    expect(wrong('"sets": "all"')).toEqual(bad("sets", '"each", "steps", "every" or a list of lists of column names', '"all"'));
    expect(wrong('"design": "observed"')).toEqual(bad("design", '"randomised" or "observational"', '"observed"'));
    expect(wrong('"cluster": " "')).toEqual(bad("cluster", "the name of a column in quotes or null", '" "'));
    expect(wrong('"reportAt": { "age": [] }')).toEqual(bad("reportAt.age", "a list of values", "an empty list"));
    expect(wrong('"missing": { "only": "x" }')).toEqual(bad("missing.only", "a list of marks in quotes", '"x"'));
  });
  test("a form is a word, a polynomial or a spline, each inside its limits", () => {
    const form = (text: string) => wrong(`"covariates": [{ "column": "a", "form": ${text} }]`);
    for (const good of ['"log"', '"as is"', '{ "polynomial": 2 }', '{ "polynomial": 10 }', '{ "spline": 3 }', '{ "spline": 5 }'])
      expect(form(good), good).toEqual([]);
    for (const bad of ['"Log"', "2", "{}", "null", '{ "polynomial": 1 }', '{ "polynomial": 2.5 }', '{ "spline": 6 }'])
      expect(
        form(bad).map(({ code }) => code),
        bad,
      ).toEqual(["bad-value"]);
    expect(form('{ "polynom": 2 }')).toEqual([{ code: "unknown-key", key: "polynom", nearest: "polynomial" }]);
    expect(form('{ "spline": 4, "polynomial": 2 }')).toMatchObject([{ code: "unknown-key" }]);
  });
  test("a condition on rows is a range, or levels to leave out, or the only levels", () => {
    const keep = (text: string) =>
      wrong(`"keep": [{ "column": "age"${text} }]`).map((problem) => [problem.code, "key" in problem && problem.key]);
    for (const good of [
      ', "from": 18',
      ', "from": 18, "to": 18',
      ', "to": "2024-01-31"',
      ', "not": ["pilot"]',
      ', "only": [1, 2]',
    ])
      expect(keep(good), good).toEqual([]);
    expect(keep("")).toEqual([["bad-value", "keep[0]"]]);
    expect(keep(', "from": 1, "only": ["a"]')).toEqual([["bad-value", "keep[0]"]]);
    expect(keep(', "not": []')).toEqual([["bad-value", "keep[0].not"]]);
    expect(keep(', "from": 80, "to": 18')).toEqual([["bad-value", "keep[0].to"]]);
  });
  test("a key stated twice is a problem at the second place", () => {
    expect(problems(`${START},\n "level": 0.9,\n "level": 0.8 }`)).toMatchObject([{ code: "bad-value", key: "level", line: 3 }]);
  });
  test("data is a path relative to the plan", () => {
    for (const path of ["/etc/a.csv", "C:\\a.csv", "C:a.csv", "\\\\server\\a.csv", "file:///a.csv", "https://a.example/a.csv"])
      expect(problems(START.replace('"a.csv"', JSON.stringify(path)) + "}"), path).toMatchObject([
        { code: "bad-value", key: "data", line: 1 },
      ]);
  });
  test("what is no JSON is told at the place where it stops being it", () => {
    const first = (text: string) => problems(text)[0];
    expect(first("")).toMatchObject({ code: "bad-json", detail: "it is empty", line: 1 });
    expect(first(`${START},\n "level" 0.9 }`)).toMatchObject({
      code: "bad-json",
      detail: "a colon is expected here",
      line: 2,
      character: 10,
    });
    expect(first(`${START},\n "level": high }`)).toMatchObject({
      code: "bad-json",
      detail: "a word here is not in quotes",
      line: 2,
    });
    expect(first(`${START}`)).toMatchObject({ code: "bad-json", detail: "a closing brace } is missing" });
    expect(first("[".repeat(200_000))).toMatchObject({ code: "bad-json", detail: "it is nested too deeply" });
    expect(first('"heating.csv"')).toMatchObject({ code: "bad-value", expected: "an object in braces" });
    expect(first(" ".repeat(PLAN_LIMIT + 1))).toMatchObject({ code: "too-large", limit: PLAN_LIMIT });
  });
  test("no text at all makes it throw, and a refusal always has a reason with a line", () => {
    const fragments = fc.constantFrom(
      "{",
      "}",
      "[",
      "]",
      ",",
      ":",
      '"',
      '"data"',
      '"outcome"',
      '"column"',
      "null",
      "1e9",
      "//",
      "/*",
      "\n",
      "\\u12",
      " ",
    );
    fc.assert(
      fc.property(
        fc.oneof(
          fc.string(),
          fc.array(fragments, { maxLength: 30 }).map((all) => all.join("")),
        ),
        (text) => {
          const parsed = parsePlan(text, FILE);
          if (parsed.ok) return;
          expect(parsed.problems.length).toBeGreaterThan(0);
          const lines = text.split(/\r\n|\r|\n/).length;
          for (const { line } of parsed.problems) expect(line! >= 1 && line! <= lines).toBe(true);
        },
      ),
      { seed: 41, numRuns: 500 },
    );
  });
});
