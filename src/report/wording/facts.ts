import type { Comparison } from "../../engine/comparison";
import type { Plan } from "../../engine/plan";
import { count, pValue, significant } from "../digits";
import { columnName, listed, rowsName } from "../names";

/** "errors CR2 by block", "errors HC3, weighted by size". */
export function sayErrors({ question }: Comparison, plan: Plan): string {
  const clustered = question.variance === "CR1" || question.variance === "CR2";
  const by = clustered && question.cluster ? ` by ${columnName(question.cluster, plan)}` : "";
  const weighted = question.weights ? `, weighted by ${columnName(question.weights, plan)}` : "";
  return `errors ${question.variance}${by}${weighted}`;
}

/** The joint test of several groups in the reported set; null where there is none. */
export function sayJoint({ sets, reported, question }: Comparison, plan: Plan): string | null {
  const { joint } = sets[reported];
  if (!joint) return null;
  const [df1, df2] = joint.df;
  return `All groups of ${columnName(question.exposure, plan)} together: F(${significant(df1)}, ${significant(df2, 4)}) = ${significant(joint.statistic)}, ${pValue(joint.p)}.`;
}

/** "1,201 of 1,224 flats were used; left out: 10 without kwh, 11 without floor_m2." */
export function sayRows({ rows, question }: Comparison, plan: Plan): string {
  const name = rowsName(plan);
  if (rows.common === rows.read) return `All ${count(rows.read)} ${name} were used.`;
  const kept = new Set((plan.keep ?? []).map((k) => k.column));
  const lost = rows.droppedBy.map(({ column, rows: lostRows }) => {
    const why = kept.has(column)
      ? "by the plan's limits on"
      : column === question.weights
        ? "without a weight above 0 in"
        : "without";
    return `${count(lostRows)} ${why} ${columnName(column, plan)}`;
  });
  return `${count(rows.common)} of ${count(rows.read)} ${name} were used; left out: ${listed(lost)}.`;
}
