import { VALUES } from "./values";

/** One option of a command: how its value is written, and what it does, for the help. */
export interface Option {
  readonly name: string;
  readonly kind: "text" | "list" | "number" | "word";
  /** The value's name in the help. */
  readonly value: string;
  readonly help: string;
  /** The words a `word` may be. */
  readonly words?: readonly string[];
  /** What a `number` must be, and whether it is. */
  readonly number?: { readonly expected: string; readonly holds: (value: number) => boolean };
}

const above = { expected: "a number above 0", holds: (value: number) => value > 0 };
const between = { expected: "a number between 0 and 1", holds: (value: number) => value > 0 && value < 1 };

export const GROUPS: readonly { readonly title: string; readonly options: readonly Option[] }[] = [
  {
    title: "The question",
    options: [
      { name: "outcome", kind: "text", value: "C", help: "column that is measured" },
      { name: "exposure", kind: "text", value: "C", help: "column of groups, or an amount, whose part is asked for" },
      { name: "covariates", kind: "list", value: "A,B", help: 'columns to hold fixed; "" for none' },
      { name: "reference", kind: "text", value: "L", help: "group the others are compared with" },
      { name: "per", kind: "number", value: "N", help: "step of an amount a difference is stated for (1)", number: above },
      { name: "margin", kind: "number", value: "N", help: "difference that would matter, in the outcome's units", number: above },
      { name: "outcome-kind", kind: "word", value: "K", help: "amount, binary or count", words: VALUES.outcomeKinds },
      { name: "exposure-kind", kind: "word", value: "K", help: "groups or amount", words: VALUES.exposureKinds },
      { name: "category", kind: "list", value: "A,B", help: "covariates whose numbers are names of categories" },
    ],
  },
  {
    title: "What to compare",
    options: [
      {
        name: "sets",
        kind: "word",
        value: "each|steps|every",
        help: "each alone and all together (default), one more at a time, or every combination",
        words: VALUES.sets,
      },
      { name: "always", kind: "list", value: "A,B", help: "columns held fixed in every set" },
      { name: "report", kind: "list", value: "A,B", help: "set the headline reads (the widest)" },
      { name: "modifiers", kind: "list", value: "A,B", help: "columns along which slopes are tested (all covariates)" },
    ],
  },
  {
    title: "Uncertainty",
    options: [
      { name: "cluster", kind: "text", value: "C", help: "column that says which rows belong together" },
      { name: "weights", kind: "text", value: "C", help: "column of sampling or precision weights" },
      {
        name: "variance",
        kind: "word",
        value: "K",
        help: "classical, HC0 to HC3, CR1 or CR2 (HC3; CR2 with a cluster)",
        words: VALUES.variances,
      },
      { name: "level", kind: "number", value: "N", help: "confidence level (0.95)", number: between },
      { name: "slopes-alpha", kind: "number", value: "N", help: "level of the slopes tests (0.05)", number: between },
    ],
  },
  {
    title: "The file",
    options: [
      { name: "missing", kind: "list", value: "M,N", help: "more marks of missing cells, beside NA, empty and the like" },
    ],
  },
  {
    title: "The answer",
    options: [
      { name: "as", kind: "word", value: "text|markdown|json|csv", help: "how to write it (text)", words: VALUES.formats },
      { name: "to", kind: "text", value: "FILE", help: "file to write it to, instead of the terminal" },
    ],
  },
];

export const OPTIONS: readonly Option[] = GROUPS.flatMap(({ options }) => options);

/** The path a new block is written for. */
export const BLOCK_OPTIONS: readonly Option[] = [
  { name: "for", kind: "text", value: "DOC.md", help: "document the block is for: the plan's path is written relative to it" },
];

/** What each command takes. */
export const COMMANDS = {
  compare: { options: OPTIONS, flags: [] },
  block: { options: BLOCK_OPTIONS, flags: [] },
  check: { options: [], flags: [] },
  refresh: { options: [], flags: ["overwrite-edits"] },
} as const satisfies Record<string, { readonly options: readonly Option[]; readonly flags: readonly string[] }>;

export type Command = keyof typeof COMMANDS;

export const isCommand = (word: string | undefined): word is Command => word !== undefined && Object.hasOwn(COMMANDS, word);
