import { stopIf } from "../cancelled";
import type { Comparison, SetResult } from "../comparison";
import { buildDesign } from "../design/build";
import type { Design } from "../design/types";
import type { Reason } from "../findings";
import { factorise } from "../linear/factorise";
import type { Factor } from "../linear/types";
import type { Plan } from "../plan";
import { resolveQuestion } from "../question/resolve";
import type { Resolved } from "../question/resolve";
import { findRows } from "../rows/common";
import { middleOf } from "../slopes/profiles";
import type { Table } from "../table";
import { addedFigure } from "./added";
import { alongFigure, differencesByLevel, endsOfValues } from "./along";
import { fitFigure } from "./fit";
import type { FigureFit } from "./fit";
import type { FigureChoice, SlopesFigure } from "./types";

export type { AddedFigure, AlongFigure, FigureChoice, LevelDifference, SlopesFigure } from "./types";

/**
 * What there is to draw of one set along one modifier, on demand: the same rows, columns and errors as the comparison's, for the one fit that is
 * looked at. Where the set's slopes differ in other modifiers too, these are in the fit and held in the middle (METHODS 5). An amount's
 * added-variable plot is made only where the comparison has one slope to print.
 * @param comparison of this table and plan
 * @param choice whose set, modifier and contrast the comparison has
 * @returns or the reason why the contrast has no number in this set
 * @throws Cancelled
 */
export function slopesFigure(
  table: Table,
  plan: Plan,
  comparison: Comparison,
  choice: FigureChoice,
  cancelled?: () => boolean,
): SlopesFigure | { readonly reason: Reason } {
  const set = comparison.sets[choice.set];
  const { readout } = set.contrasts[choice.contrast];
  if (readout.kind === "none") return { reason: readout.reason };
  const resolved = resolveQuestion(table, plan);
  const { common } = findRows(table, plan, resolved);
  stopIf(cancelled);
  const modifiers = modifiersOf(set, choice.modifier);
  const design = buildDesign(resolved, common, set.adjustedFor, modifiers);
  const factor = factorise(design.frame, { cancelled });
  const lines = Uint32Array.from(common, (row) => table.lines[row]);
  const one = resolved.exposure.kind === "amount" && (readout.kind === "single" || readout.kind === "undecided") ? readout : null;
  return {
    ...figureAlong({ resolved, design, factor, set, modifiers, choice, lines, cancelled }),
    added: one && addedFigure(design, factor, set.adjustedFor, comparison.question.per, one, lines),
  };
}

/** The chosen modifier with those whose slopes differ in the set, in the set's order. */
function modifiersOf(set: SetResult, chosen: string | null): string[] {
  if (chosen === null) return [];
  const differing = set.slopes.filter((test) => test.verdict === "differ").map((test) => test.modifier);
  return differing.includes(chosen) ? differing : [...differing, chosen];
}

interface Work {
  readonly resolved: Resolved;
  readonly design: Design;
  readonly factor: Factor;
  readonly set: SetResult;
  readonly modifiers: readonly string[];
  readonly choice: FigureChoice;
  readonly lines: Uint32Array;
  readonly cancelled?: () => boolean;
}

function figureAlong(work: Work): Omit<SlopesFigure, "added"> {
  const { resolved, design, factor, set, modifiers, choice, cancelled } = work;
  const modifier = choice.modifier;
  if (modifier === null) return { modifiers, heldAt: [], averagedOver: [], along: null, levels: [] };
  const { variance, level } = resolved.question;
  const interaction = fitFigure(design, factor, set.adjustedFor, modifiers, variance);
  stopIf(cancelled);
  const heldAt = modifiers
    .filter((name) => name !== modifier)
    .map((column) => ({ column, value: middleOf(design, column).value }));
  const others = set.adjustedFor.filter((name) => !modifiers.includes(name));
  const figure: FigureFit = {
    ...interaction,
    design,
    modifier,
    heldAt: new Map(heldAt.map(({ column, value }) => [column, value])),
    means: meansOf(design, others),
    level,
  };
  const contrast = design.contrasts[choice.contrast];
  const values = design.modifierValues.get(modifier)!;
  const ends = values.kind === "amount" ? endsOfValues(values.values) : null;
  const drawn = {
    modifiers,
    heldAt,
    averagedOver: others.filter((name) => design.covariates.get(name)!.columns.some((c) => interaction.fit.columns.includes(c))),
  };
  if (values.kind === "amount" && ends && !ends.twoValued)
    return { ...drawn, along: alongFigure(figure, contrast, values.values, ends, work.lines), levels: [] };
  return { ...drawn, along: null, levels: differencesByLevel(figure, contrast, values, ends) };
}

/** Means of covariates' columns over the common rows: a category's are its levels' shares. */
function meansOf(design: Design, covariates: readonly string[]): Map<number, number> {
  const { frame } = design;
  const columns = covariates.flatMap((name) => design.covariates.get(name)!.columns);
  return new Map(columns.map((column) => [column, frame.columns[column].reduce((sum, value) => sum + value / frame.n, 0)]));
}
