import type { SlopesTest } from "../comparison";
import type { Finding } from "../findings";
import { marginBounds, within } from "../shift/word";
import { holm } from "./holm";
import type { Trial } from "./trial";
import type { SlopesQuestion } from "./types";

/** The verdict on each modifier of one set: Holm over the modifiers, D against the margin. */
export function judgeTrials({ margin, outcomeForm, alpha }: SlopesQuestion, trials: readonly Trial[]): SlopesTest[] {
  const adjusted = holm(trials.map((t) => (t.exactly ? 0 : (t.test?.p ?? null))));
  const bounds = marginBounds(margin, outcomeForm);
  return trials.map(({ modifier, test, changes, exactly }, i): SlopesTest => {
    const { largest } = changes;
    const inside = bounds !== null && changes.within(bounds);
    const found = largest !== null && adjusted[i] !== null && adjusted[i]! < alpha;
    const small = bounds !== null && largest !== null && within(largest.interval90, bounds);
    const verdict = found && !small ? "differ" : inside ? "agree" : "cannot tell";
    return {
      modifier,
      statistic: test?.statistic ?? null,
      df: test?.df ?? null,
      p: test?.p ?? null,
      pHolm: exactly ? null : adjusted[i],
      change: largest,
      verdict,
    };
  });
}

/** What could not be tested. */
export function trialFindings(trials: readonly Trial[], set: number): Finding[] {
  return trials.flatMap(({ modifier, estimable, changes }): Finding[] => {
    if (!estimable) return [{ code: "interaction-not-estimable", set, modifier }];
    return changes.noSharedRange ? [{ code: "no-shared-range", set, modifier }] : [];
  });
}
