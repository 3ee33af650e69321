import type { Design } from "../design/types";
import type { Finding } from "../findings";
import type { Rows } from "../rows/common";
import type { Table } from "../table";
import { estimateOf } from "./estimate";
import type { Judged } from "./result";
import type { SetFit } from "./set";

/** What the fits brought to light, set by set. */
export function findingsOf(table: Table, rows: Rows, design: Design, judged: readonly Judged[]): Finding[] {
  const findings: Finding[] = smallGroups(design);
  const [base] = judged;
  if (base.slopes.kind === "varies" && base.set.columns.length > 0) findings.push({ code: "base-varies" });
  judged.forEach(({ set, slopes }, index) => {
    if (set.reasons.every((reason) => reason !== null)) return;
    for (const aside of set.setAside)
      findings.push({ code: "set-aside", set: index, ...aside, combinationOf: [...aside.combinationOf] });
    if (!set.cov) {
      const why = set.fit.residualDf <= 0 ? "no-residual-df" : "one-cluster";
      findings.push({ code: "standard-error-missing", set: index, why });
    } else if (set.fit.residualSumOfSquares === 0) findings.push({ code: "exact-fit", set: index });
    else if (errorLost(design, set)) findings.push({ code: "standard-error-missing", set: index, why: "not-finite" });
    else if (set.cov.leverageOneRows.length > 0) {
      const lines = set.cov.leverageOneRows.map((row) => table.lines[rows.common[row]]);
      findings.push({ code: "leverage-one", set: index, lines, fallback: set.cov.used === set.cov.kind ? null : "HC1" });
    }
    findings.push(...slopes.findings);
  });
  return findings;
}

/** Whether a contrast that has an estimate has no error for it (values near the ends of double range). */
function errorLost({ contrasts }: Design, set: SetFit): boolean {
  return contrasts.some((contrast, i) => set.reasons[i] === null && estimateOf(set, contrast, 0.95).standardError === null);
}

function smallGroups({ group }: Design): Finding[] {
  if (!group) return [];
  const counts = group.levels.map(() => 0);
  for (const code of group.codes) counts[code]++;
  return group.levels.flatMap((level, i): Finding[] => (counts[i] === 1 ? [{ code: "small-group", level, rows: 1 }] : []));
}
