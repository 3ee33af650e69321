import { readArguments } from "./arguments";
import { runCompare } from "./compare";
import type { Said } from "./compare";
import { runBlock } from "./block";
import { helpOf, PROGRAM_HELP } from "./help";
import { isPlan } from "./input";
import { isCommand } from "./options";
import { Refusal } from "./refusal";
import { runWriteUps } from "./writeUps";
import { say } from "./sentences";
import { versionOf } from "./version";

/** A whole command line (without node and the script). @throws Refusal for exit code 2 */
export function run(args: readonly string[]): Said {
  const parsed = readArguments(args);
  const [command, ...files] = parsed.positionals;
  if (parsed.version) return aloud(`${versionOf()}\n`);
  if (command === undefined) {
    if (parsed.help) return aloud(PROGRAM_HELP);
    throw new Refusal(say.noCommand);
  }
  if (!isCommand(command))
    throw new Refusal(
      /\.(csv|tsv)$/i.test(command) || isPlan(command) ? say.fileForCommand(command) : say.unknownCommand(command),
    );
  if (parsed.help) return aloud(helpOf(command));
  const given = { ...parsed, positionals: files };
  if (command === "check" || command === "refresh") {
    if (files.length === 0) throw new Refusal(say.noDocument(command));
    return runWriteUps(command, given);
  }
  if (files.length === 0) throw new Refusal(command === "block" ? say.noPlan : say.noFile);
  if (files.length > 1) throw new Refusal(say.severalFiles(files));
  if (!isPlan(files[0]) && (command === "block" || /\.jsonc?$/i.test(files[0]))) throw new Refusal(say.planName(files[0]));
  return command === "block" ? runBlock(given) : runCompare(given);
}

const aloud = (out: string): Said => ({ out, aside: "" });
