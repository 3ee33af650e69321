/** The order in which a plan's keys are written, by the object they stand in; keys that are not named follow as they come. */
const PLAN = [
  "data",
  "design",
  "outcome",
  "exposure",
  "covariates",
  "always",
  "sets",
  "report",
  "modifiers",
  "margin",
  "slopesAlpha",
  "reportAt",
  "average",
  "cluster",
  "weights",
  "variance",
  "level",
  "missing",
  "id",
  "keep",
  "rowsAre",
  "script",
];
const COLUMN = ["column", "form", "timing", "reason", "label", "unit", "kind", "reference", "per", "from", "to", "not", "only"];

/** Place of a key among its siblings: one that comes later is written further down. `depth` 0 is the plan itself. */
export function rankOf(key: string, depth: number): number {
  const at = (depth === 0 ? PLAN : COLUMN).indexOf(key);
  return at < 0 ? PLAN.length + COLUMN.length : at;
}
