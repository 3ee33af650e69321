/** What the command line says of its own: how it was called, and where its answer goes. Data and results are said by report/wording. */
export const say = {
  noCommand: "Name a command, as in: slantwise compare FILE.csv (slantwise --help says more).",
  unknownCommand: (word: string) =>
    `There is no command ${quoted(word)}; there are compare, block, check and refresh (slantwise --help says more).`,
  fileForCommand: (file: string) => `To compare a file, name the command first: slantwise compare ${file}`,
  noFile: "Name a .csv or a .slantwise.json to compare, as in: slantwise compare FILE.csv",
  noPlan: "Name the plan a block is made from, as in: slantwise block PLAN.slantwise.json",
  noDocument: (command: string) => `Name a document, as in: slantwise ${command} DOC.md`,
  notDocument: (file: string) => `${file}: a document's name ends in .md, .markdown, .qmd, .Rmd or .ipynb; this one is not read.`,
  notNotebook: (file: string) => `${file}: this is no notebook of format 4; save it anew with a current program.`,
  notUtf8: (file: string) => `${file}: the text is not UTF-8; save the document as UTF-8.`,
  readOnly: "it is read-only",
  changedMeanwhile: (file: string) => `${file} was changed while it was being read, and is left as it is; run this again.`,
  otherDrive: (plan: string) => `${plan} cannot be named relative to the document; keep both on one drive.`,
  nothingThere: "no write-up block and no inline number",
  severalFiles: (files: readonly string[]) =>
    `One file is compared at a time; these are ${files.length}: ${files.slice(0, 3).join(", ")}${files.length > 3 ? ", …" : ""}. A name with spaces goes in quotes.`,
  planName: (file: string) => `A plan's name ends in .slantwise.json; ${file} does not.`,
  unknownOption: (option: string, nearest: string | null, command: string) =>
    `There is no option ${option}${nearest ? `; the nearest is --${nearest}` : ""}. slantwise ${command} --help lists them.`,
  noValue: (name: string, value: string) => `--${name} needs a value: --${name} ${value}`,
  valueForFlag: (name: string) => `--${name} takes no value.`,
  twice: (name: string) => `--${name} is given twice; it can have one value.`,
  badValue: (name: string, expected: string, found: string) => `--${name} must be ${expected}, not ${quoted(found)}.`,
  emptyItem: (name: string) =>
    `--${name} has an empty name in its list; names are separated by one comma, and a comma inside a name is written \\,`,
  categoryOutside: (column: string) =>
    `--category names ${column}, which is not among the covariates; name it in --covariates too.`,
  guessed: (roles: readonly string[]) => `Guessed: ${roles.join("; ")}. Name them to be sure.`,
  badEpoch: (found: string) => `SOURCE_DATE_EPOCH must be a whole number of seconds, not ${quoted(found)}.`,
  overInput: (file: string) => `--to ${file} would overwrite the file that is being read; choose another name.`,
  toFolder: (file: string) => `--to ${file} is a folder; name a file in it.`,
  notWritten: (file: string, why: string) => `${file} could not be written: ${why}.`,
  memory: "The comparison does not fit in memory; a file with fewer rows or columns, or a plan with fewer sets, may.",
  fault: "Slantwise failed; the fault is its own, and nothing was written. Please report these lines:",
} as const;

function quoted(text: string): string {
  return JSON.stringify(text);
}
