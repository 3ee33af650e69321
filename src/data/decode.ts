/** The text of a file, or the line at which its bytes are not the encoding they seem to be. A byte-order mark is left out of the text. */
export type Decoded = { readonly ok: true; readonly text: string } | { readonly ok: false; readonly line: number };

/** UTF-8 with or without a byte-order mark, UTF-16 with one, or UTF-16 told by its zero bytes. */
export function decode(bytes: Uint8Array): Decoded {
  const encoding = encodingOf(bytes);
  try {
    return { ok: true, text: new TextDecoder(encoding, { fatal: true }).decode(bytes) };
  } catch {
    return { ok: false, line: encoding === "utf-8" ? firstBadLine(bytes) : 1 };
  }
}

function encodingOf(bytes: Uint8Array): "utf-8" | "utf-16le" | "utf-16be" {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return "utf-16le";
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return "utf-16be";
  // Header text is mostly ASCII: in UTF-16 every other byte of it is 0.
  const look = Math.min(bytes.length & ~1, 64);
  let even = 0;
  let odd = 0;
  for (let i = 0; i < look; i += 2) {
    if (bytes[i] === 0) even++;
    if (bytes[i + 1] === 0) odd++;
  }
  if (look >= 4 && odd * 4 > look && even === 0) return "utf-16le";
  if (look >= 4 && even * 4 > look && odd === 0) return "utf-16be";
  return "utf-8";
}

function firstBadLine(bytes: Uint8Array): number {
  let line = 1;
  let start = 0;
  const decoder = new TextDecoder("utf-8", { fatal: true });
  for (let i = 0; i <= bytes.length; i++) {
    if (i < bytes.length && bytes[i] !== 10) continue;
    try {
      decoder.decode(bytes.subarray(start, i));
    } catch {
      return line;
    }
    start = i + 1;
    line++;
  }
  return line;
}
