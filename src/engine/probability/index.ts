import betainc from "@stdlib/math-base-special-betainc";
import betaln from "@stdlib/math-base-special-betaln";
import startingQuantile from "@stdlib/stats-base-dists-t-quantile";

/**
 * The distributions that p values and intervals rest on, in one place: tails by the incomplete beta function, never as 1 − cdf.
 * Degrees of freedom may be any positive number. Checked against R's pt, pf, qt and qf in test/engine/probability.
 */

/** P(|T| ≥ |t|) for Student's t. */
export function tTwoSided(t: number, df: number): number {
  if (t === 0) return 1;
  const square = t * t;
  if (square === Infinity) return 0;
  // the smaller of the two arguments keeps its digits
  return square < df
    ? betainc(square / (df + square), 0.5, df / 2, true, true)
    : betainc(df / (df + square), df / 2, 0.5, true, false);
}

/** P(T ≥ t). */
export function tCdfUpper(t: number, df: number): number {
  const half = tTwoSided(t, df) / 2;
  return t >= 0 ? half : 1 - half;
}

/** The t with P(T ≤ t) = p, 0 < p < 1; a textbook start polished by Newton steps on the upper tail. */
export function tQuantile(p: number, df: number): number {
  if (p === 0.5) return 0;
  if (p < 0.5) return -tQuantile(1 - p, df);
  return upperQuantile(1 - p, df);
}

/** The t with P(|T| ≤ t) = level, 0 < level < 1: the factor of a two-sided interval. */
export function tCritical(level: number, df: number): number {
  const key = `${level} ${df}`;
  let found = criticals.get(key);
  if (found === undefined) {
    if (criticals.size >= CRITICALS) criticals.clear();
    criticals.set(key, (found = upperQuantile((1 - level) / 2, df)));
  }
  return found;
}

/** Thousands of sets ask for the same few: kept, up to a number. */
const CRITICALS = 10_000;
const criticals = new Map<string, number>();

function upperQuantile(tail: number, df: number): number {
  let t = startingQuantile(1 - tail, df);
  if (!Number.isFinite(t) || t <= 0) t = 1;
  for (let step = 0; step < 20; step++) {
    const density = Math.exp(-((df + 1) / 2) * Math.log1p((t * t) / df) - betaln(0.5, df / 2)) / Math.sqrt(df);
    const change = (tTwoSided(t, df) / 2 - tail) / density;
    const next = t + change;
    if (!Number.isFinite(next)) break;
    t = next > 0 ? next : t / 2;
    if (Math.abs(change) <= 1e-15 * t) break;
  }
  return t;
}

/** P(F ≥ f) on df1 and df2 degrees of freedom. */
export function fUpper(f: number, df1: number, df2: number): number {
  if (f <= 0) return 1;
  if (f === Infinity) return 0;
  const x = df1 * f;
  return x < df2 ? betainc(x / (df2 + x), df1 / 2, df2 / 2, true, true) : betainc(df2 / (df2 + x), df2 / 2, df1 / 2, true, false);
}

/** The f with P(F ≥ f) = tail, 0 < tail < 1, by bisection on the logarithm and Newton's last steps. */
export function fQuantileUpper(tail: number, df1: number, df2: number): number {
  let low = -800;
  let high = 700;
  for (let step = 0; step < 200 && high - low > 1e-15 * Math.max(1, Math.abs(low)); step++) {
    const middle = (low + high) / 2;
    if (fUpper(Math.exp(middle), df1, df2) > tail) low = middle;
    else high = middle;
  }
  return Math.exp((low + high) / 2);
}
