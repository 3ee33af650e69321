import type { Comparison, ContrastResult, SetResult } from "./comparison";
import type { Finding } from "./findings";

/**
 * The last guard of the engine: numbers that overflowed on the way (values near 1e300, say) become null where the type allows, and a readout
 * whose estimate is one of them becomes `none`, with a finding. A comparison without such numbers is returned as it is.
 */
export function finiteComparison(comparison: Comparison): Comparison {
  if (isFinite(comparison)) return comparison;
  const findings: Finding[] = [...comparison.findings];
  const sets = comparison.sets.map((set, index): SetResult => {
    if (isFinite(set)) return set;
    findings.push({ code: "standard-error-missing", set: index, why: "not-finite" });
    return {
      ...set,
      contrasts: set.contrasts.map(finiteContrast),
      joint: isFinite(set.joint) ? set.joint : null,
      slopes: set.slopes.map((s) =>
        isFinite(s) ? s : { ...s, statistic: null, df: null, p: null, pHolm: null, change: null, verdict: "cannot tell" },
      ),
      model: set.model
        .filter((row) => Number.isFinite(row.estimate))
        .map((row) => ({ ...row, standardError: orNull(row.standardError) })),
    };
  });
  return { ...comparison, sets, findings };
}

function finiteContrast(contrast: ContrastResult): ContrastResult {
  if (isFinite(contrast)) return contrast;
  const { readout } = contrast;
  const none = { ...contrast, readout: { kind: "none", reason: { code: "not-finite" } }, fromRows: null } as const;
  if (readout.kind === "varies" || readout.kind === "none" || !Number.isFinite(readout.estimate)) return none;
  const bare = { estimate: readout.estimate, standardError: null, df: null, interval: null, p: null };
  if (readout.kind === "plain") return { ...contrast, readout: { ...readout, ...bare }, fromRows: null };
  return { ...contrast, readout: { ...readout, ...bare, shift: null, change: null }, fromRows: null };
}

function orNull(value: number | null): number | null {
  return value !== null && Number.isFinite(value) ? value : null;
}

/** Whether every number inside is finite. */
function isFinite(value: unknown): boolean {
  if (typeof value === "number") return Number.isFinite(value);
  if (Array.isArray(value)) return value.every(isFinite);
  if (value !== null && typeof value === "object") return Object.values(value).every(isFinite);
  return true;
}
