/**
 * Arrays of one file's columns, kept between readings: the first touch of fresh memory costs more than reading the file does.
 * The table that was read last stands in these arrays, so a new reading with the same memory makes it invalid.
 */
export class ReaderMemory {
  /** By column; a column is numbers or codes. */
  numbers: Float64Array[] = [];
  codes: Int32Array[] = [];
  lines = new Uint32Array(0);
}

/** A kept array that is large enough, or a fresh one. */
export function takeNumbers(kept: Float64Array | undefined, length: number): Float64Array {
  return kept && kept.length >= length ? kept : new Float64Array(length);
}

/** As takeNumbers, for codes. */
export function takeCodes(kept: Int32Array | undefined, length: number): Int32Array {
  return kept && kept.length >= length ? kept : new Int32Array(length);
}
