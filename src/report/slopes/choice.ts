import type { Comparison } from "../../engine/comparison";
import type { FigureChoice } from "../../engine/figure/types";
import type { SlopesChoice } from "./presentation";

/**
 * What is looked at: what was asked for where the comparison still has it, else the reported set, its first modifier whose slopes differ, or the
 * one with the smallest p, and the first contrast.
 */
export function chosenOf({ sets, reported, question }: Comparison, asked: SlopesChoice): FigureChoice {
  const set = asked.set !== null && asked.set < sets.length ? asked.set : reported;
  const contrast = asked.contrast !== null && asked.contrast < sets[set].contrasts.length ? asked.contrast : 0;
  const wanted = asked.modifier !== null && question.modifiers.includes(asked.modifier) ? asked.modifier : null;
  return { set, modifier: wanted ?? tellingModifier(question.modifiers, sets[set].slopes), contrast };
}

function tellingModifier(modifiers: readonly string[], tests: Comparison["sets"][number]["slopes"]): string | null {
  const differing = tests.find((test) => test.verdict === "differ");
  if (differing) return differing.modifier;
  const tested = tests.filter((test) => test.p !== null);
  if (tested.length === 0) return modifiers[0] ?? null;
  return tested.reduce((least, test) => (test.p! < least.p! ? test : least)).modifier;
}
