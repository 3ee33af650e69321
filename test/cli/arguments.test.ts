import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { readArguments } from "../../src/cli/arguments";
import { compareHelp, helpOf, PROGRAM_HELP } from "../../src/cli/help";
import { splitList } from "../../src/cli/list";
import { COMMANDS, OPTIONS } from "../../src/cli/options";
import type { Command } from "../../src/cli/options";
import { Refusal } from "../../src/cli/refusal";

const values = (...args: string[]) => Object.fromEntries(readArguments(["compare", "a.csv", ...args]).values);
const refused = (...args: string[]): string => {
  try {
    readArguments(["compare", "a.csv", ...args]);
  } catch (error) {
    if (error instanceof Refusal) return error.message;
    throw error;
  }
  return "";
};

describe("a list", () => {
  test("is parted by commas, each item trimmed", () => {
    expect(splitList("a, b ,c d")).toEqual(["a", "b", "c d"]);
    expect(splitList("")).toEqual([]);
    expect(splitList("a,,b")).toEqual(["a", "", "b"]);
  });
  test("holds a comma or a backslash inside a name where a backslash stands before it", () => {
    expect(splitList("rent\\, cold,b")).toEqual(["rent, cold", "b"]);
    expect(splitList("a\\\\,b")).toEqual(["a\\", "b"]);
    expect(splitList("C:\\dir,b")).toEqual(["C:\\dir", "b"]);
  });
  test("gives back any names that were written as they should be", () => {
    const name = fc.string({ minLength: 1 }).filter((text) => text === text.trim() && text !== "");
    fc.assert(
      fc.property(fc.array(name, { minLength: 1, maxLength: 5 }), (names) => {
        expect(splitList(names.map((text) => text.replace(/[\\,]/g, "\\$&")).join(","))).toEqual(names);
      }),
      { seed: 2 },
    );
  });
});

describe("the options of compare", () => {
  test("come as what they are: names, lists, numbers and words", () => {
    expect(values("--outcome", "kwh", "--covariates", "a,b", "--margin", "150", "--variance", "hc3", "--as=json")).toEqual({
      outcome: "kwh",
      covariates: ["a", "b"],
      margin: 150,
      variance: "HC3",
      as: "json",
    });
  });
  test("a list may be given in several options, and may be empty", () => {
    expect(values("--covariates", "a,b", "--covariates", "c")).toEqual({ covariates: ["a", "b", "c"] });
    expect(values("--covariates", "")).toEqual({ covariates: [] });
  });
  test("a value may begin with a dash", () => {
    expect(values("--reference", "-1", "--missing", "-99", "--outcome=--odd")).toEqual({
      reference: "-1",
      missing: ["-99"],
      outcome: "--odd",
    });
  });
  test("may stand before the file, after it, or before the command", () => {
    expect(readArguments(["--margin", "3", "compare", "--per", "2", "a.csv"])).toMatchObject({
      positionals: ["compare", "a.csv"],
    });
    expect(readArguments(["compare", "--", "--a.csv"]).positionals).toEqual(["compare", "--a.csv"]);
    expect([readArguments(["-h"]).help, readArguments(["--version"]).version]).toEqual([true, true]);
  });
  test("a mistake is told in one sentence that names the option", () => {
    expect(refused("--covariate", "a")).toBe(
      "There is no option --covariate; the nearest is --covariates. slantwise compare --help lists them.",
    );
    expect(refused("-x")).toBe("There is no option -x. slantwise compare --help lists them.");
    expect(refused("--margin")).toBe("--margin needs a value: --margin N");
    expect(refused("--margin", "--as", "json")).toBe("--margin needs a value: --margin N");
    expect(refused("--outcome", " ")).toBe("--outcome needs a value: --outcome C");
    expect(refused("--margin", "-5")).toBe('--margin must be a number above 0, not "-5".');
    expect(refused("--level", "95")).toBe('--level must be a number between 0 and 1, not "95".');
    for (const odd of ["0x10", "1e999", "NaN", "1,5", "Infinity"])
      expect(refused("--per", odd)).toContain("--per must be a number above 0");
    expect(refused("--as", "html")).toBe('--as must be text, markdown, json or csv, not "html".');
    expect(refused("--exposure-kind", "group")).toBe('--exposure-kind must be groups or amount, not "group".');
    expect(refused("--outcome", "a", "--outcome", "b")).toBe("--outcome is given twice; it can have one value.");
    expect(refused("--covariates", "a,,b")).toContain("--covariates has an empty name in its list");
    expect(refused("--help=yes")).toBe("--help takes no value.");
  });
});

describe("the help", () => {
  test("names every option once, on lines that fit a terminal", () => {
    const help = compareHelp();
    for (const { name } of OPTIONS) expect(help.match(new RegExp(`^  --${name} `, "gm"))?.length, name).toBe(1);
    const long = `${help}${PROGRAM_HELP}`.split("\n").filter((line) => line.length > 130);
    expect(long).toEqual([]);
  });
  test("offers only what there is", () => {
    expect([...new Set(PROGRAM_HELP.match(/slantwise [a-z]+/g))].sort()).toEqual(
      Object.keys(COMMANDS)
        .map((name) => `slantwise ${name}`)
        .sort(),
    );
    for (const name of Object.keys(COMMANDS) as Command[]) expect(helpOf(name)).toMatch(new RegExp(`^slantwise ${name} `));
  });
});
