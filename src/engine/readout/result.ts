import type { ContrastResult, Readout, SetResult } from "../comparison";
import { modelRows } from "../design/model";
import type { Design } from "../design/types";
import { covariance } from "../errors/covariance";
import type { Factor } from "../linear/types";
import type { Resolved } from "../question/resolve";
import { shiftOf } from "../shift/shift";
import { changeWord, marginBounds } from "../shift/word";
import type { SlopesOutcome } from "../slopes";
import { estimateOf, jointOf } from "./estimate";
import type { Depth, SetFit } from "./set";

/** One set with its verdict, before it is put together. */
export interface Judged {
  readonly set: SetFit;
  readonly slopes: SlopesOutcome;
}

export interface ResultInput {
  readonly resolved: Resolved;
  readonly design: Design;
  readonly factor: Factor;
  readonly base: Judged;
  readonly judged: Judged;
  readonly isBase: boolean;
  readonly ownRows: number;
  /** Own-rows estimate of each contrast; null where it was not computed or has none. */
  readonly ownEstimates: readonly (number | null)[] | null;
  /** Parts of the shift and errors of the whole table are computed for the sets a person looks at; a first look has no shift. */
  readonly depth: Depth;
}

/** Puts one set together: which kind of readout it has follows from its slopes, and `varies` and `none` carry no estimate (METHODS 5). */
export function setResult(input: ResultInput): SetResult {
  const { design, judged, ownRows, ownEstimates } = input;
  const { set, slopes } = judged;
  const contrasts = design.contrasts.map(({ contrast, level }, i): ContrastResult => {
    const readout = readoutOf(input, i);
    const own = ownEstimates?.[i] ?? null;
    const fromRows = own !== null && (readout.kind === "single" || readout.kind === "undecided") ? readout.estimate - own : null;
    return { contrast, level, readout, fromRows };
  });
  const plain = contrasts.some((c) => c.readout.kind === "plain");
  return {
    adjustedFor: set.columns,
    ownRows,
    residualDf: set.fit.residualDf,
    contrasts,
    joint: slopes.kind === "varies" && !plain ? null : jointOf(design, set),
    slopes: slopes.tests,
    model: modelOf(input),
    setAside: set.setAside,
  };
}

function readoutOf(input: ResultInput, i: number): Readout {
  const { resolved, design, base, judged, isBase } = input;
  const { set, slopes } = judged;
  const contrast = design.contrasts[i];
  const reason = set.reasons[i];
  if (reason) return { kind: "none", reason };
  const { level, margin, outcomeForm } = resolved.question;
  if (slopes.kind === "varies") {
    // The base set that adjusts for nothing still has its difference in means, called so.
    if (isBase && set.columns.length === 0)
      return { kind: "plain", ...estimateOf(set, contrast, level), modifiers: slopes.differing };
    const varies = slopes.varies!.perContrast[i];
    return varies ?? { kind: "none", reason: { code: "not-finite" } };
  }
  const own = estimateOf(set, contrast, level);
  const kind = slopes.kind;
  const baseVaries = base.slopes.kind === "varies" && base.set.columns.length > 0;
  if (input.depth === "first look" || isBase || baseVaries || base.set.reasons[i] || !set.cov || !base.set.cov)
    return { kind, ...own, shift: null, change: null };
  const shift = shiftOf({
    design,
    factor: input.factor,
    base: { fit: base.set.fit, cov: base.set.cov },
    full: { fit: set.fit, cov: set.cov },
    contrast,
    names: set.columns.filter((name) => !base.set.columns.includes(name)),
    level,
    df: own.df,
    withParts: input.depth === "full",
    squares: set.shiftSquares && set.shiftSquares[design.exposure.columns.indexOf(contrast.column)] * contrast.factor ** 2,
  });
  const change = changeWord(estimateOf(base.set, contrast, level), own, shift.interval, marginBounds(margin, outcomeForm));
  return { kind, ...own, shift, change };
}

/**
 * The fitted table; where the set varies, that of the fit with the interactions, so that no common slope stands in it. A group whose contrast
 * has no number has no row: with another group's column set aside, its coefficient is not against the reference.
 */
function modelOf(input: ResultInput): SetResult["model"] {
  const { design, judged } = input;
  const refused = new Set(design.contrasts.filter((_, i) => judged.set.reasons[i] !== null).map((c) => c.level));
  const exposure = design.exposure.basis.column;
  return tableOf(input).filter(({ term }) => !("column" in term && term.column === exposure && refused.has(term.level ?? null)));
}

function tableOf({ resolved, design, judged, depth }: ResultInput): ReturnType<typeof modelRows> {
  const { set, slopes } = judged;
  if (slopes.varies) {
    const { fit, cov, modifiers } = slopes.varies.joint;
    return modelRows(
      design,
      fit,
      depth === "full" && cov ? covariance(design.frame, fit, resolved.question.variance).matrix : null,
      modifiers,
    );
  }
  return modelRows(design, set.fit, depth === "full" ? (set.cov?.matrix ?? null) : null, []);
}
