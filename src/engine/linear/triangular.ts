/** Inverse of an upper triangle, row-major p × p, its diagonal free of zeros. */
export function invertUpper(triangle: Float64Array, p: number): Float64Array {
  const inverse = new Float64Array(p * p);
  for (let j = 0; j < p; j++) {
    inverse[j * p + j] = 1 / triangle[j * p + j];
    for (let i = j - 1; i >= 0; i--) {
      let sum = 0;
      for (let k = i + 1; k <= j; k++) sum += triangle[i * p + k] * inverse[k * p + j];
      inverse[i * p + j] = -sum / triangle[i * p + i];
    }
  }
  return inverse;
}

/** U·U' of an upper triangle U, row-major p × p, symmetric to the last bit. */
export function outer(upper: Float64Array, p: number): Float64Array {
  const product = new Float64Array(p * p);
  for (let i = 0; i < p; i++) {
    for (let j = i; j < p; j++) {
      let sum = 0;
      for (let k = j; k < p; k++) sum += upper[i * p + k] * upper[j * p + k];
      product[i * p + j] = sum;
      product[j * p + i] = sum;
    }
  }
  return product;
}
