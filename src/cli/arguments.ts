import { parseArgs } from "node:util";
import { nearestName } from "../plan/nearest";
import { splitList } from "./list";
import { BLOCK_OPTIONS, COMMANDS, isCommand, OPTIONS } from "./options";
import type { Option } from "./options";
import { Refusal } from "./refusal";
import { say } from "./sentences";

/** A command line as understood: values by option name, already of the right kind. */
export interface Arguments {
  readonly positionals: readonly string[];
  readonly help: boolean;
  readonly version: boolean;
  /** Options without a value that were given, beside these two. */
  readonly flags: ReadonlySet<string>;
  readonly values: ReadonlyMap<string, string | number | readonly string[]>;
}

const FLAGS = ["help", "version"];

/** @throws Refusal for an option that is unknown, lacks its value, is given twice or has a value it cannot have */
export function readArguments(args: readonly string[]): Arguments {
  const { tokens, positionals } = parseArgs({
    args: [...args],
    options: {
      ...Object.fromEntries(
        [...OPTIONS, ...BLOCK_OPTIONS].map(({ name }) => [name, { type: "string" as const, multiple: true }]),
      ),
      help: { type: "boolean", short: "h" },
      version: { type: "boolean" },
    },
    allowPositionals: true,
    strict: false, // its own sentences are for programmers
    tokens: true,
  });
  const command = isCommand(positionals[0]) ? positionals[0] : "compare";
  const options: readonly Option[] = COMMANDS[command].options;
  const allFlags = [...COMMANDS[command].flags, ...FLAGS];
  const names = [...options.map(({ name }) => name), ...allFlags];
  /** `--margin --as json`: the value was forgotten. A name that begins with two dashes can be written `--outcome=--name`. */
  const isOption = (text: string): boolean => text.startsWith("--") && names.includes(text.slice(2).split("=")[0]);
  const texts = new Map<string, string[]>();
  const flags = new Set<string>();
  for (const token of tokens) {
    if (token.kind !== "option") continue;
    const { name, rawName, value, inlineValue } = token;
    const option = options.find((each) => each.name === name);
    if (allFlags.includes(name)) {
      if (value !== undefined) throw new Refusal(say.valueForFlag(name));
      flags.add(name);
    } else if (!option) throw new Refusal(say.unknownOption(rawName, nearestName(name, names), command));
    else if (value === undefined || (!inlineValue && isOption(value))) throw new Refusal(say.noValue(name, option.value));
    else texts.set(name, [...(texts.get(name) ?? []), value]);
  }
  const values = new Map<string, string | number | readonly string[]>();
  for (const [name, given] of texts)
    values.set(
      name,
      valueOf(
        options.find((each) => each.name === name)!,
        given,
      ),
    );
  return { positionals, help: flags.has("help"), version: flags.has("version"), flags, values };
}

function valueOf(option: Option, given: readonly string[]): string | number | readonly string[] {
  const { name, kind } = option;
  if (kind === "list") {
    const items = given.flatMap(splitList);
    if (items.includes("")) throw new Refusal(say.emptyItem(name));
    return items;
  }
  if (given.length > 1) throw new Refusal(say.twice(name));
  const text = given[0].trim();
  if (text === "") throw new Refusal(say.noValue(name, option.value));
  if (kind === "word") {
    const word = option.words!.find((each) => each.toLowerCase() === text.toLowerCase());
    if (!word) throw new Refusal(say.badValue(name, oneOf(option.words!), text));
    return word;
  }
  if (kind === "text") return text;
  const number = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(text) ? Number(text) : NaN;
  if (!Number.isFinite(number) || !option.number!.holds(number))
    throw new Refusal(say.badValue(name, option.number!.expected, text));
  return number;
}

const oneOf = (words: readonly string[]): string => `${words.slice(0, -1).join(", ")} or ${words[words.length - 1]}`;
