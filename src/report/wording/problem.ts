import type { Problem } from "../../engine/findings";
import { count } from "../digits";
import { listed, oneLine, word } from "../names";

/** One sentence for input that cannot be used: where, what, and what to do. */
export function sayProblem(problem: Problem): string {
  const said = what(problem);
  const where = [problem.file && oneLine(problem.file), problem.line && `line ${count(problem.line)}`].filter(Boolean).join(", ");
  return where === "" ? said[0].toUpperCase() + said.slice(1) : `${where}: ${said}`;
}

function what(problem: Problem): string {
  switch (problem.code) {
    case "file-missing":
      return "the file is not there.";
    case "file-unreadable":
      return `the file could not be read: ${oneLine(problem.detail)}.`;
    case "file-empty":
      return "the file is empty.";
    case "no-data-rows":
      return problem.setAside === undefined
        ? "there is a header but no row of data below it."
        : "every row has more cells than the header, so none of them can be read; is the first line the header?";
    case "bad-encoding":
      return "the text is not UTF-8 or UTF-16; save the file as UTF-8.";
    case "open-quote":
      return "a quoted cell starts here and never ends; close the quote.";
    case "stray-quote":
      return "a quoted cell starts here and goes on after its closing quote; a quote inside a quoted cell is written twice.";
    case "too-many-columns":
      return `there are ${count(problem.columns)} columns, more than the ${count(problem.limit)} that can be read; is this a table?`;
    case "too-large":
      return `the file has ${count(problem.bytes)} bytes, more than the ${count(problem.limit)} that can be read.`;
    case "one-column":
      return "there is only one column; a comparison needs an outcome and an exposure.";
    case "bad-json":
      return `this is not valid JSON: ${oneLine(problem.detail)}.`;
    case "unknown-key":
      return `a plan has no key ${word(problem.key)}${nearest(problem.nearest)}`;
    case "bad-value":
      return `${word(problem.key)} must be ${problem.expected}, not ${oneLine(problem.found)}.`;
    case "missing-key":
      return `the plan lacks ${word(problem.key)}.`;
    case "outside-folder":
      return `${word(problem.path)} lies outside the folders that may be read; keep the data inside the workspace or beside the plan.`;
    case "unknown-column":
      return `there is no column ${word(problem.column)} (named as ${role(problem.role)})${nearest(problem.nearest)}`;
    case "unknown-level":
      return `${word(problem.column)} has no level ${word(problem.level)}; it has ${someOf(problem.levels)}.`;
    case "named-twice":
      return problem.roles[0] === problem.roles[1]
        ? `${word(problem.column)} is named twice as ${role(problem.roles[0])}.`
        : `${word(problem.column)} is named as ${listed(problem.roles.map(role))}; a column can have one place in a question.`;
    case "not-numeric":
      return `${word(problem.column)} cannot be ${role(problem.role)}: it holds words (${word(problem.example)}), and ${needs(problem.role)}.`;
    case "too-many-levels":
      return `${word(problem.column)} has ${count(problem.levels)} levels, more than the ${problem.limit} that ${role(problem.role)} can have.`;
    case "negative-weight":
      return `${word(problem.column)} holds a negative weight; weights are 0 or more.`;
    case "cluster-needed":
      return `${problem.variance} errors need a cluster column; name one as cluster, or choose HC3.`;
    case "unknown-set":
      return `the set to report (${listed(problem.columns.map(word))}) is not among the sets listed.`;
    case "too-many-sets":
      return `${count(problem.sets)} sets are more than the ${count(problem.limit)} that one comparison can hold; list the sets that matter.`;
    case "no-outcome":
      return "no column can be the outcome: it needs a column of numbers that vary.";
    case "no-exposure":
      return "no column can be the exposure: it needs a column of two to six groups, or a second column of numbers.";
  }
}

function nearest(name: string | null): string {
  return name === null ? "." : `; did you mean ${word(name)}?`;
}

function someOf(levels: readonly string[]): string {
  const shown = levels.slice(0, 6).map(word);
  return levels.length > shown.length ? `${shown.join(", ")} and ${count(levels.length - shown.length)} more` : listed(shown);
}

function role(name: string): string {
  const words: Record<string, string> = {
    outcome: "the outcome",
    exposure: "the exposure",
    covariate: "a covariate",
    always: "an always-adjusted column",
    set: "a column of a set",
    report: "a column of the reported set",
    modifier: "a modifier",
    cluster: "the cluster",
    weights: "the weights",
    keep: "a column to keep rows by",
    id: "an id",
    reportAt: "a column to report at",
  };
  return words[name] ?? word(name);
}

function needs(name: string): string {
  if (name === "outcome") return "an outcome is numbers or two words";
  if (name === "weights") return "weights are numbers";
  return "this use needs numbers";
}
