import { EigenvalueDecomposition, Matrix } from "ml-matrix";
import { BLOCK } from "../kernels";
import { whitenedBlocks } from "../linear/rows";
import type { Fit, Frame } from "../linear/types";
import type { Clustered } from "./types";

/** Eigenvalues of I − H_jj below this are 0: the Moore–Penrose inverse leaves them out. */
const SINGULAR = 1e-10;

/** What each cluster contributes, summed over its rows: y = x'P unweighted (K's first half), wy (its second half), and the scores. */
interface Sums {
  /** Gram matrices K_j'K_j, count × m × m; m = p, or 2p with weights. */
  readonly gram: Float64Array;
  /** K_j'e_j, count × m. */
  readonly ke: Float64Array;
  readonly m: number;
}

/** CR1's pieces: the whitened score of each cluster, Σ u √w e. */
export function clusterScores(frame: Frame, fit: Fit, e: Float64Array): Clustered {
  const p = fit.columns.length;
  const { codes, count } = frame.clusters!;
  const scores = new Float64Array(count * p);
  whitenedBlocks(frame, fit, (u, start, height) => {
    for (let j = 0; j < p; j++) {
      for (let i = 0; i < height; i++) {
        const row = start + i;
        const root = frame.weights ? Math.sqrt(frame.weights[row]) : 1;
        scores[codes[row] * p + j] += u[j * BLOCK + i] * root * e[row];
      }
    }
  });
  return { count, scores, satterthwaite: null, metric: null, working: dot };
}

/**
 * CR2's pieces (Bell & McCaffrey 2002; Pustejovsky & Tipton 2018) with the identity as working covariance, all through p × p (weighted:
 * 2p × 2p) forms. With Y = XP (P = R⁻¹), K_j = Y_j or [Y_j, W_jY_j] and H = YY'W, the residual's working covariance in cluster j is
 * B_j = I + K_j S K_j' with S = −I, or [[Y'W²Y, −I], [−I, 0]]; the adjustment is A_j = B_j^(+1/2) = I + K_j C_j K_j'.
 */
export function biasReduced(frame: Frame, fit: Fit, e: Float64Array): Clustered {
  const p = fit.columns.length;
  const { count } = frame.clusters!;
  const weighted = frame.weights !== null;
  const { gram, ke, m } = clusterSums(frame, fit, e);
  const s = workingForm(gram, count, p, weighted);
  const adjust = new Float64Array(count * m * m);
  const scores = new Float64Array(count * p);
  const lower = weighted ? p : 0;
  for (let j = 0; j < count; j++) {
    const g = gram.subarray(j * m * m, (j + 1) * m * m);
    const c = adjustment(g, s, m, weighted);
    adjust.set(c, j * m * m);
    // Y_j'W_jA_je_j = (K'e)_lower + (K'K)_lower · C · K'e
    const k = ke.subarray(j * m, (j + 1) * m);
    const ck = times(c, k, m);
    for (let a = 0; a < p; a++) {
      let sum = k[lower + a];
      for (let b = 0; b < m; b++) sum += g[(lower + a) * m + b] * ck[b];
      scores[j * p + a] = sum;
    }
  }
  const { metric, basis } = signature(s, m);
  const satterthwaite = (t: Float64Array) => {
    const all = new Float64Array(count * m);
    const kappa = new Float64Array(count * m);
    const embedded = new Float64Array(m);
    embedded.set(t, lower);
    for (let j = 0; j < count; j++) {
      const g = gram.subarray(j * m * m, (j + 1) * m * m);
      const gt = times(g, embedded, m);
      const k = times(adjust.subarray(j * m * m, (j + 1) * m * m), gt, m);
      for (let a = 0; a < m; a++) k[a] += embedded[a];
      kappa.set(k, j * m);
      all.set(times(basis, times(g, k, m), m), j * m);
    }
    return { g: all, m, kappa: gramTimes(gram, kappa, count, m) };
  };
  const n = weighted ? s.slice(0) : null;
  const working = (a: Float64Array, b: Float64Array) => {
    if (!n) return dot(a, b);
    let sum = 0;
    for (let i = 0; i < p; i++) for (let k = 0; k < p; k++) sum += a[i] * n[i * m + k] * b[k];
    return sum;
  };
  return { count, scores, satterthwaite, metric, working };
}

/** Γκ for each cluster beside κ itself: what κ'Γκ (a cluster's own share) needs. Layout: [κ, Γκ] per cluster, each length m. */
function gramTimes(gram: Float64Array, kappa: Float64Array, count: number, m: number): Float64Array {
  const out = new Float64Array(2 * count * m);
  for (let j = 0; j < count; j++) {
    const k = kappa.subarray(j * m, (j + 1) * m);
    out.set(k, 2 * j * m);
    out.set(times(gram.subarray(j * m * m, (j + 1) * m * m), k, m), (2 * j + 1) * m);
  }
  return out;
}

function clusterSums(frame: Frame, fit: Fit, e: Float64Array): Sums {
  const p = fit.columns.length;
  const { codes, count } = frame.clusters!;
  const { weights } = frame;
  const m = weights ? 2 * p : p;
  const gram = new Float64Array(count * m * m);
  const ke = new Float64Array(count * m);
  const k = new Float64Array(m);
  whitenedBlocks(frame, fit, (u, start, height) => {
    for (let i = 0; i < height; i++) {
      const row = start + i;
      const w = weights ? weights[row] : 1;
      const root = Math.sqrt(w);
      for (let a = 0; a < p; a++) {
        const y = u[a * BLOCK + i] / root;
        k[a] = y;
        if (weights) k[p + a] = w * y;
      }
      const at = codes[row];
      for (let a = 0; a < m; a++) {
        ke[at * m + a] += k[a] * e[row];
        const line = at * m * m + a * m;
        for (let b = 0; b < m; b++) gram[line + b] += k[a] * k[b];
      }
    }
  });
  return { gram, ke, m };
}

function workingForm(gram: Float64Array, count: number, p: number, weighted: boolean): Float64Array {
  const m = weighted ? 2 * p : p;
  const s = new Float64Array(m * m);
  if (!weighted) {
    for (let a = 0; a < p; a++) s[a * m + a] = -1;
    return s;
  }
  for (let a = 0; a < p; a++) {
    s[a * m + p + a] = -1;
    s[(p + a) * m + a] = -1;
    for (let b = 0; b < p; b++) for (let j = 0; j < count; j++) s[a * m + b] += gram[j * m * m + (p + a) * m + p + b]; // Y'W²Y
  }
  return s;
}

/** C_j with A_j = I + K_j C_j K_j'. */
function adjustment(gram: Float64Array, s: Float64Array, m: number, weighted: boolean): Float64Array {
  const g = symmetricEigen(gram, m);
  const c = new Float64Array(m * m);
  const largest = Math.max(...g.values, 0);
  if (largest === 0) return c;
  if (!weighted) {
    // eigenvalues 1 − λ of I − H_jj; C = V diag(((1 − λ)^−½ − 1)/λ) V', whose limit at λ = 0 is ½
    const f = g.values.map((value) => {
      const left = 1 - value;
      if (left < SINGULAR) return -1 / value;
      return value < 1e-6 ? 0.5 + 0.375 * value : (1 / Math.sqrt(left) - 1) / value;
    });
    return spectral(g.vectors, f, m);
  }
  // B = I + Q(Γ^½ S Γ^½)Q' with K = QΓ^½
  const root = spectral(
    g.vectors,
    g.values.map((v) => (v > largest * 1e-14 ? Math.sqrt(v) : 0)),
    m,
  );
  const inverseRoot = spectral(
    g.vectors,
    g.values.map((v) => (v > largest * 1e-14 ? 1 / Math.sqrt(v) : 0)),
    m,
  );
  const z = symmetricEigen(product(product(root, s, m), root, m), m);
  const middle = spectral(
    z.vectors,
    z.values.map((v) => (1 + v < SINGULAR ? -1 : 1 / Math.sqrt(1 + v) - 1)),
    m,
  );
  return product(product(inverseRoot, middle, m), inverseRoot, m);
}

/** S = E·diag(metric)·E'; `basis` is E' row-major. */
function signature(s: Float64Array, m: number): { metric: Float64Array; basis: Float64Array } {
  const { values, vectors } = symmetricEigen(s, m);
  const basis = new Float64Array(m * m);
  for (let a = 0; a < m; a++) for (let b = 0; b < m; b++) basis[a * m + b] = vectors[b * m + a];
  return { metric: Float64Array.from(values), basis };
}

function symmetricEigen(matrix: Float64Array, m: number): { values: number[]; vectors: Float64Array } {
  const rows = Array.from({ length: m }, (_, i) =>
    Array.from({ length: m }, (_, j) => (matrix[i * m + j] + matrix[j * m + i]) / 2),
  );
  const found = new EigenvalueDecomposition(new Matrix(rows), { assumeSymmetric: true });
  return { values: found.realEigenvalues, vectors: Float64Array.from(found.eigenvectorMatrix.to1DArray()) };
}

/** V·diag(f)·V'. */
function spectral(vectors: Float64Array, f: readonly number[], m: number): Float64Array {
  const out = new Float64Array(m * m);
  for (let a = 0; a < m; a++) {
    for (let b = 0; b < m; b++) {
      let sum = 0;
      for (let k = 0; k < m; k++) sum += vectors[a * m + k] * f[k] * vectors[b * m + k];
      out[a * m + b] = sum;
    }
  }
  return out;
}

function product(a: Float64Array, b: Float64Array, m: number): Float64Array {
  const out = new Float64Array(m * m);
  for (let i = 0; i < m; i++)
    for (let k = 0; k < m; k++) for (let j = 0; j < m; j++) out[i * m + j] += a[i * m + k] * b[k * m + j];
  return out;
}

function times(matrix: Float64Array, v: Float64Array, m: number): Float64Array {
  const out = new Float64Array(m);
  for (let i = 0; i < m; i++) for (let j = 0; j < m; j++) out[i] += matrix[i * m + j] * v[j];
  return out;
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}
