import { expect, test } from "vitest";
import { describeColumns } from "../../src/plan/describe";
import { sayRoles } from "../../src/report/wording/role";
import { csvOf, flats, tableOf } from "./tables";

test("every column is described in file order, with its kind, missing cells and levels", () => {
  const described = describeColumns(flats).map(({ name, kind, missing, levels }) => [name, kind, missing, levels]);
  expect(described).toEqual([
    ["flat_id", "category", 0, 12],
    ["retrofit", "category", 0, 2],
    ["floor_m2", "number", 0, null],
    ["tenure", "category", 0, 3],
    ["built", "date", 0, null],
    ["kwh", "number", 0, null],
    ["block", "category", 0, 4],
  ]);
});

test("words are no outcome unless there are two of them, and too many of them stand in no role", () => {
  const table = tableOf(
    csvOf(500, {
      two: (i) => "ab"[i % 2],
      three: (i) => "abc"[i % 3],
      towns: (i) => `t${i % 60}`,
      streets: (i) => `s${i % 201}`,
      n: (i) => (i % 7 ? i : ""),
    }),
  );
  const roles = describeColumns(table).map(({ name, missing, notOutcome, notExposure, notCovariate }) =>
    [name, missing, ...[notOutcome, notExposure, notCovariate].map((reason) => reason?.code ?? "")].join(" "),
  );
  expect(roles).toEqual([
    "two 0   ",
    "three 0 words  ",
    "towns 0 words too-many-groups ",
    "streets 0 words too-many-groups too-many-groups",
    "n 72   ",
  ]);
});

test("a column without cells, or with one value, stands in no role and says why", () => {
  const table = tableOf(csvOf(5, { empty: () => "", one: () => 4, word: () => "a", x: (i) => i }));
  const [empty, one, word, x] = describeColumns(table).map(sayRoles);
  expect([empty.notOutcome, empty.notExposure, empty.notCovariate]).toEqual(Array(3).fill("no filled cells"));
  expect([one.notOutcome, word.notExposure, word.notCovariate]).toEqual(Array(3).fill("one value only"));
  expect([x.notOutcome, x.notExposure, x.notCovariate]).toEqual([null, null, null]);
});
