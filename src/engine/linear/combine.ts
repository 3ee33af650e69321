/**
 * out[at + i] = Σ_k factors[k]·columns[k][start + i] for i < height: four columns a pass, so that the sums stay in registers.
 * The inner loop of everything that whitens rows.
 */
export function combineColumns(
  out: Float64Array,
  at: number,
  columns: readonly Float64Array[],
  factors: Float64Array,
  count: number,
  start: number,
  height: number,
): void {
  let k = 0;
  const end = start + height;
  const shift = at - start;
  if (count >= 4) {
    const [a, b, c, d] = [columns[0], columns[1], columns[2], columns[3]];
    const [fa, fb, fc, fd] = [factors[0], factors[1], factors[2], factors[3]];
    for (let i = start; i < end; i++) out[shift + i] = fa * a[i] + fb * b[i] + fc * c[i] + fd * d[i];
    k = 4;
  } else out.fill(0, at, at + height);
  for (; k + 4 <= count; k += 4) {
    const [a, b, c, d] = [columns[k], columns[k + 1], columns[k + 2], columns[k + 3]];
    const [fa, fb, fc, fd] = [factors[k], factors[k + 1], factors[k + 2], factors[k + 3]];
    for (let i = start; i < end; i++) out[shift + i] += fa * a[i] + fb * b[i] + fc * c[i] + fd * d[i];
  }
  for (; k < count; k++) {
    const a = columns[k];
    const f = factors[k];
    for (let i = start; i < end; i++) out[shift + i] += f * a[i];
  }
}

/** Column j of an upper triangle, rows 0 … j, for each j from `from` on: the factors `combineColumns` takes. */
export function triangleColumns(upper: Float64Array, p: number, from: number): Float64Array[] {
  return Array.from({ length: p - from }, (_, k) => {
    const j = from + k;
    return Float64Array.from({ length: j + 1 }, (_, i) => upper[i * p + j]);
  });
}
