import { byColumn, choice, keyed, list, namesIn, nothing, number, object, oneOf, refuse, words } from "./shape";
import type { Shape } from "./shape";

/** Everything a plan file may hold: engine/plan.ts as a checker. plan.schema.json says the same to editors; a test holds them together. */

const column = words("the name of a column");
const columns = list(column, "a list of column names");
const positive = number("a number above 0", (value) => value > 0);
const inside = number("a number between 0 and 1", (value) => value > 0 && value < 1);
const anyNumber = number("a number", () => true);
const level = oneOf(words("the name of a level"), anyNumber);
const text = words("some words");

const form = oneOf(
  choice("as is", "log", "category"),
  keyed(
    "polynomial",
    number("a whole number from 2 to 10", (value) => Number.isInteger(value) && value >= 2 && value <= 10),
    '{ "polynomial": 2 }',
  ),
  keyed(
    "spline",
    number("3, 4 or 5 (knots)", (value) => [3, 4, 5].includes(value)),
    '{ "spline": 4 }',
  ),
);

const covariate = object(
  'an object such as { "column": "age" }',
  {
    column,
    form,
    timing: choice("before", "after", "unsure"),
    reason: text,
    label: text,
    reference: level,
  },
  ["column"],
);

const bound = oneOf(anyNumber, words("a date"));
const levels = list(level, "a list of levels", 1);
const keepShape = object(
  'an object such as { "column": "age", "from": 18 }',
  { column, from: bound, to: bound, not: levels, only: levels },
  ["column"],
);

const keep: Shape = {
  ...keepShape,
  read(node, key, report) {
    const read = keepShape.read(node, key, report) as { from?: unknown; to?: unknown } | undefined;
    if (!read) return read;
    const names = namesIn(node).filter((name) => name !== "column");
    const ways = [names.includes("from") || names.includes("to"), names.includes("not"), names.includes("only")].filter(
      Boolean,
    ).length;
    const expected = "a column with from and to, or with not, or with only";
    if (ways > 1) report({ code: "bad-value", key, expected, found: "several of these" }, node);
    else if (names.length === 0) report({ code: "bad-value", key, expected, found: "a column alone" }, node);
    const { from, to } = read;
    if (typeof from === "number" && typeof to === "number" && from > to)
      report({ code: "bad-value", key: `${key}.to`, expected: `${from} (its from) or more`, found: String(to) }, node);
    return read;
  },
};

const data: Shape = {
  ...words("the path of a CSV"),
  read(node, key, report) {
    const path = words("the path of a CSV").read(node, key, report);
    const absolute = typeof path === "string" && /^([\\/]|[a-z]:|[a-z][a-z0-9+.-]*:\/\/)/i.test(path);
    return absolute ? refuse(node, key, ["a path relative to the plan"], report) : path;
  },
};

export const planShape = object(
  "an object in braces",
  {
    $schema: { expected: ["a schema"], fits: () => true, read: () => undefined },
    data,
    design: choice("randomised", "observational"),
    outcome: object(
      'an object such as { "column": "kwh" }',
      { column, unit: text, label: text, kind: choice("amount", "binary", "count"), form: choice("as is", "log") },
      ["column"],
    ),
    exposure: object(
      'an object such as { "column": "retrofit" }',
      { column, label: text, unit: text, reference: level, per: positive, kind: choice("groups", "amount") },
      ["column"],
    ),
    covariates: list(covariate, 'a list such as [{ "column": "age" }]'),
    always: columns,
    sets: oneOf(choice("each", "steps", "every"), list(columns, "a list of lists of column names")),
    report: columns,
    modifiers: columns,
    margin: oneOf(positive, nothing),
    slopesAlpha: inside,
    reportAt: byColumn(list(level, "a list of values", 1), 'an object such as { "age": [30, 60] }'),
    average: oneOf(words('"all rows" or the name of a group'), nothing),
    cluster: oneOf(column, nothing),
    weights: oneOf(column, nothing),
    variance: oneOf(choice("classical", "HC0", "HC1", "HC2", "HC3", "CR1", "CR2"), nothing),
    level: inside,
    missing: oneOf(
      list(words("a mark"), "a list of marks in quotes"),
      keyed("only", list(words("a mark"), "a list of marks in quotes"), 'such a list as { "only": [...] }'),
    ),
    id: columns,
    keep: list(keep, 'a list such as [{ "column": "age", "from": 18 }]'),
    rowsAre: text,
    script: text,
  },
  ["data", "outcome", "exposure"],
);
