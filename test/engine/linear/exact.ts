/** A rational number p/q in lowest terms, q > 0. */
type Rational = readonly [bigint, bigint];

/** A finite double as the rational it is. */
function rational(x: number): Rational {
  if (x === 0) return [0n, 1n];
  let exponent = 0;
  let mantissa = x;
  while (!Number.isInteger(mantissa)) {
    mantissa *= 2;
    exponent++;
  }
  return reduce([BigInt(mantissa), 1n << BigInt(exponent)]);
}

function gcd(a: bigint, b: bigint): bigint {
  let [x, y] = [a < 0n ? -a : a, b];
  while (y) [x, y] = [y, x % y];
  return x;
}

function reduce([p, q]: Rational): Rational {
  if (p === 0n) return [0n, 1n];
  const d = gcd(p, q);
  return [p / d, q / d];
}

const add = ([a, b]: Rational, [c, d]: Rational): Rational => reduce([a * d + c * b, b * d]);
const times = ([a, b]: Rational, [c, d]: Rational): Rational => reduce([a * c, b * d]);
const over = ([a, b]: Rational, [c, d]: Rational): Rational => (c < 0n ? reduce([-a * d, -b * c]) : reduce([a * d, b * c]));
const minus = (a: Rational, [c, d]: Rational): Rational => add(a, [-c, d]);

/** Rounded to a double: 40 digits by integer division, then Number. */
function toNumber([p, q]: Rational): number {
  const sign = p < 0n ? -1 : 1;
  const size = p < 0n ? -p : p;
  let shift = 0n;
  while ((size * 10n ** shift) / q < 10n ** 30n && size > 0n) shift += 10n;
  return sign * Number(`${(size * 10n ** shift) / q}e-${shift}`);
}

/** Least squares solved exactly on the doubles given, by the normal equations in rational arithmetic: the judge of the kernel. */
export function exactLeastSquares(columns: readonly Float64Array[], outcome: Float64Array): number[] {
  const p = columns.length;
  const x = columns.map((column) => Array.from(column, rational));
  const y = Array.from(outcome, rational);
  const dot = (a: readonly Rational[], b: readonly Rational[]) =>
    a.reduce<Rational>((sum, v, i) => add(sum, times(v, b[i])), [0n, 1n]);
  const rows = x.map((a) => [...x.map((b) => dot(a, b)), dot(a, y)]);
  for (let k = 0; k < p; k++) {
    for (let i = k + 1; i < p; i++) {
      const factor = over(rows[i][k], rows[k][k]);
      for (let j = k; j <= p; j++) rows[i][j] = minus(rows[i][j], times(factor, rows[k][j]));
    }
  }
  const solution: Rational[] = [];
  for (let i = p - 1; i >= 0; i--) {
    let rest = rows[i][p];
    for (let j = i + 1; j < p; j++) rest = minus(rest, times(rows[i][j], solution[j]));
    solution[i] = over(rest, rows[i][i]);
  }
  return solution.map(toNumber);
}
