/**
 * The words inside a marker, `key=value key=value`, as an HTML comment in Markdown may hold them. Percent signs and UTF-8 bytes as in an
 * address (RFC 3986), but only for what an HTML comment, a Markdown table or the list itself would act on: the rest stays readable.
 */

/** What is encoded: blanks, controls, halves of a character, marks of HTML, tables, code and formulas, and a hyphen before another. */
const ENCODED = /[\s%<>&`|$\\\p{C}]|-(?=-)/gu;

/** A value as it stands in a marker: holds no blank, no `>` and no `--`. */
export function encodeValue(value: string): string {
  return value.replace(ENCODED, percent);
}

/** Names as one value, separated by commas; a comma inside a name is encoded. No names are an empty value. */
export function encodeNames(names: readonly string[]): string {
  return names.map((name) => (name === "" ? "%00" : encodeValue(name).replaceAll(",", "%2C"))).join(",");
}

/** The value again; null where it was not encoded by `encodeValue`. */
export function decodeValue(value: string): string | null {
  try {
    return decodeURIComponent(value);
  } catch {
    return null;
  }
}

/** The names again; null where they were not encoded by `encodeNames`. */
export function decodeNames(value: string): string[] | null {
  if (value === "") return [];
  const names = value.split(",").map(decodeValue);
  return names.includes(null) ? null : names.map((name) => (name === "\0" ? "" : name!));
}

/** `key=value` pairs, values as they stand; null where a piece is no pair or a key comes twice. */
export function readPairs(text: string): Map<string, string> | null {
  const pairs = new Map<string, string>();
  for (const piece of text.split(/\s+/)) {
    if (piece === "") continue;
    const at = piece.indexOf("=");
    if (at <= 0 || pairs.has(piece.slice(0, at))) return null;
    pairs.set(piece.slice(0, at), piece.slice(at + 1));
  }
  return pairs;
}

/** The pairs as text; a value of undefined is left out. Values are encoded already. */
export function writePairs(pairs: Readonly<Record<string, string | undefined>>): string {
  return Object.entries(pairs)
    .flatMap(([key, value]) => (value === undefined ? [] : [`${key}=${value}`]))
    .join(" ");
}

function percent(c: string): string {
  // encodeURIComponent leaves a hyphen alone and cannot encode half a character
  if (c === "-") return "%2D";
  return /\p{Surrogate}/u.test(c) ? "%EF%BF%BD" : encodeURIComponent(c);
}
