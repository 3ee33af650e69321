/**
 * Natural order of level names: runs of digits compare as numbers, letter case is ignored, ties go by code point.
 * Negative before, zero when the same string, positive after.
 */
export function naturalCompare(a: string, b: string): number {
  const left = pieces(a);
  const right = pieces(b);
  for (let i = 0; i < Math.min(left.length, right.length); i++) {
    const [x, y] = [left[i], right[i]];
    if (isDigits(x) && isDigits(y)) {
      const byLength = significant(x).length - significant(y).length;
      if (byLength !== 0) return byLength;
      if (significant(x) !== significant(y)) return significant(x) < significant(y) ? -1 : 1;
    } else {
      const [u, v] = [x.toLowerCase(), y.toLowerCase()];
      if (u !== v) return byCodePoint(u, v);
    }
  }
  return left.length - right.length || byCodePoint(a, b);
}

const pieces = (text: string): string[] => text.match(/\d+|\D+/g) ?? [];
const isDigits = (text: string): boolean => /^\d/.test(text);
const significant = (digits: string): string => digits.replace(/^0+(?=\d)/, "");

function byCodePoint(a: string, b: string): number {
  const x = [...a];
  const y = [...b];
  for (let i = 0; i < Math.min(x.length, y.length); i++) {
    const step = x[i].codePointAt(0)! - y[i].codePointAt(0)!;
    if (step !== 0) return step;
  }
  return x.length - y.length;
}
