import type { Line } from "./lines";
import { linesOf } from "./lines";
import { readBlockMarker } from "./marker";
import type { BlockMarker, MarkerFault, ValueMarker } from "./marker";
import { findValues } from "./values";

/** Where something stands in a document: UTF-16 offsets, `end` after the last character, and the 1-based line it begins on. */
export interface Place {
  readonly start: number;
  readonly end: number;
  readonly line: number;
}

/** A block, from its opening to its closing marker. */
export interface FoundBlock extends Place {
  readonly kind: "block";
  readonly marker: BlockMarker;
  /** The text between the two markers' lines. */
  readonly body: string;
  /** Blanks before the opening marker. */
  readonly indent: string;
  /** The line end the block is written with. */
  readonly ending: string;
}

/** An inline number, from its opening to its closing marker. */
export interface FoundValue extends Place {
  readonly kind: "value";
  readonly marker: ValueMarker;
  /** The text between the two markers. */
  readonly text: string;
}

/** Why a marker is left alone. */
export type BrokenReason =
  | { readonly code: "block-open" }
  | { readonly code: "block-end-alone" }
  | { readonly code: "not-alone" }
  | { readonly code: "value-open" }
  | { readonly code: "value-end-alone" }
  | { readonly code: "marker"; readonly of: "block" | "value"; readonly fault: MarkerFault };

/** A marker that cannot be used: reported, never touched. */
export interface FoundBroken extends Place {
  readonly kind: "broken";
  readonly reason: BrokenReason;
}

export type Found = FoundBlock | FoundValue | FoundBroken;

const STARTS = /^ {0,3}<!--\s*slantwise:(begin|end)(?![\w-])/;
const BEGIN = /^( {0,3})<!--\s*slantwise:begin(?:\s([^>]*?))?\s*-->\s*$/;
const END = /^ {0,3}<!--\s*slantwise:end\s*-->\s*$/;

/**
 * Blocks, inline numbers and unusable markers of a Markdown text, in the order of the text. A block's markers stand on lines of their own,
 * indented by three blanks at most, as an HTML block does; what is fenced code or a code span is not looked at.
 */
export function findMarkers(text: string): Found[] {
  const lines = linesOf(text);
  const found: Found[] = [];
  const prose: Line[][] = [[]]; // paragraphs outside of blocks
  const cut = () => prose.push([]);
  const broken = (line: Line, reason: BrokenReason) =>
    found.push({ kind: "broken", start: line.start, end: line.end, line: line.number, reason });
  let open: { readonly line: Line; readonly index: number } | null = null;
  for (const [index, line] of lines.entries()) {
    const what = line.code ? undefined : STARTS.exec(line.text)?.[1];
    if (what === undefined) {
      if (line.code || line.text.trim() === "") cut();
      else prose[prose.length - 1].push(line);
      continue;
    }
    cut();
    if (what === "begin" ? !BEGIN.test(line.text) : !END.test(line.text)) broken(line, { code: "not-alone" });
    else if (what === "begin") {
      if (open) broken(open.line, { code: "block-open" });
      open = { line, index };
    } else if (!open) broken(line, { code: "block-end-alone" });
    else {
      found.push(blockOf(lines, open.index, index));
      // what is inside a block is not prose
      while (prose.length > 0 && !((prose[prose.length - 1][0]?.start ?? Infinity) < open.line.start)) prose.pop();
      open = null;
      cut();
    }
  }
  if (open) broken(open.line, { code: "block-open" });
  for (const paragraph of prose) if (paragraph.length > 0) found.push(...findValues(text, paragraph));
  return found.sort((a, b) => a.start - b.start);
}

function blockOf(lines: readonly Line[], from: number, to: number): Found {
  const [begin, end] = [lines[from], lines[to]];
  const place = { start: begin.start, end: end.end, line: begin.number };
  const [, indent, pairs] = BEGIN.exec(begin.text)!;
  const read = readBlockMarker(pairs ?? "");
  if (!read.ok) return { kind: "broken", ...place, reason: { code: "marker", of: "block", fault: read.fault } };
  const body = lines
    .slice(from + 1, to)
    .map((line) => line.text + line.ending)
    .join("");
  return { kind: "block", ...place, marker: read.marker, body, indent, ending: begin.ending };
}
