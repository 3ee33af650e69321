import { GROUPS } from "./options";

export const PROGRAM_HELP = `Slantwise refits a question about a CSV under every adjustment set, on the same rows, and says how far the answer moves.

  slantwise compare FILE.csv|PLAN.slantwise.json [options]
  slantwise compare --help      the options
  slantwise --version           the version

Exit code 0: done. 2: the input cannot be used; one sentence on stderr says why.
`;

const WIDTH = 30;

/** The help of `compare`: every option on a line of its own. */
export function compareHelp(): string {
  const groups = GROUPS.map(({ title, options }) => {
    const lines = options.map(({ name, value, help }) => {
      const left = `  --${name} ${value}`;
      return left.length < WIDTH ? left.padEnd(WIDTH) + help : `${left}\n${" ".repeat(WIDTH)}${help}`;
    });
    return `${title}\n${lines.join("\n")}\n`;
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
