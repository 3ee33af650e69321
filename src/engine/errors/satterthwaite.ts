import type { Clustered } from "./types";

/**
 * Degrees of freedom of CR2's variance of one combination, (Σ tr)²/Σ Θ_jk² with Θ_jk = δ_jk d_j + g_j'Sg_k (Bell & McCaffrey 2002), summed
 * through m × m moments, never over pairs of clusters. Null where the variance has no expectation to match (a combination that no
 * cluster informs).
 * @param t the combination in whitened coordinates, length p
 */
export function satterthwaite(clustered: Clustered, t: Float64Array): number | null {
  const eta = pairedMoments(clustered, [t]);
  const df = (eta.trace * eta.trace) / eta.squares;
  return Number.isFinite(df) && df > 0 ? df : null;
}

/**
 * Degrees of freedom η of the approximate Hotelling test (Pustejovsky & Tipton 2018) for combinations that are orthonormal in the working
 * variance: q(q+1)/Σ_st Var(d_st).
 */
export function hotellingDf(clustered: Clustered, ts: readonly Float64Array[]): number | null {
  const q = ts.length;
  const { squares, crossed } = pairedMoments(clustered, ts);
  const eta = (q * (q + 1)) / (squares + crossed);
  return Number.isFinite(eta) && eta > 0 ? eta : null;
}

/**
 * With Θ_jk(s,t) = δ_jk D_j(s,t) + m_jk(s,t): `trace` Σ_j tr Θ_jj, `squares` Σ_jk (tr Θ_jk)², `crossed` Σ_jk tr(Θ_jk²).
 */
function pairedMoments(clustered: Clustered, ts: readonly Float64Array[]): { trace: number; squares: number; crossed: number } {
  const q = ts.length;
  const { count, metric } = clustered;
  const pieces = ts.map((t) => clustered.satterthwaite!(t));
  const { m } = pieces[0];
  const w = q * m;
  const moment = new Float64Array(w * w);
  let trace = 0;
  let squares = 0;
  let crossed = 0;
  const d = new Float64Array(q * q);
  const own = new Float64Array(q * q);
  for (let j = 0; j < count; j++) {
    for (let s = 0; s < q; s++) {
      for (let t = 0; t < q; t++) {
        let share = 0;
        let mixed = 0;
        for (let a = 0; a < m; a++) {
          share += pieces[s].kappa[2 * j * m + a] * pieces[t].kappa[(2 * j + 1) * m + a];
          mixed += metric![a] * pieces[s].g[j * m + a] * pieces[t].g[j * m + a];
        }
        d[s * q + t] = share;
        own[s * q + t] = mixed;
      }
    }
    let trD = 0;
    let trM = 0;
    for (let s = 0; s < q; s++) {
      trD += d[s * q + s];
      trM += own[s * q + s];
      for (let t = 0; t < q; t++) {
        // tr((D + M)²) − tr(M²)
        const both = (d[s * q + t] + own[s * q + t]) * (d[t * q + s] + own[t * q + s]);
        crossed += both - own[s * q + t] * own[t * q + s];
      }
    }
    trace += trD + trM;
    squares += trD * trD + 2 * trD * trM;
    for (let s = 0; s < q; s++) {
      for (let a = 0; a < m; a++) {
        const left = pieces[s].g[j * m + a];
        if (left === 0) continue;
        const row = (s * m + a) * w;
        for (let t = 0; t < q; t++) for (let b = 0; b < m; b++) moment[row + t * m + b] += left * pieces[t].g[j * m + b];
      }
    }
  }
  for (let s = 0; s < q; s++) {
    for (let a = 0; a < m; a++) {
      for (let t = 0; t < q; t++) {
        for (let b = 0; b < m; b++) {
          const weight = metric![a] * metric![b];
          squares += weight * moment[(s * m + a) * w + t * m + b] ** 2;
          crossed += weight * moment[(s * m + a) * w + t * m + b] * moment[(t * m + a) * w + s * m + b];
        }
      }
    }
  }
  return { trace, squares, crossed };
}
