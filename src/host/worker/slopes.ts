import { slopesFigure } from "../../engine/figure";
import { chosenOf } from "../../report/slopes/choice";
import { slopesSection } from "../../report/slopes/section";
import type { SlopesSection } from "../../protocol";
import type { KeptComparison } from "./compare";
import type { SlopesRequest } from "./messages";
import type { Readings } from "./readings";

/**
 * The Slopes section of a kept comparison, from the columns it was made of.
 * @returns null where the comparison asked about is not the one kept, or its columns have given way to a newer reading
 * @throws Cancelled
 */
export function runSlopes(
  { of, choice, cancel }: SlopesRequest,
  kept: KeptComparison | undefined,
  path: string | undefined,
  readings: Readings,
): SlopesSection | null {
  if (kept?.run !== of || path === undefined) return null;
  const { comparison, plan, missing } = kept;
  const table = readings.held(path, missing, comparison.source.sha256);
  if (!table) return null;
  const flag = new Int32Array(cancel);
  const chosen = chosenOf(comparison, choice);
  const figure = slopesFigure(table, plan, comparison, chosen, () => Atomics.load(flag, 0) !== 0);
  return slopesSection(comparison, plan, chosen, figure);
}
