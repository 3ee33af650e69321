import { readArguments } from "./arguments";
import { runCompare } from "./compare";
import type { Said } from "./compare";
import { compareHelp, PROGRAM_HELP } from "./help";
import { isPlan } from "./input";
import { Refusal } from "./refusal";
import { say } from "./sentences";
import { versionOf } from "./version";

const COMMAND = "compare";

/** A whole command line (without node and the script). @throws Refusal for exit code 2 */
export function run(args: readonly string[]): Said {
  const parsed = readArguments(args);
  const [command, ...files] = parsed.positionals;
  if (parsed.version) return aloud(`${versionOf()}\n`);
  if (command === undefined) {
    if (parsed.help) return aloud(PROGRAM_HELP);
    throw new Refusal(say.noCommand);
  }
  if (command !== COMMAND)
    throw new Refusal(
      /\.(csv|tsv)$/i.test(command) || isPlan(command) ? say.fileForCommand(command) : say.unknownCommand(command),
    );
  if (parsed.help) return aloud(compareHelp());
  if (files.length === 0) throw new Refusal(say.noFile);
  if (files.length > 1) throw new Refusal(say.severalFiles(files));
  if (/\.jsonc?$/i.test(files[0]) && !isPlan(files[0])) throw new Refusal(say.planName(files[0]));
  return runCompare({ ...parsed, positionals: files });
}

const aloud = (out: string): Said => ({ out, aside: "" });
