import type { Comparison } from "../../engine/comparison";
import type { Plan } from "../../engine/plan";
import { count, fixed, pValue, significant } from "../digits";
import { columnName, listed, rowsName, word } from "../names";
import { withUnit } from "../scale";
import { decimalsOf, voiceOf } from "./difference";

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

/**
 * What the rows alone did to an estimate: the set's own complete rows against the common ones, apart from any shift (METHODS 1). One sentence for
 * each contrast where the two differ and the set has a number on both.
 */
export function sayOwnRows(comparison: Comparison, plan: Plan, index: number): string[] {
  const set = comparison.sets[index];
  const { rows } = comparison;
  return set.contrasts.flatMap((contrast) => {
    const { readout, fromRows } = contrast;
    if (fromRows === null || readout.kind === "varies" || readout.kind === "none") return [];
    const voice = voiceOf(comparison, plan, contrast);
    const decimals = decimalsOf(voice, readout);
    const moved = voice.scale.show(readout.estimate) - voice.scale.show(readout.estimate - fromRows);
    const several = set.contrasts.length > 1 ? ` of ${word(contrast.level ?? contrast.contrast)}` : "";
    const size = withUnit(fixed(moved, decimals, true), voice.scale);
    const lead =
      set.adjustedFor.length === 0
        ? "With nothing held fixed"
        : `With ${listed(set.adjustedFor.map((c) => columnName(c, plan)))} held fixed`;
    return [
      `${lead}, ${count(set.ownRows)} ${rowsName(plan)} are complete; keeping to the ${count(rows.common)} that all sets share changes the ${comparison.question.kind === "groups" ? "difference" : "slope"}${several} by ${size}.`,
    ];
  });
}
