const POWERS = Float64Array.from({ length: 23 }, (_, i) => 10 ** i);

/** What `parseNumber` returns for a cell that is no plain number. */
export const NOT_A_NUMBER = Number.NaN;

/**
 * The number written in bytes [from, to), correctly rounded, or NaN: optional sign, digits, optional point and digits, optional exponent.
 * Up to fifteen digits are one exact integer divided by one exact power of ten, which IEEE arithmetic rounds correctly (Clinger 1990);
 * longer ones are left to Number().
 */
export function parseNumber(bytes: Uint8Array, from: number, to: number): number {
  let i = from;
  const first = bytes[i];
  const negative = first === 45;
  if (negative || first === 43) i++;
  let mantissa = 0;
  let digits = 0;
  let decimals = 0;
  const start = i;
  for (; i < to; i++) {
    const digit = bytes[i] - 48;
    if (digit < 0 || digit > 9) break;
    mantissa = mantissa * 10 + digit;
  }
  digits = i - start;
  if (i < to && bytes[i] === 46) {
    i++;
    const point = i;
    for (; i < to; i++) {
      const digit = bytes[i] - 48;
      if (digit < 0 || digit > 9) break;
      mantissa = mantissa * 10 + digit;
    }
    decimals = i - point;
    digits += decimals;
  }
  if (digits === 0) return NOT_A_NUMBER;
  if (i === to && digits <= 15) {
    const value = decimals === 0 ? mantissa : mantissa / POWERS[decimals];
    return negative ? -value : value;
  }
  if (i < to && !isExponent(bytes, i, to)) return NOT_A_NUMBER;
  let text = "";
  for (let k = from; k < to; k++) text += String.fromCharCode(bytes[k]);
  return Number(text);
}

function isExponent(bytes: Uint8Array, from: number, to: number): boolean {
  if ((bytes[from] | 32) !== 101) return false;
  let i = from + 1;
  if (bytes[i] === 43 || bytes[i] === 45) i++;
  if (i >= to) return false;
  for (; i < to; i++) if (bytes[i] < 48 || bytes[i] > 57) return false;
  return true;
}
