import type { Comparison, ContrastResult, SetResult } from "../engine/comparison";
import type { Plan } from "../engine/plan";
import { sayFinding } from "./wording/finding";
import { sayReason } from "./wording/reason";

/** The JSON contract `slantwise.comparison/1`: the comparison with findings and reasons in words. Members beyond the contract are optional. */
export function toJson(comparison: Comparison, plan: Plan) {
  const { source, question, rows } = comparison;
  return {
    format: "slantwise.comparison/1",
    data: { file: source.file, sha256: source.sha256, bytes: source.bytes, rows: source.rows },
    question: {
      outcome: question.outcome,
      exposure: question.exposure,
      kind: question.kind,
      reference: question.reference,
      per: question.per,
      design: question.design,
      outcomeKind: question.outcomeKind,
      variance: question.variance,
      level: question.level,
      margin: question.margin,
      cluster: question.cluster,
      weights: question.weights,
      ...(question.outcomeForm === "log" ? { outcomeForm: "log" } : {}),
    },
    rows: { read: rows.read, common: rows.common, droppedBy: rows.droppedBy },
    sets: comparison.sets.map((set) => setJson(set, plan)),
    notes: comparison.findings.map((finding) => ({
      code: finding.code,
      text: sayFinding(finding, comparison, plan),
      ...("columns" in finding ? { columns: finding.columns } : "column" in finding ? { columns: [finding.column] } : {}),
      ...("lines" in finding ? { lines: finding.lines } : {}),
    })),
    reported: comparison.sets[comparison.reported].adjustedFor,
  };
}

export type ComparisonJson = ReturnType<typeof toJson>;

function setJson(set: SetResult, plan: Plan) {
  const { adjustedFor, ownRows, residualDf, slopes, model, setAside, joint } = set;
  const contrasts = set.contrasts.map((contrast) => contrastJson(contrast, plan));
  return { adjustedFor, ownRows, residualDf, contrasts, slopes, model, setAside, ...(joint ? { joint } : {}) };
}

function contrastJson({ contrast, level, readout, fromRows }: ContrastResult, plan: Plan) {
  const said = readout.kind === "none" ? { kind: readout.kind, reason: sayReason(readout.reason, plan) } : readout;
  return { contrast, level, readout: said, ...(fromRows === null ? {} : { fromRows }) };
}
