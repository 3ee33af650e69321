/** a'Mb of a row-major p × p matrix. */
export function quadratic(matrix: Float64Array, a: Float64Array, b: Float64Array): number {
  const p = a.length;
  let sum = 0;
  for (let i = 0; i < p; i++) {
    if (a[i] === 0) continue;
    let row = 0;
    for (let j = 0; j < p; j++) row += matrix[i * p + j] * b[j];
    sum += a[i] * row;
  }
  return sum;
}

/** P·M·P' for an upper triangle P and a symmetric M, both row-major p × p. */
export function sandwich(upper: Float64Array, meat: Float64Array, p: number): Float64Array {
  const half = new Float64Array(p * p);
  for (let i = 0; i < p; i++) {
    for (let j = 0; j < p; j++) {
      let sum = 0;
      for (let k = i; k < p; k++) sum += upper[i * p + k] * meat[k * p + j];
      half[i * p + j] = sum;
    }
  }
  const out = new Float64Array(p * p);
  for (let i = 0; i < p; i++) {
    for (let j = i; j < p; j++) {
      let sum = 0;
      for (let k = j; k < p; k++) sum += half[i * p + k] * upper[j * p + k];
      out[i * p + j] = sum;
      out[j * p + i] = sum;
    }
  }
  return out;
}

/** U'·v of a row-major upper triangle U. */
export function transposedTimes(upper: Float64Array, v: Float64Array): Float64Array {
  const p = v.length;
  const out = new Float64Array(p);
  for (let i = 0; i < p; i++) if (v[i] !== 0) for (let j = i; j < p; j++) out[j] += upper[i * p + j] * v[i];
  return out;
}
