import type { VariesReadout } from "../comparison";
import { averageOver } from "./average";
import { crossingOf, straightOf } from "./crossing";
import { fitInteraction } from "./fit";
import { profilesOf } from "./profiles";
import { regionsOf } from "./regions";
import { testSlopes } from "./test";
import type { InteractionFit, SlopesInput, SlopesOutcome } from "./types";

export type { InteractionFit, SlopesInput, SlopesOutcome } from "./types";

/**
 * Is there one effect in this set at all (METHODS 5)? Tests every modifier; where slopes differ, gives what there is instead: differences at
 * stated values, the crossing, the regions. Nothing here carries a common slope.
 */
export function readSlopes(input: SlopesInput): SlopesOutcome {
  const { tests, findings } = testSlopes(input);
  const differing = tests.filter((t) => t.verdict === "differ").map((t) => t.modifier);
  if (differing.length === 0) {
    const kind = tests.some((t) => t.verdict === "cannot tell") ? "undecided" : "single";
    return { tests, kind, differing, varies: null, findings };
  }
  const joint = fitInteraction(input, differing);
  return { tests, kind: "varies", differing, varies: { perContrast: readContrasts(input, joint), joint }, findings };
}

function readContrasts({ design, level, reportAt, average }: SlopesInput, joint: InteractionFit): (VariesReadout | null)[] {
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
