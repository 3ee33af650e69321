import type { SetResult } from "../comparison";
import type { ContrastColumn, Design } from "../design/types";
import type { Covariance } from "../errors/types";
import type { Reason } from "../findings";
import { fitColumns } from "../linear/fit";
import { refine } from "../linear/refine";
import type { Factor, Fit } from "../linear/types";
import type { Variance } from "../plan";

/**
 * How much of a set is computed: everything; errors of the exposure's coefficients alone; or a first look, classical errors without a pass
 * over the rows.
 */
export type Depth = "full" | "exposure" | "first look";

/** One set, fitted, still without errors. */
export interface SolvedSet {
  readonly columns: readonly string[];
  readonly fit: Fit;
  /** False where there are no residual degrees of freedom, or one cluster: no errors then. */
  readonly enough: boolean;
  /** Covariate columns set aside, by covariate name, with the covariates they are a combination of. */
  readonly setAside: SetResult["setAside"];
  /** Why a contrast has no number, aligned with design.contrasts; null where it has. */
  readonly reasons: readonly (Reason | null)[];
}

/** One set, fitted. */
export interface SetFit extends SolvedSet {
  /** Null where there can be none. */
  readonly cov: Covariance | null;
  /** By exposure column, the square of the shift's error per unit of the column, where it was found together with the errors; else null. */
  readonly shiftSquares: Float64Array | null;
}

/**
 * Fits a set: constant, its covariates, the exposure last, so that it is the exposure that falls to a dependence with them.
 */
export function solveSet(
  design: Design,
  factor: Factor,
  columns: readonly string[],
  variance: Variance,
  depth: Depth,
): SolvedSet {
  const { frame, contrasts } = design;
  const exposure = contrasts.map((c) => c.column).filter((c) => c >= 0);
  const before = columns.flatMap((name) => design.covariates.get(name)!.columns);
  const wanted = [0, ...before, ...exposure];
  const first = fitColumns(factor, wanted);
  const owner = ownerOf(design);
  // Rows used up before the exposure's turn: what looks like a dependence is want of rows.
  const short = first.residualDf <= 0 && first.setAside.some(({ column }) => exposure.includes(column));
  const clusters = variance === "CR1" || variance === "CR2" ? (frame.clusters?.count ?? 0) : null;
  const enough = first.residualDf > 0 && (clusters === null || clusters > 1);
  const fit = enough && depth !== "first look" ? refine(frame, factor, first) : first;
  const aside = first.setAside.filter(({ column }) => !exposure.includes(column));
  const tooFew: Reason | null =
    short || frame.n <= exposure.length ? { code: "too-few-rows", rows: frame.n, coefficients: wanted.length } : null;
  return {
    columns,
    fit,
    enough,
    setAside: mergeAside(
      aside.map(({ column, combinationOf }) => ({ column: owner(column), combinationOf: unique(combinationOf.map(owner)) })),
      new Set(first.columns.map(owner)),
    ),
    reasons: contrasts.map((contrast) => tooFew ?? reasonFor(design, contrast, fit, owner)),
  };
}

function reasonFor(design: Design, contrast: ContrastColumn, fit: Fit, owner: (column: number) => string): Reason | null {
  const { group, frame, exposure } = design;
  if (group) {
    const [reference] = group.levels;
    if (!group.codes.includes(0)) return { code: "reference-empty", level: reference };
    if (contrast.column < 0) return { code: "group-empty", level: contrast.level! };
  } else if (frame.columns[contrast.column].every((v) => v === frame.columns[contrast.column][0])) {
    return { code: "exposure-constant", value: "" };
  }
  const exposures = new Set(exposure.columns);
  for (const { column, combinationOf } of fit.setAside) {
    if (!exposures.has(column)) continue;
    if (column !== contrast.column && !combinationOf.includes(contrast.column)) continue;
    return { code: "told-by-covariates", columns: unique(combinationOf.filter((c) => !exposures.has(c)).map(owner)) };
  }
  return null;
}

/** The covariate a frame column belongs to. */
function ownerOf(design: Design): (column: number) => string {
  const owners = new Map<number, string>();
  for (const [name, block] of design.covariates) for (const column of block.columns) owners.set(column, name);
  for (const column of design.exposure.columns) owners.set(column, design.exposure.basis.column);
  return (column) => owners.get(column) ?? "";
}

/** One entry a covariate: several of its columns may have gone. */
function mergeAside(list: { column: string; combinationOf: string[] }[], fitted: ReadonlySet<string>): SetFit["setAside"] {
  const merged = new Map<string, string[]>();
  for (const { column, combinationOf } of list)
    merged.set(
      column,
      unique([...(merged.get(column) ?? []), ...combinationOf]).filter((c) => c !== column),
    );
  return [...merged].map(([column, combinationOf]) => ({
    column,
    combinationOf,
    ...(fitted.has(column) ? { part: true as const } : {}),
  }));
}

const unique = (names: readonly string[]): string[] => [...new Set(names)];
