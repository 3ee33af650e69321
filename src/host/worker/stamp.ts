import type { Stats } from "node:fs";
import type { Outcome, Stamp } from "./messages";

export function stampOf(stats: Stats): Stamp {
  return { size: stats.size, mtimeMs: stats.mtimeMs, ctimeMs: stats.ctimeMs, ino: stats.ino };
}

/** True where two looks saw the same file in the same state; two absent files are alike. */
export function sameStamp(a: Stamp | null, b: Stamp | null): boolean {
  if (a === null || b === null) return a === b;
  return a.size === b.size && a.mtimeMs === b.mtimeMs && a.ctimeMs === b.ctimeMs && a.ino === b.ino;
}

/** The state of the file an outcome is about; null where none was read. */
export function stampIn(outcome: Outcome): Stamp | null {
  if (outcome.kind === "compared") return outcome.result.stamp;
  return outcome.kind === "same" || outcome.kind === "problem" ? outcome.stamp : null;
}
