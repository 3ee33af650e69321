import { dirname, isAbsolute, relative, resolve, sep } from "node:path";
import { blockText, originOf } from "../report/writeup/block";
import type { Arguments } from "./arguments";
import type { Said } from "./compare";
import { dateOf } from "./date";
import { documentPath } from "./document";
import { hashOf, sourceOf } from "./source";
import { Refusal } from "./refusal";
import { say } from "./sentences";

/** A new block of a plan, for a document's folder (`--for`) or the current one. @throws Refusal where the input cannot be used */
export function runBlock({ positionals: [plan], values }: Arguments): Said {
  const document = values.get("for") as string | undefined;
  const folder = document === undefined ? process.cwd() : dirname(resolve(documentPath(document)));
  const path = relative(folder, resolve(plan));
  if (isAbsolute(path)) throw new Refusal(say.otherDrive(plan));
  const source = sourceOf(plan);
  if (!source.ok) throw new Refusal(source.why);
  const origin = originOf(source, path.split(sep).join("/"), dateOf(new Date(), process.env["SOURCE_DATE_EPOCH"]));
  return { out: `${blockText(source, origin, hashOf)}\n`, aside: "" };
}
