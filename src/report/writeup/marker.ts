import { decodeNames, decodeValue, encodeNames, encodeValue, readPairs, writePairs } from "./attributes";
import { readPrinted } from "./printed";
import type { Printed } from "./printed";

/** The form of markers and of what they remember. Another number is from another version of Slantwise. */
export const FORMAT = "1";

/** What the opening marker of a block remembers. */
export interface BlockMarker {
  /** Path of the plan, relative to the document's folder, parts separated by `/`. */
  readonly plan: string;
  /** Fingerprint of the plan's contents (writeup/plan), 64 lower-case hex digits. */
  readonly planSha: string;
  /** SHA-256 of the data's bytes. */
  readonly dataSha: string;
  /** Fingerprint of the block's text as `normalText` leaves it. */
  readonly textSha: string;
  /** YYYY-MM-DD of the writing. */
  readonly date: string;
  /** How often a refresh found the plan changed since the block was first written. */
  readonly planChanges: number;
  /** What was printed, for saying later what it was. */
  readonly printed: Printed;
}

/** What an inline number is. */
export type Figure = (typeof FIGURES)[number];
export const FIGURES = ["estimate", "low", "high", "shift", "rows", "p"] as const;

/** What the marker of an inline number asks for. */
export interface ValueMarker {
  readonly plan: string;
  /** Columns held fixed; null: the reported set. */
  readonly set: readonly string[] | null;
  /** A level of the exposure; null: the only contrast. */
  readonly contrast: string | null;
  readonly of: Figure;
  /** Decimals; null: as a sentence would have them. */
  readonly digits: number | null;
  /** The text as last written; null in a marker written by hand. */
  readonly was: string | null;
}

/** What is wrong with a marker; report/wording/writeup says it. */
export type MarkerFault =
  | { readonly code: "not-pairs" }
  | { readonly code: "format"; readonly found: string }
  | { readonly code: "lacks"; readonly key: string }
  | { readonly code: "unknown"; readonly key: string }
  | { readonly code: "bad"; readonly key: string };

export type MarkerRead<T> = { readonly ok: true; readonly marker: T } | { readonly ok: false; readonly fault: MarkerFault };

const HASH = /^[0-9a-f]{64}$/;

/** The opening marker of a block as a comment. */
export function writeBlockMarker(marker: BlockMarker): string {
  const pairs = writePairs({
    format: FORMAT,
    plan: encodeValue(marker.plan),
    date: encodeValue(marker.date),
    "plan-sha": marker.planSha,
    "plan-changes": String(marker.planChanges),
    "data-sha": marker.dataSha,
    "text-sha": marker.textSha,
    printed: encodeValue(JSON.stringify(marker.printed)),
  });
  return `<!-- slantwise:begin ${pairs} -->`;
}

export const END_MARKER = "<!-- slantwise:end -->";

/** The pairs of an opening marker. */
export function readBlockMarker(text: string): MarkerRead<BlockMarker> {
  const keys = ["format", "plan", "date", "plan-sha", "plan-changes", "data-sha", "text-sha", "printed"];
  const read = readKeys(text, keys, keys);
  if (!("values" in read)) return read;
  const get = (key: string) => read.values.get(key)!;
  if (get("format") !== FORMAT) return fail({ code: "format", found: get("format") });
  for (const key of ["plan-sha", "data-sha", "text-sha"]) if (!HASH.test(get(key))) return fail({ code: "bad", key });
  if (!/^\d{1,6}$/.test(get("plan-changes"))) return fail({ code: "bad", key: "plan-changes" });
  const printed = readPrinted(get("printed"));
  if (!printed) return fail({ code: "bad", key: "printed" });
  return {
    ok: true,
    marker: {
      plan: get("plan"),
      date: get("date"),
      planSha: get("plan-sha"),
      planChanges: Number(get("plan-changes")),
      dataSha: get("data-sha"),
      textSha: get("text-sha"),
      printed,
    },
  };
}

/** The opening marker of an inline number as a comment. */
export function writeValueMarker(marker: ValueMarker): string {
  const pairs = writePairs({
    plan: encodeValue(marker.plan),
    set: marker.set ? encodeNames(marker.set) : undefined,
    contrast: marker.contrast === null ? undefined : encodeValue(marker.contrast),
    of: marker.of,
    digits: marker.digits === null ? undefined : String(marker.digits),
    was: marker.was === null ? undefined : encodeValue(marker.was),
  });
  return `<!-- slantwise:value ${pairs} -->`;
}

export const VALUE_END = "<!-- /slantwise:value -->";

/** The pairs of an inline number's marker. */
export function readValueMarker(text: string): MarkerRead<ValueMarker> {
  const read = readKeys(text, ["plan", "of"], ["plan", "set", "contrast", "of", "digits", "was"]);
  if (!("values" in read)) return read;
  const of = FIGURES.find((figure) => figure === read.values.get("of"));
  if (!of) return fail({ code: "bad", key: "of" });
  const set = read.raw.get("set");
  const names = set === undefined ? null : decodeNames(set);
  if (set !== undefined && !names) return fail({ code: "bad", key: "set" });
  const digits = read.values.get("digits") ?? null;
  const counted = of === "rows" || of === "p"; // these have digits of their own
  if (digits !== null && (counted || !/^\d{1,2}$/.test(digits))) return fail({ code: "bad", key: "digits" });
  return {
    ok: true,
    marker: {
      plan: read.values.get("plan")!,
      set: names,
      contrast: read.values.get("contrast") ?? null,
      of,
      digits: digits === null ? null : Number(digits),
      was: read.values.get("was") ?? null,
    },
  };
}

function readKeys(text: string, needed: readonly string[], known: readonly string[]) {
  const raw = readPairs(text);
  if (!raw) return fail({ code: "not-pairs" });
  // another format may have other keys: say that, not which keys
  const format = raw.get("format");
  if (format !== undefined && format !== FORMAT) return fail({ code: "format", found: decodeValue(format) ?? format });
  for (const key of raw.keys()) if (!known.includes(key)) return fail({ code: "unknown", key });
  for (const key of needed) if (!raw.get(key)) return fail({ code: "lacks", key });
  const values = new Map<string, string>();
  for (const [key, value] of raw) {
    const decoded = decodeValue(value);
    if (decoded === null) return fail({ code: "bad", key });
    values.set(key, decoded);
  }
  return { values, raw };
}

const fail = (fault: MarkerFault) => ({ ok: false as const, fault });
