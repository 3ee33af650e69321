import type { VariesReadout } from "../comparison";
import { averageOver } from "./average";
import { crossingOf, straightOf } from "./crossing";
import { fitInteractions } from "./fit";
import { profilesOf } from "./profiles";
import { regionsOf } from "./regions";
import { judgeTrials, trialFindings } from "./test";
import { trialsOf } from "./trial";
import type { InteractionFit, SlopesOutcome, SlopesQuestion, SlopesSet } from "./types";

export type { InteractionFit, SlopesOutcome, SlopesQuestion, SlopesSet } from "./types";

/**
 * Is there one effect in each set at all (METHODS 5)? Tests every modifier; where slopes differ, gives what there is instead: differences at
 * stated values, the crossing, the regions. Nothing here carries a common slope.
 * @returns aligned with `sets`
 */
export function readSlopes(question: SlopesQuestion, sets: readonly SlopesSet[]): SlopesOutcome[] {
  const asked = sets.filter(({ estimable }) => estimable);
  const byModifier = question.modifiers.map((modifier) => trialsOf(question, asked, modifier));
  const judged = sets.map((set) => {
    const at = asked.indexOf(set);
    const trials = at < 0 ? [] : byModifier.map((trials) => trials[at]);
    const tests = judgeTrials(question, trials);
    const differing = tests.filter((t) => t.verdict === "differ").map((t) => t.modifier);
    return { set, tests, differing, findings: trialFindings(trials, set.index) };
  });
  const joint = jointFits(question, judged);
  return judged.map(({ tests, differing, findings }, i): SlopesOutcome => {
    const fit = joint.get(i);
    if (!fit) {
      const kind = tests.some((t) => t.verdict === "cannot tell") ? "undecided" : "single";
      return { tests, kind, differing, varies: null, findings };
    }
    return { tests, kind: "varies", differing, varies: { perContrast: readContrasts(question, fit), joint: fit }, findings };
  });
}

/** By position, the joint fit of each set whose slopes differ: those that differ in the same modifiers together. */
function jointFits(
  question: SlopesQuestion,
  judged: readonly { readonly set: SlopesSet; readonly differing: readonly string[] }[],
): Map<number, InteractionFit> {
  const alike = new Map<string, number[]>();
  judged.forEach(({ differing }, i) => {
    if (differing.length === 0) return;
    const key = JSON.stringify(differing);
    alike.set(key, [...(alike.get(key) ?? []), i]);
  });
  const joint = new Map<number, InteractionFit>();
  for (const places of alike.values()) {
    const columns = places.map((i) => judged[i].set.columns);
    fitInteractions(question, columns, judged[places[0]].differing).forEach((fit, k) => joint.set(places[k], fit));
  }
  return joint;
}

function readContrasts({ design, level, reportAt, average }: SlopesQuestion, joint: InteractionFit): (VariesReadout | null)[] {
  const [modifier] = joint.modifiers;
  const values = design.modifierValues.get(modifier)!;
  return design.contrasts.map((contrast) => {
    if (contrast.column < 0) return null;
    const line = straightOf(design, joint, contrast);
    const asked = average === null ? null : averageOver(design, joint, contrast, average, level);
    return {
      kind: "varies",
      modifiers: joint.modifiers,
      profiles: profilesOf(design, joint, contrast, level, reportAt),
      crossing: line && values.kind === "amount" ? crossingOf(line, modifier, values.values, level) : null,
      regions: regionsOf(design, joint, contrast, level),
      ...(asked ? { average: asked } : {}),
    };
  });
}
