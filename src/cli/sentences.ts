/** What the command line says of its own: how it was called, and where its answer goes. Data and results are said by report/wording. */
export const say = {
  noCommand: "Name a command, as in: slantwise compare FILE.csv (slantwise --help says more).",
  unknownCommand: (word: string) =>
    `There is no command ${quoted(word)}; the one there is: slantwise compare FILE (slantwise --help says more).`,
  fileForCommand: (file: string) => `To compare a file, name the command first: slantwise compare ${file}`,
  noFile: "Name a .csv or a .slantwise.json to compare, as in: slantwise compare FILE.csv",
  severalFiles: (files: readonly string[]) =>
    `One file is compared at a time; these are ${files.length}: ${files.slice(0, 3).join(", ")}${files.length > 3 ? ", …" : ""}. A name with spaces goes in quotes.`,
  planName: (file: string) => `A plan's name ends in .slantwise.json; ${file} does not.`,
  unknownOption: (option: string, nearest: string | null) =>
    `There is no option ${option}${nearest ? `; the nearest is --${nearest}` : ""}. slantwise compare --help lists them.`,
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
