import type { Comparison, ContrastResult, SingleReadout } from "../../engine/comparison";
import type { Reason } from "../../engine/findings";
import type { Plan } from "../../engine/plan";
import type { Sentence } from "../presentation";
import { word } from "../names";
import { sayChange } from "./change";
import { comparedGroups, decimalsOf, direction, holding, intervalPhrase, voiceOf } from "./difference";
import type { Voice } from "./difference";
import { sayReason } from "./reason";
import { sayAgreement, sayInstead, sayUndecided, sayVaries, sayWaysOn } from "./slopes";

/** The sentences about one set, contrast by contrast: the headline first. */
export function sayReadout(comparison: Comparison, plan: Plan, setIndex: number): Sentence[] {
  const set = comparison.sets[setIndex];
  const sentences = set.contrasts.flatMap((contrast, i) => sayContrast(comparison, plan, setIndex, contrast, i));
  const anyVaries = set.contrasts.find((c) => c.readout.kind === "varies" || c.readout.kind === "plain");
  if (anyVaries) sentences.push({ text: sayWaysOn(voiceOf(comparison, plan, anyVaries)), tone: "caution" });
  if (plan.design !== "randomised" && set.adjustedFor.length > 0 && !set.contrasts.every((c) => c.readout.kind === "none")) {
    sentences.push({ text: "Adjusting cannot remove what was not measured.", tone: "muted" });
  }
  return sentences;
}

function sayContrast(comparison: Comparison, plan: Plan, setIndex: number, contrast: ContrastResult, i: number): Sentence[] {
  const set = comparison.sets[setIndex];
  const voice = voiceOf(comparison, plan, contrast);
  const held = holding(set.adjustedFor, plan);
  const { readout } = contrast;
  switch (readout.kind) {
    case "none":
      return [{ text: sayNone(voice, held, readout.reason), tone: "headline" }];
    case "varies":
      return [
        { text: sayVaries(voice, set, readout.modifiers), tone: "headline" },
        ...sayInstead(voice, readout, held).map((text): Sentence => ({ text, tone: "plain" })),
      ];
    case "plain": {
      const decimals = decimalsOf(voice, readout);
      return [
        { text: sayVaries(voice, set, readout.modifiers), tone: "headline" },
        {
          text: `The plain ${plainName(comparison)} is ${direction(voice, readout.estimate, decimals)} ${comparedGroups(voice)} ${intervalPhrase(voice, readout, decimals)}; it belongs to the rows as they are mixed here.`,
          tone: "plain",
        },
      ];
    }
    case "single":
    case "undecided": {
      const sentences: Sentence[] = [{ text: sayOne(voice, held, readout), tone: "headline" }];
      const base = comparison.sets[0].contrasts[i].readout;
      if (readout.shift && base.kind !== "varies" && base.kind !== "none") {
        const baseHeld = comparison.sets[0].adjustedFor;
        const change = sayChange(voice, readout, base, baseHeld.length === 0 ? "Unadjusted" : `${holding(baseHeld, plan)} only,`);
        if (change) sentences.push({ text: change, tone: "plain" });
      }
      const open = sayUndecided(voice, set) ?? sayAgreement(voice, set);
      if (open) sentences.push({ text: open, tone: readout.kind === "undecided" ? "caution" : "plain" });
      return sentences;
    }
  }
}

/** Why a contrast has no number. */
export function sayNone({ comparison, plan, contrast }: Voice, held: string, reason: Reason): string {
  const difference = contrast.level === null ? "difference" : `difference for ${word(contrast.level)}`;
  return `${held}, no ${comparison.question.kind === "groups" ? difference : "slope"} can be given: ${sayReason(reason, plan)}.`;
}

/** The one estimate of a set that has one. */
export function sayOne(voice: Voice, held: string, readout: SingleReadout): string {
  const decimals = decimalsOf(voice, readout);
  return `${held}, ${sayEstimate(voice, readout.estimate, decimals)} ${intervalPhrase(voice, readout, decimals)}.`;
}

function sayEstimate(voice: Voice, estimate: number, decimals: number): string {
  const { comparison, outcome } = voice;
  const size = direction(voice, estimate, decimals);
  return comparison.question.design === "randomised"
    ? `the estimated effect on ${outcome} is ${size} ${comparedGroups(voice)}`
    : `${outcome} is ${size} ${comparedGroups(voice)}`;
}

/** What the base set's number is called where slopes differ. */
export function plainName({ question }: Comparison): string {
  if (question.kind === "amount") return "unadjusted slope";
  return question.outcomeForm === "log" ? "difference in mean logarithms" : "difference in means";
}
