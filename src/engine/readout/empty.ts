import type { SetResult } from "../comparison";
import type { Reason } from "../findings";
import type { Resolved } from "../question/resolve";

/** A set that has no number for any contrast, for one reason. */
export function emptyResult(resolved: Resolved, adjustedFor: readonly string[], ownRows: number, reason: Reason): SetResult {
  const { exposure } = resolved;
  const names =
    exposure.kind === "amount"
      ? [{ contrast: `per ${exposure.per} ${exposure.column}`, level: null }]
      : otherLevels(exposure.groups.levels, exposure.reference);
  return {
    adjustedFor,
    ownRows,
    residualDf: 0,
    contrasts: names.map((name) => ({ ...name, readout: { kind: "none", reason }, fromRows: null })),
    joint: null,
    slopes: [],
    model: [],
    setAside: [],
  };
}

/** One contrast a level beyond the reference; where there is none, the exposure itself stands in, so that the reason has its place. */
function otherLevels(levels: readonly string[], reference: string): { contrast: string; level: string | null }[] {
  const others = levels.filter((level) => level !== reference);
  return others.length > 0
    ? others.map((level) => ({ contrast: `${level} − ${reference}`, level }))
    : [{ contrast: reference, level: null }];
}
