/**
 * The one place where numbers are rounded for people (DESIGN, Digits). Minus is U+2212, thousands are set off by commas, whatever the locale.
 */
const MINUS = "−";
/** Beyond these sizes a number is written as a power of ten. */
const [LARGE, SMALL] = [1e9, 1e-5];

/**
 * Decimals (negative: tens, hundreds) that keep a standard error's second significant digit; the most any of the given errors asks for, so
 * that a column is alike. Zero errors and nulls ask for nothing; with none left, four significant digits of `size` are kept.
 */
export function decimalsFor(errors: readonly (number | null)[], size: number): number {
  const wanted = errors.filter((e): e is number => e !== null && e > 0).map((e) => 1 - exponentOf(e));
  const decimals = wanted.length > 0 ? Math.max(...wanted) : 3 - exponentOf(size);
  return Math.max(-300, Math.min(300, decimals));
}

/** Power of ten of the leading digit, after rounding to two digits (0.0996 counts as 0.10). 0 for 0. */
function exponentOf(x: number): number {
  return x === 0 ? 0 : Number(Math.abs(x).toExponential(1).split("e")[1]);
}

/** A number at a decimal place. `signed` puts + before positive ones. */
export function fixed(value: number, decimals: number, signed = false): string {
  const size = Math.abs(value);
  const rounded =
    decimals >= 0 ? size.toFixed(Math.min(decimals, 100)) : String(Math.round(size / 10 ** -decimals) * 10 ** -decimals);
  const isZero = Number(rounded) === 0;
  const sign = isZero ? "" : value < 0 ? MINUS : signed ? "+" : "";
  if (!isZero && (size >= LARGE || size < SMALL)) return sign + powerOfTen(size, Math.max(1, exponentOf(size) + decimals));
  return sign + grouped(rounded);
}

/** A number with so many significant digits and no trailing zeros after the point: values of a covariate, shares of a scale. */
export function significant(value: number, digits = 3): string {
  if (value === 0) return "0";
  const size = Math.abs(value);
  const sign = value < 0 ? MINUS : "";
  if (size >= LARGE || size < SMALL) return sign + powerOfTen(size, digits - 1);
  const decimals = Math.max(0, digits - 1 - exponentOf(size));
  return sign + grouped(trimZeros(size.toFixed(Math.min(decimals, 100))));
}

/** A number as it was given (a margin, a step): every digit it has. */
export function exactly(value: number): string {
  const size = Math.abs(value);
  const sign = value < 0 ? MINUS : "";
  if (size !== 0 && (size >= LARGE || size < SMALL)) return sign + powerOfTen(size, null);
  return sign + grouped(String(size));
}

/** "1,204". */
export function count(n: number): string {
  return grouped(String(n));
}

/** "12 %", "0.4 %", "< 0.1 %", "> 99.9 %" of a share in [0, 1]: a part is never rounded to nothing or to the whole. */
export function percent(share: number): string {
  const value = 100 * share;
  if (value > 0 && value < 0.1) return "< 0.1 %";
  if (value > 99.9 && value < 100) return "> 99.9 %";
  const atAnEnd = (value > 0 && value < 0.95) || (value >= 99.5 && value < 100);
  return `${value.toFixed(atAnEnd ? 1 : 0)} %`;
}

/** "95 %", "99.9 %" of a level. */
export function levelName(level: number): string {
  return `${Number((100 * level).toPrecision(10))} %`;
}

/** "p = 0.012", "p < 0.001". */
export function pValue(p: number): string {
  if (p < 0.001) return "p < 0.001";
  return p > 0.9995 && p < 1 ? "p > 0.999" : `p = ${p.toFixed(3)}`;
}

function grouped(digits: string): string {
  const [whole, part] = digits.split(".");
  return whole.replace(/\B(?=(\d{3})+$)/g, ",") + (part ? `.${part}` : "");
}

function trimZeros(digits: string): string {
  return digits.includes(".") ? digits.replace(/\.?0+$/, "") : digits;
}

function powerOfTen(size: number, decimals: number | null): string {
  const [mantissa, exponent] = (decimals === null ? size.toExponential() : size.toExponential(Math.min(decimals, 100))).split(
    "e",
  );
  return `${mantissa} × 10^${exponent.replace("+", "").replace("-", MINUS)}`;
}
