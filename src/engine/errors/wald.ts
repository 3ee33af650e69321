import { EigenvalueDecomposition, Matrix } from "ml-matrix";
import type { Fit, Frame } from "../linear/types";
import { fUpper, tTwoSided } from "../probability";
import { quadratic, transposedTimes } from "./quadratic";
import { hotellingDf } from "./satterthwaite";
import type { CoefficientErrors } from "./types";

/** Eigenvalues of the scaled covariance of the combinations below this share of the largest count as 0. */
const RANK = 1e-11;

export interface WaldTest {
  readonly statistic: number;
  readonly df: [number, number];
  readonly p: number;
}

/**
 * Wald test that all combinations are 0: F on (q, n−p), with CR1 on (q, J−1); CR2: t² on Satterthwaite's degrees of freedom for one, the
 * approximate Hotelling test for several. Combinations whose covariance is not of full rank are tested in the rank there is.
 * Null where no test exists (no variance, no degrees of freedom).
 * @param combinations each of length p, aligned with fit.columns
 */
export function wald(frame: Frame, fit: Fit, cov: CoefficientErrors, combinations: readonly Float64Array[]): WaldTest | null {
  const b = combinations.map((c) => dot(c, fit.coefficients));
  const sizes = combinations.map((c) => Math.sqrt(quadratic(cov.matrix, c, c)));
  if (combinations.length === 0 || sizes.some((s) => !(s > 0))) return null;
  if (combinations.length === 1) return single(cov, combinations[0], b[0], sizes[0]);
  const scaled = combinations.map((c, i) => c.map((v) => v / sizes[i]));
  const v = scaled.map((c) => scaled.map((d) => quadratic(cov.matrix, c, d)));
  const eigen = new EigenvalueDecomposition(new Matrix(v), { assumeSymmetric: true });
  const largest = Math.max(...eigen.realEigenvalues);
  let q = 0;
  let statistic = 0;
  const directions: Float64Array[] = [];
  eigen.realEigenvalues.forEach((value, k) => {
    if (!(value > RANK * largest)) return;
    const direction = new Float64Array(fit.columns.length);
    let along = 0;
    scaled.forEach((c, i) => {
      const weight = eigen.eigenvectorMatrix.get(i, k);
      along += (weight * b[i]) / sizes[i];
      for (let a = 0; a < direction.length; a++) direction[a] += weight * c[a];
    });
    statistic += (along * along) / value;
    directions.push(direction);
    q++;
  });
  if (q === 0) return null;
  if (cov.kind === "CR2") return hotelling(fit, cov, directions, statistic);
  const df2 = cov.kind === "CR1" ? frame.clusters!.count - 1 : fit.residualDf;
  return finish(statistic / q, q, df2);
}

function single(cov: CoefficientErrors, combination: Float64Array, b: number, size: number): WaldTest | null {
  const df = cov.dfOf(combination);
  if (df === null) return null;
  const t = b / size;
  const p = tTwoSided(t, df);
  return Number.isFinite(t * t) ? { statistic: t * t, df: [1, df], p } : null;
}

function hotelling(fit: Fit, cov: CoefficientErrors, directions: readonly Float64Array[], q2: number): WaldTest | null {
  const q = directions.length;
  const clustered = cov.clustered!;
  const ts = orthonormal(
    directions.map((c) => transposedTimes(fit.rInverse, c)),
    clustered.working,
  );
  const eta = hotellingDf(clustered, ts);
  if (eta === null || eta - q + 1 <= 0) return null;
  return finish(((eta - q + 1) / (eta * q)) * q2, q, eta - q + 1);
}

/** Gram–Schmidt in the given inner product, twice for accuracy. */
function orthonormal(vectors: Float64Array[], inner: (a: Float64Array, b: Float64Array) => number): Float64Array[] {
  const done: Float64Array[] = [];
  for (const vector of vectors) {
    const v = Float64Array.from(vector);
    for (let pass = 0; pass < 2; pass++) {
      for (const u of done) {
        const along = inner(u, v);
        for (let i = 0; i < v.length; i++) v[i] -= along * u[i];
      }
    }
    const size = Math.sqrt(inner(v, v));
    done.push(v.map((x) => x / size));
  }
  return done;
}

function finish(statistic: number, q: number, df2: number): WaldTest | null {
  return Number.isFinite(statistic) && df2 > 0 ? { statistic, df: [q, df2], p: fUpper(statistic, q, df2) } : null;
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}
