import type { SetResult } from "../comparison";
import type { Reason } from "../findings";
import type { Resolved } from "../question/resolve";

/** A set that has no number for any contrast, for one reason. */
export function emptyResult(resolved: Resolved, adjustedFor: readonly string[], ownRows: number, reason: Reason): SetResult {
  const { exposure } = resolved;
  const names =
    exposure.kind === "amount"
      ? [{ contrast: `per ${exposure.per} ${exposure.column}`, level: null }]
      : exposure.groups.levels
          .filter((level) => level !== exposure.reference)
          .map((level) => ({ contrast: `${level} − ${exposure.reference}`, level }));
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
