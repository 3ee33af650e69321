/** 10^0 to 10^22: the powers of ten that a double holds exactly. */
export const POWERS = Float64Array.from({ length: 23 }, (_, i) => Number(`1e${i}`));

const [PLUS, MINUS] = [43, 45];
/** The byte of a decimal point. */
export const POINT = 46;
/** Digits of a number kept in one half; both halves and their scaling are exact in doubles. */
const HALF = 9;

/**
 * The number written in bytes [from, to) with the decimal mark `mark`, correctly rounded like Number() of the same text with a point, or NaN where it is none: optional sign, digits with an
 * optional point, optional exponent. Infinite beyond double range.
 *
 * Up to 15 digits: one exact integer, multiplied or divided once by an exact power of ten (Clinger 1990, "How to read floating point numbers
 * accurately"). 16 to 18 digits, as programs write doubles in full: a quotient in doubled precision, taken where its error bound proves the
 * rounding. Everything else is left to Number().
 */
export function parseNumber(bytes: Uint8Array, from: number, to: number, mark: number = POINT): number {
  const negative = bytes[from] === MINUS;
  let i = negative || bytes[from] === PLUS ? from + 1 : from;
  let high = 0;
  let low = 0;
  let digits = 0; // from the first that is not 0
  let seen = 0;
  let point = -1;
  for (; i < to; i++) {
    const digit = bytes[i] - 48;
    if (digit >= 0 && digit <= 9) {
      seen++;
      if (digits === 0 && digit === 0) continue;
      digits++;
      if (digits <= HALF) high = high * 10 + digit;
      else if (digits <= 2 * HALF) low = low * 10 + digit;
    } else if (bytes[i] === mark && point < 0) point = seen;
    else break;
  }
  if (seen === 0) return NaN;
  let exponent = point < 0 ? 0 : point - seen;
  if (i < to) {
    const written = readExponent(bytes, i, to);
    if (written !== written) return NaN;
    exponent += written;
  }
  const value = digits === 0 ? 0 : scale(high, low, digits, exponent);
  if (value !== value) return Number(textOf(bytes, from, to, mark));
  return negative ? -value : value;
}

/** (high · 10^(digits − 9) + low) · 10^exponent, correctly rounded, or NaN where that is not proved. */
function scale(high: number, low: number, digits: number, exponent: number): number {
  if (digits > 2 * HALF || exponent < -22 || exponent > 22) return NaN;
  const raised = digits > HALF ? high * POWERS[digits - HALF] : high;
  const whole = raised + low;
  if (digits <= 15) return exponent < 0 ? whole / POWERS[-exponent] : whole * POWERS[exponent];
  if (exponent === 0) return whole; // the sum of two exact doubles, rounded once
  return exponent < 0 ? divide(whole, low - (whole - raised), POWERS[-exponent]) : NaN;
}

/**
 * (a + b) / p rounded once, or NaN where the bound leaves the rounding open. a + b is exact with |b| ≤ ulp(a)/2, p exact.
 * The remainder a − qp is a double; with it the quotient q + c is known within 2^−102 of itself, so that where adding 2^−97 of it either way
 * rounds to the same double, so does the exact quotient.
 */
function divide(a: number, b: number, p: number): number {
  const q = a / p;
  const product = q * p;
  const c = (a - product - productError(q, p, product) + b) / p;
  const slack = q * 2 ** -97;
  const above = q + (c + slack);
  return above === q + (c - slack) ? above : NaN;
}

/** x·y − product exactly, where product = fl(x·y) (Dekker 1971). */
function productError(x: number, y: number, product: number): number {
  const xs = x * 134_217_729;
  const xh = xs - (xs - x);
  const xl = x - xh;
  const ys = y * 134_217_729;
  const yh = ys - (ys - y);
  const yl = y - yh;
  return xl * yl - (product - xh * yh - xl * yh - xh * yl);
}

/** The exponent written in bytes [from, to), its letter included; NaN where it is none. */
function readExponent(bytes: Uint8Array, from: number, to: number): number {
  if ((bytes[from] | 32) !== 101) return NaN;
  let i = from + 1;
  const negative = bytes[i] === MINUS;
  if (negative || bytes[i] === PLUS) i++;
  if (i >= to) return NaN;
  let exponent = 0;
  for (; i < to; i++) {
    const digit = bytes[i] - 48;
    if (digit < 0 || digit > 9) return NaN;
    exponent = Math.min(exponent * 10 + digit, 100_000);
  }
  return negative ? -exponent : exponent;
}

function textOf(bytes: Uint8Array, from: number, to: number, mark: number): string {
  let text = "";
  for (let k = from; k < to; k++) text += String.fromCharCode(bytes[k] === mark ? POINT : bytes[k]);
  return text;
}
