import { stopIf } from "./cancelled";
import type { Comparison, SetResult } from "./comparison";
import { buildDesign, countGroups } from "./design/build";
import type { Design } from "./design/types";
import type { Finding, Reason } from "./findings";
import { finiteComparison } from "./finite";
import { factorise } from "./linear/factorise";
import type { Factor } from "./linear/types";
import type { Passing } from "./passes/types";
import type { Plan, Variance } from "./plan";
import { findProblems } from "./question/problems";
import { resolveQuestion } from "./question/resolve";
import type { Resolved } from "./question/resolve";
import { findingsOf } from "./readout/findings";
import { emptyResult } from "./readout/empty";
import { ownEstimates } from "./readout/own";
import { withErrors } from "./readout/errors";
import { setResult } from "./readout/result";
import type { Judged } from "./readout/result";
import { solveSet } from "./readout/set";
import type { Depth, SolvedSet } from "./readout/set";
import { findRows } from "./rows/common";
import type { Rows } from "./rows/common";
import { readSlopes } from "./slopes";
import type { Table } from "./table";

export interface CompareOptions extends Passing {
  /**
   * Called once with a first look (estimates with classical errors, slopes verdicts from them, no shifts; its question says "classical") where
   * the plan's errors take longer. A set whose slopes differ there has no number there either.
   */
  readonly preview?: (first: Comparison) => void;
}

/** Rows times sets times tests from which a first look is given. */
const FIRST_LOOK = 3e5;
/** Up to this many rows times sets, every set is fitted on its own rows too; beyond it the base and the reported set. */
const OWN_ROWS = 2e5;
/** Parts and table errors of every set are computed up to this many rows times sets; beyond it for the sets shown. */
const IN_FULL = 2e6;

/**
 * The one door of the engine: refits a question under every listed adjustment set on the same rows.
 * @param table as read; never changed
 * @param plan a plan for which `findProblems(table, plan)` is empty
 * @returns a comparison without NaN or infinity; what the data do not allow is a `none` readout or a finding
 * @throws Cancelled; Error (a bug) when the plan has problems
 */
export function compare(table: Table, plan: Plan, options: CompareOptions = {}): Comparison {
  const { preview, ...passing } = options;
  const { memory } = passing;
  const [problem] = findProblems(table, plan);
  if (problem) throw new Error(`compare was called with an unusable plan: ${problem.code}`);
  const resolved = resolveQuestion(table, plan);
  const rows = findRows(table, plan, resolved);
  const head = { table, resolved, rows };
  const nothing = wholeReason(resolved, rows);
  if (nothing)
    return finish(
      head,
      null,
      resolved.sets.map((set, i) => emptyResult(resolved, set, rows.ownCount(i), nothing)),
      [],
    );
  const { modifiers } = resolved.question;
  memory?.reset();
  const design = buildDesign(resolved, rows.common, [...resolved.sources.keys()], modifiers, memory);
  const factor = factorise(design.frame, passing);
  const started = { table, resolved, rows, design, factor, passing };
  const work: Work = { ...started, solved: solveAll(started) };
  if (preview && isLong(resolved, rows))
    preview(finish({ ...head, resolved: asClassical(resolved) }, design, firstLook(work), []));
  const judged = judgeAll(work, resolved.question.variance, depthOf(resolved, rows));
  return finish(head, design, resultsOf(work, judged, depthOf(resolved, rows)), findingsOf(table, rows, design, judged));
}

interface Work {
  readonly table: Table;
  readonly resolved: Resolved;
  readonly rows: Rows;
  readonly design: Design;
  readonly factor: Factor;
  readonly solved: readonly SolvedSet[];
  readonly passing: Passing;
}

/** Whether the plan's errors take long enough for a first look to be worth showing. */
function isLong(resolved: Resolved, rows: Rows): boolean {
  const { variance, modifiers } = resolved.question;
  return variance !== "classical" && rows.common.length * resolved.sets.length * (1 + modifiers.length) > FIRST_LOOK;
}

function depthOf(resolved: Resolved, rows: Rows): (set: number) => Depth {
  const all = rows.common.length * resolved.sets.length <= IN_FULL;
  return (i) => (all || i === resolved.reported || i === 0 ? "full" : "exposure");
}

function asClassical(resolved: Resolved): Resolved {
  return { ...resolved, question: { ...resolved.question, variance: "classical" } };
}

/** Every set with classical errors from the factor alone: estimates and slopes verdicts, no shifts. */
function firstLook(work: Work): SetResult[] {
  return resultsOf(
    work,
    judgeAll(work, "classical", () => "first look"),
    () => "first look",
  );
}

/** Every set's fit, shared by the first look and what follows. */
function solveAll({ resolved, design, factor, passing }: Omit<Work, "solved">): SolvedSet[] {
  const { variance } = resolved.question;
  return resolved.sets.map((columns) => {
    stopIf(passing.cancelled);
    return solveSet(design, factor, columns, variance, "full");
  });
}

function judgeAll(
  { resolved, design, factor, solved, passing }: Work,
  variance: Variance,
  depth: (set: number) => Depth,
): Judged[] {
  const { level, slopesAlpha, margin, outcomeForm, modifiers } = resolved.question;
  const sets = withErrors(design, factor, solved, variance, depth, passing);
  const slopes = readSlopes(
    {
      design,
      factor,
      modifiers,
      variance,
      level,
      alpha: slopesAlpha,
      margin,
      reportAt: resolved.reportAt,
      outcomeForm,
      average: resolved.average,
      passing,
    },
    sets.map(({ columns, reasons }, index) => ({ columns, index, estimable: reasons.includes(null) })),
  );
  return sets.map((set, i) => ({ set, slopes: slopes[i] }));
}

function resultsOf(
  { resolved, rows, design, factor, passing }: Work,
  judged: readonly Judged[],
  depth: (set: number) => Depth,
): SetResult[] {
  const small = rows.common.length * judged.length <= OWN_ROWS;
  return judged.map((own, i) => {
    stopIf(passing.cancelled);
    const ownRows = rows.ownCount(i);
    const wanted = depth(i) !== "first look" && ownRows !== rows.common.length && (small || i === 0 || i === resolved.reported);
    return setResult({
      resolved,
      design,
      factor,
      base: judged[0],
      judged: own,
      isBase: i === 0,
      ownRows,
      ownEstimates: wanted ? ownEstimates(resolved, rows.own(i), resolved.sets[i]) : null,
      depth: depth(i),
    });
  });
}

/** Why no set has a number at all. */
function wholeReason(resolved: Resolved, rows: Rows): Reason | null {
  if (rows.common.length === 0) return { code: "no-rows", columns: rows.count.droppedBy.map((d) => d.column) };
  const first = resolved.outcome[rows.common[0]];
  if (rows.common.every((row) => resolved.outcome[row] === first)) return { code: "outcome-constant" };
  const { exposure } = resolved;
  if (exposure.kind === "amount") {
    const value = exposure.values[rows.common[0]];
    if (rows.common.every((row) => exposure.values[row] === value)) return { code: "exposure-constant", value: String(value) };
    return null;
  }
  const level = exposure.groups.codes[rows.common[0]];
  const constant = rows.common.every((row) => exposure.groups.codes[row] === level);
  return constant ? { code: "exposure-constant", value: exposure.groups.levels[level] } : null;
}

function finish(
  { table, resolved, rows }: { table: Table; resolved: Resolved; rows: Rows },
  design: Design | null,
  sets: readonly SetResult[],
  findings: readonly Finding[],
): Comparison {
  return finiteComparison({
    source: { ...table.source, rows: table.rows },
    question: { ...resolved.question, groups: design ? countGroups(design) : [] },
    rows: rows.count,
    sets,
    reported: resolved.reported,
    findings: [...table.findings, ...resolved.findings, ...rows.findings, ...findings],
  });
}
