import { BLOCK_OPTIONS, GROUPS } from "./options";
import type { Command, Option } from "./options";

export const PROGRAM_HELP = `Slantwise refits a question about a CSV under every adjustment set, on the same rows, and says how far the answer moves.

  slantwise compare FILE.csv|PLAN.slantwise.json [options]
  slantwise block PLAN.slantwise.json      a write-up block, to be put in a Markdown document
  slantwise check DOC.md …                 whether a document's blocks and inline numbers match their data
  slantwise refresh DOC.md …               rewrites those that do not
  slantwise compare --help                 the options; the same for every command
  slantwise --version                      the version

Exit code 0: done. 1: a write-up does not match its data. 2: the input cannot be used; one sentence on stderr says why.
`;

const WIDTH = 30;

/** The help of `compare`: every option on a line of its own. */
export function compareHelp(): string {
  const groups = GROUPS.map(({ title, options }) => {
    return `${title}\n${options.map(line).join("\n")}\n`;
  });
  return `slantwise compare FILE.csv [options]
slantwise compare PLAN.slantwise.json [options]

Refits one question under every adjustment set and writes the comparison as text, Markdown, JSON or CSV.
Options override the plan. Without a plan, columns that are not named are guessed, and the answer says so: the first column of
two to six groups, the last amount, and at most four others to hold fixed.

${groups.join("\n")}
Lists are separated by commas; a comma inside a name is written \\, and a list may be given in several options.
JSON holds full precision. The date in Markdown is today's, or that of SOURCE_DATE_EPOCH where it is set.

  slantwise compare heating.csv --outcome kwh --exposure retrofit --covariates floor_m2,tenure --margin 150
  slantwise compare heating.slantwise.json --as markdown --to heating.md
`;
}

function line({ name, value, help }: Pick<Option, "name" | "value" | "help">): string {
  const left = `  --${name}${value === "" ? "" : ` ${value}`}`;
  return left.length < WIDTH ? left.padEnd(WIDTH) + help : `${left}\n${" ".repeat(WIDTH)}${help}`;
}

const PLACES = `Documents are .md, .markdown, .qmd, .Rmd and the Markdown cells of .ipynb, in UTF-8. A plan is looked for inside the document's folder or the current one.
`;

const BLOCK_HELP = `slantwise block PLAN.slantwise.json [--for DOC.md]

Writes a comparison as a block of Markdown between two comments that remember the plan, the data and what was printed.

${BLOCK_OPTIONS.map(line).join("\n")}

The date is today's, or that of SOURCE_DATE_EPOCH where it is set.

  slantwise block heating.slantwise.json --for report.md >> report.md
`;

const CHECK_HELP = `slantwise check DOC.md …

Compares every write-up block and inline number with its plan and data, and prints one line for each. Nothing is written.
${PLACES}
Exit code 0: all are fresh, or print the same from changed files. 1: something is stale, was edited by hand, or is an inline number
there is none for. 2: a marker, plan or file of data cannot be used; stderr says which and why.

An inline number is written in the text like this (set, contrast and digits may be left out):
  <!-- slantwise:value plan=heating.slantwise.json set=floor_m2,tenure contrast=full of=estimate digits=0 --><!-- /slantwise:value -->
of is estimate, low, high, shift, rows or p; set= alone is the unadjusted set. A blank in a name is written %20, a comma %2C.
`;

const REFRESH_HELP = `slantwise refresh DOC.md … [--overwrite-edits]

Rewrites the write-up blocks and inline numbers that no longer match their plan and data. Other text stays as it is, byte for byte.
${PLACES}
${line({ name: "overwrite-edits", value: "", help: "rewrites what was edited by hand too" })}

Exit code 0: all are up to date. 1: something edited by hand was left alone, or there is no number for an inline one.
2: something cannot be used or written; the rest is up to date.
`;

/** The help of a command. */
export function helpOf(command: Command): string {
  switch (command) {
    case "compare":
      return compareHelp();
    case "block":
      return BLOCK_HELP;
    case "check":
      return CHECK_HELP;
    case "refresh":
      return REFRESH_HELP;
  }
}
