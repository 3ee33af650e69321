import { randomBytes } from "node:crypto";
import { chmodSync, realpathSync, renameSync, rmSync, statSync, writeFileSync } from "node:fs";
import type { Stats } from "node:fs";
import { basename, dirname, join } from "node:path";
import { Refusal } from "./refusal";
import { reasonOf } from "./read";
import { say } from "./sentences";

/**
 * Writes a file whole or not at all: beside its place first, then by rename. A link is followed; a device or pipe is written straight.
 * @param inputs files that were read, and must not be overwritten
 * @throws Refusal
 */
export function writeFile(path: string, text: string, inputs: readonly string[]): void {
  const before = checkPlace(path, inputs);
  if (before && !before.isFile()) return attempt(path, () => writeFileSync(path, text));
  const target = before ? realpathSync(path) : path;
  const draft = join(dirname(target), `.${basename(target).slice(0, 60)}.${randomBytes(6).toString("hex")}.tmp`);
  try {
    attempt(path, () => {
      writeFileSync(draft, text, { flag: "wx" });
      if (before) chmodSync(draft, before.mode & 0o7777);
      renameSync(draft, target);
    });
  } finally {
    rmSync(draft, { force: true });
  }
}

/**
 * What stands at a place that is to be written to, if anything: known before a long comparison, not after it.
 * @throws Refusal where it is a folder or one of the inputs
 */
export function checkPlace(path: string, inputs: readonly string[]): Stats | undefined {
  const before = attempt(path, () => statusOf(path));
  if (before?.isDirectory()) throw new Refusal(say.toFolder(path));
  if (before && inputs.some((input) => isSame(before, statusOf(input)))) throw new Refusal(say.overInput(path));
  return before;
}

function attempt<T>(path: string, act: () => T): T {
  try {
    return act();
  } catch (error) {
    throw new Refusal(say.notWritten(path, reasonOf(error)));
  }
}

const statusOf = (path: string): Stats | undefined => statSync(path, { throwIfNoEntry: false });

/** Hard and symbolic links and other spellings lead to the same file. */
const isSame = (a: Stats, b: Stats | undefined): boolean => b !== undefined && a.dev === b.dev && a.ino === b.ino;
