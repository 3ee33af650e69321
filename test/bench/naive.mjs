// The refit that a careful program without tricks makes of one set: its own design, normal equations by Cholesky on centred columns,
// residuals and leverages of every row, HC3 of the exposure. In typed arrays, so that what is compared is the method, not the data types.

/**
 * @param y outcome, length n
 * @param columns exposure first, then the set's covariates; each of length n
 * @returns estimate and HC3 standard error of the exposure
 */
export function naiveRefit(y, columns) {
  const n = y.length;
  const p = columns.length;
  const x = columns.map(centred);
  const out = centred(y);
  const gram = x.map((a) => x.map((b) => dot(a, b)));
  const lower = cholesky(gram);
  const inverse = x.map((_, j) =>
    solve(
      lower,
      x.map((__, i) => (i === j ? 1 : 0)),
    ),
  );
  const b = solve(
    lower,
    x.map((column) => dot(column, out)),
  );
  let sum = 0;
  const row = new Float64Array(p);
  for (let i = 0; i < n; i++) {
    let e = out[i];
    let h = 1 / n;
    let along = 0;
    for (let j = 0; j < p; j++) {
      row[j] = x[j][i];
      e -= b[j] * row[j];
      along += inverse[0][j] * row[j];
    }
    for (let j = 0; j < p; j++) for (let k = 0; k < p; k++) h += row[j] * inverse[j][k] * row[k];
    sum += ((along * e) / (1 - h)) ** 2;
  }
  return { estimate: b[0], standardError: Math.sqrt(sum) };
}

function centred(values) {
  let sum = 0;
  for (let i = 0; i < values.length; i++) sum += values[i];
  const mean = sum / values.length;
  const out = new Float64Array(values.length);
  for (let i = 0; i < values.length; i++) out[i] = values[i] - mean;
  return out;
}

function dot(a, b) {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}

function cholesky(a) {
  const lower = a.map(() => new Float64Array(a.length));
  for (let i = 0; i < a.length; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = a[i][j];
      for (let k = 0; k < j; k++) sum -= lower[i][k] * lower[j][k];
      lower[i][j] = i === j ? Math.sqrt(sum) : sum / lower[j][j];
    }
  }
  return lower;
}

function solve(lower, right) {
  const p = right.length;
  const out = Float64Array.from(right);
  for (let i = 0; i < p; i++) {
    for (let k = 0; k < i; k++) out[i] -= lower[i][k] * out[k];
    out[i] /= lower[i][i];
  }
  for (let i = p - 1; i >= 0; i--) {
    for (let k = i + 1; k < p; k++) out[i] -= lower[k][i] * out[k];
    out[i] /= lower[i][i];
  }
  return out;
}
