import { classicalErrors } from "../errors/classical";
import { LEVERAGE_GAP } from "../errors/robust";
import type { CoefficientErrors } from "../errors/types";
import type { Factor, Fit, Frame } from "../linear/types";
import type { Variance } from "../plan";
import { inHalves } from "../passes/halves";
import type { Passing } from "../passes/types";
import { writeProgram } from "./program";
import { growTree } from "./trie";
import type { Meat, Sums } from "./types";

/** Errors of a fit's last coefficients, found together with many others'. */
export interface TreeErrors {
  readonly errors: CoefficientErrors;
  /** By target: Σ (influence − base influence)², the square of the shift's error; null where no base was given. */
  readonly shift: Float64Array | null;
}

export interface TreeInput {
  readonly frame: Frame;
  readonly factor: Factor;
  /** Frame columns whose coefficients' errors are wanted: the last ones of every fit, in this order. */
  readonly targets: readonly number[];
  readonly kind: Variance;
  /** The base fit's influences on each target's coefficient, length n each, where the shift's error is wanted too. */
  readonly base: readonly Float64Array[] | null;
  readonly passing: Passing;
}

/**
 * Classical or HC errors of the same last coefficients in many fits by one pass over the rows (see walkRows). Null for a fit that this pass is
 * not good for: a target set aside, a near dependence, a row of leverage 1, clusters. Its errors come from `covariance`.
 * @throws Cancelled
 */
export function treeErrors(input: TreeInput, fits: readonly Fit[]): (TreeErrors | null)[] {
  const { frame, factor, targets, kind, base, passing } = input;
  const none = fits.map(() => null);
  if (kind === "CR1" || kind === "CR2" || targets.length === 0) return none;
  const taken = fits.flatMap((fit, i) => (endsWith(fit, targets) && fit.residualSumOfSquares > 0 ? [i] : []));
  if (taken.length === 0) return none;
  const paths = taken.map((i) => fits[i].columns.slice(0, fits[i].columns.length - targets.length));
  const { roots, end, models } = growTree(paths);
  const { program, held } = writeProgram(factor, roots, models, targets);
  const source = {
    n: frame.n,
    columns: [...program.columns.map((column) => frame.columns[column]), frame.outcome],
    weights: frame.weights,
    base,
  };
  const task = { kind: "walk", program, source, meat: meatOf(kind) } as const;
  const sums = addUp(inHalves(frame.n, (from, to) => ({ ...task, from, to }), passing));
  const weights = new Map(program.nodes.flatMap(({ finish }) => (finish ? [[finish.model, finish.weights] as const] : [])));
  const found: (TreeErrors | null)[] = [...none];
  taken.forEach((i, k) => {
    const model = end[k];
    if (!held[model] || 1 + sums.gap[model] < LEVERAGE_GAP) return;
    found[i] = errorsOf(input, fits[i], weights.get(model)!, sums, model);
  });
  return found;
}

function addUp([first, second]: readonly (readonly Float64Array[])[]): Sums {
  const [meat, shift, gap] = first;
  if (second) {
    for (let i = 0; i < meat.length; i++) meat[i] += second[0][i];
    for (let i = 0; i < shift.length; i++) shift[i] += second[1][i];
    for (let i = 0; i < gap.length; i++) gap[i] = Math.min(gap[i], second[2][i]);
  }
  return { meat, shift, gap };
}

function endsWith(fit: Fit, targets: readonly number[]): boolean {
  const from = fit.columns.length - targets.length;
  return from >= 1 && targets.every((column, a) => fit.columns[from + a] === column) && fit.residualDf > 0;
}

function meatOf(kind: Variance): Meat {
  return kind === "HC0" || kind === "HC1" ? "HC0" : kind === "HC2" ? "HC2" : "HC3";
}

function errorsOf(
  { frame, kind, base, targets }: TreeInput,
  fit: Fit,
  weights: Float64Array,
  sums: Sums,
  model: number,
): TreeErrors | null {
  const q = targets.length;
  const p = fit.columns.length;
  const shift = base ? sums.shift.slice(model * q, (model + 1) * q) : null;
  if (kind === "classical") return { errors: classicalErrors(fit), shift };
  const factor = kind === "HC1" ? frame.n / fit.residualDf : 1;
  const matrix = new Float64Array(p * p);
  const from = p - q;
  const triangle = (model * q * (q + 1)) / 2;
  const meat = (c: number, d: number) => sums.meat[triangle + (c >= d ? (c * (c + 1)) / 2 + d : (d * (d + 1)) / 2 + c)];
  for (let a = 0; a < q; a++) {
    for (let b = 0; b <= a; b++) {
      let sum = 0;
      for (let c = a; c < q; c++) for (let d = b; d < q; d++) sum += weights[a * q + c] * weights[b * q + d] * meat(c, d);
      if (!Number.isFinite(sum)) return null;
      matrix[(from + a) * p + from + b] = sum * factor;
      matrix[(from + b) * p + from + a] = sum * factor;
    }
  }
  return { errors: { kind, used: kind, matrix, dfOf: () => fit.residualDf, clustered: null }, shift };
}
