/**
 * Sums in doubled precision by error-free transformations (Knuth's two-sum, Dekker's product with Veltkamp's split; Ogita, Rump & Oishi
 * 2005): as if computed with about 32 digits, then rounded once.
 */
const SPLIT = 134217729; // 2^27 + 1

/** y − r − Xb, one value a row. @param columns each of length n */
export function residualDoubled(
  y: Float64Array,
  r: Float64Array,
  columns: readonly Float64Array[],
  b: Float64Array,
): Float64Array {
  const n = y.length;
  const high = Float64Array.from(y);
  const low = new Float64Array(n);
  const add = (value: number, error: number, i: number) => {
    const sum = high[i] + value;
    const part = sum - high[i];
    low[i] += high[i] - (sum - part) + (value - part) + error;
    high[i] = sum;
  };
  for (let i = 0; i < n; i++) add(-r[i], 0, i);
  columns.forEach((x, k) => {
    const t = SPLIT * b[k];
    const b1 = t - (t - b[k]);
    const b2 = b[k] - b1;
    for (let i = 0; i < n; i++) {
      const product = x[i] * b[k];
      const s = SPLIT * x[i];
      const x1 = s - (s - x[i]);
      const x2 = x[i] - x1;
      const error = x2 * b2 - (product - x1 * b1 - x2 * b1 - x1 * b2);
      add(-product, -error, i);
    }
  });
  for (let i = 0; i < n; i++) high[i] += low[i];
  return high;
}

/** x·y. Both of the same length. */
export function dotDoubled(x: Float64Array, y: Float64Array): number {
  let high = 0;
  let low = 0;
  for (let i = 0; i < x.length; i++) {
    const product = x[i] * y[i];
    const s = SPLIT * x[i];
    const x1 = s - (s - x[i]);
    const x2 = x[i] - x1;
    const t = SPLIT * y[i];
    const y1 = t - (t - y[i]);
    const y2 = y[i] - y1;
    const error = x2 * y2 - (product - x1 * y1 - x2 * y1 - x1 * y2);
    const sum = high + product;
    const part = sum - high;
    low += high - (sum - part) + (product - part) + error;
    high = sum;
  }
  return high + low;
}
