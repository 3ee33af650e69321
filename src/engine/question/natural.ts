/**
 * Natural order of level names: runs of digits compare as numbers, letter case is ignored, ties go by code point.
 * Negative before, zero when the same string, positive after. A total order.
 */
export function naturalCompare(a: string, b: string): number {
  return compareKeys(keyOf(a), keyOf(b));
}

/** Some indexes of the texts, by default all, in the natural order of their texts; every text is taken apart once. */
export function naturalSort(texts: readonly string[], indexes: readonly number[] = texts.map((_, i) => i)): number[] {
  const keys = texts.map(keyOf);
  return [...indexes].sort((i, j) => compareKeys(keys[i], keys[j]));
}

interface Key {
  readonly text: string;
  /** Runs of digits without leading zeros, and what stands between them in lower case. */
  readonly pieces: readonly string[];
  /** Whether the first piece is a run of digits; they alternate. */
  readonly digitsFirst: boolean;
}

function keyOf(text: string): Key {
  const pieces = text.match(/[0-9]+|[^0-9]+/g) ?? [];
  const digitsFirst = /^[0-9]/.test(text);
  return {
    text,
    digitsFirst,
    pieces: pieces.map((piece, i) => ((i % 2 === 0) === digitsFirst ? piece.replace(/^0+(?=.)/, "") : piece.toLowerCase())),
  };
}

function compareKeys(a: Key, b: Key): number {
  const shared = Math.min(a.pieces.length, b.pieces.length);
  for (let i = 0; i < shared; i++) {
    const x = a.pieces[i];
    const y = b.pieces[i];
    if (x === y) continue;
    const digits = a.digitsFirst === b.digitsFirst && (i % 2 === 0) === a.digitsFirst;
    return (digits && x.length - y.length) || byCodePoint(x, y);
  }
  return a.pieces.length - b.pieces.length || byCodePoint(a.text, b.text);
}

/** By code point: UTF-16 order differs from it where a surrogate meets one of U+E000 to U+FFFF. */
function byCodePoint(a: string, b: string): number {
  const shared = Math.min(a.length, b.length);
  for (let i = 0; i < shared; i++) {
    const x = a.charCodeAt(i);
    const y = b.charCodeAt(i);
    if (x !== y) return lift(x) - lift(y);
  }
  return a.length - b.length;
}

const lift = (unit: number): number => (unit < 0xd800 ? unit : unit >= 0xe000 ? unit - 0x800 : unit + 0x2000);
