import type { Problem } from "../engine/findings";

/** The text of a file with every line end as one line feed, a byte-order mark left out; or why its bytes are no text. */
export type Decoded = { readonly ok: true; readonly text: string } | { readonly ok: false; readonly problem: Problem };

/** More bytes than this do not fit in one string. */
export const TEXT_LIMIT = 500_000_000;
/** Bytes looked at to tell UTF-16 without a mark. */
const LOOK = 4096;
const [LF, CR] = [10, 13];

/** UTF-8 with or without a byte-order mark, UTF-16 with one, or UTF-16 told by its zero bytes. A file with a zero character is no text. */
export function decode(bytes: Uint8Array): Decoded {
  if (bytes.length > TEXT_LIMIT) return { ok: false, problem: { code: "too-large", bytes: bytes.length, limit: TEXT_LIMIT } };
  const encoding = encodingOf(bytes);
  let text: string;
  try {
    text = new TextDecoder(encoding, { fatal: true }).decode(bytes);
  } catch {
    const line = encoding === "utf-8" ? firstBadLine(bytes) : firstBadUnit(bytes, encoding === "utf-16le" ? 1 : 0);
    return { ok: false, problem: { code: "bad-encoding", line } };
  }
  // A second mark is a blank to everything behind; papaparse would take it off and put the lines out by one.
  while (text.startsWith("\ufeff")) text = text.slice(1);
  if (text.includes("\r")) text = text.replace(/\r\n?/g, "\n");
  const zero = text.indexOf("\0");
  if (zero >= 0) return { ok: false, problem: { code: "bad-encoding", line: text.slice(0, zero).split("\n").length } };
  return { ok: true, text };
}

function encodingOf(bytes: Uint8Array): "utf-8" | "utf-16le" | "utf-16be" {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return "utf-16le";
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return "utf-16be";
  // Separators, digits and line ends have a zero byte in UTF-16, always on the same side; in UTF-8 no character of a text has one.
  const look = bytes.subarray(0, Math.min(bytes.length & ~1, LOOK));
  if (isWide(look, 1)) return "utf-16le";
  return isWide(look, 0) ? "utf-16be" : "utf-8";
}

/** Whether the bytes look like UTF-16 whose high bytes stand at odd (1) or even (0) places: zeros there and nowhere else, a line end among them. */
function isWide(look: Uint8Array, high: 0 | 1): boolean {
  let zeros = 0;
  let hasLineEnd = false;
  for (let i = 0; i < look.length; i += 2) {
    const low = look[i + 1 - high];
    if (low === 0) return false;
    if (look[i + high] !== 0) continue;
    zeros++;
    hasLineEnd ||= low === LF || low === CR;
  }
  return hasLineEnd && zeros * 20 > look.length;
}

/** Line of the first bytes that are not UTF-8. A line end is never part of a longer sequence, so lines can be tried one by one. */
function firstBadLine(bytes: Uint8Array): number {
  const decoder = new TextDecoder("utf-8", { fatal: true });
  let line = 1;
  let start = 0;
  for (let i = 0; i < bytes.length; i++) {
    if (bytes[i] !== LF && bytes[i] !== CR) continue;
    if (!isGood(decoder, bytes.subarray(start, i))) return line;
    if (bytes[i] === CR && bytes[i + 1] === LF) i++;
    start = i + 1;
    line++;
  }
  return line;
}

function isGood(decoder: TextDecoder, bytes: Uint8Array): boolean {
  try {
    decoder.decode(bytes);
    return true;
  } catch {
    return false;
  }
}

/** Line of the first half of a surrogate pair without its other half, or of the odd byte at the end. @param high offset of a unit's high byte */
function firstBadUnit(bytes: Uint8Array, high: 0 | 1): number {
  const unit = (i: number) => (bytes[i + high] << 8) | bytes[i + 1 - high];
  let line = 1;
  for (let i = 0; i + 1 < bytes.length; i += 2) {
    const here = unit(i);
    if (here === LF || (here === CR && (i + 3 >= bytes.length || unit(i + 2) !== LF))) line++;
    if (here < 0xd800 || here > 0xdfff) continue;
    const next = i + 3 < bytes.length ? unit(i + 2) : 0;
    if (here > 0xdbff || next < 0xdc00 || next > 0xdfff) return line;
    i += 2;
  }
  return line;
}
