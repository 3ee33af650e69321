/**
 * A comparison as it is said: every string a person reads, in the one order all surfaces use.
 * report/present makes it; Markdown, text, CSV, SVG and the panel only lay it out. No statistic is computed from it.
 */
export interface Presentation {
  /** "heating.csv" and the like, for titles. */
  readonly title: string;
  /** Facts under the question: "heating.csv", "1,187 of 1,204 rows complete", "errors HC3". */
  readonly facts: readonly string[];
  /** The Readout section: plain sentences about the reported set, the first the headline. */
  readonly readout: readonly Sentence[];
  /** One block per contrast of the exposure (one for two groups or an amount). */
  readonly blocks: readonly ContrastBlock[];
  /** Joint test sentence of the exposure, for several groups; null otherwise or where it may not be printed. */
  readonly joint: string | null;
  /** Notes to the data and the fits, one sentence each; `lines` are file lines a person can open. */
  readonly notes: readonly Note[];
  /** Which rows were used and what cost the others, one sentence. */
  readonly rows: string;
  /** "HC3 standard errors; 95 % intervals; heating.csv, sha256 1f2e3d4c…, 2026-12-01" without the date. */
  readonly provenance: readonly string[];
  /** One line for a status bar or a screen reader: headline without caveats. */
  readonly summary: string;
  /** One line on the slopes of the reported set, e.g. "slopes differ in floor_m2 for the reported set". */
  readonly slopesSummary: string;
}

export interface Note {
  readonly code: string;
  readonly text: string;
  readonly lines: readonly number[];
  /** Changes what the numbers mean, or loses data: never folded away. */
  readonly important: boolean;
}

/** `emphasis` marks what must not be missed (a sign that reverses, a refusal). */
export interface Sentence {
  readonly text: string;
  readonly tone: "headline" | "plain" | "caution" | "muted";
}

export interface ContrastBlock {
  /** "full − none", or "per 10 dose". */
  readonly contrast: string;
  /** Column heads: "held fixed", "rows", "difference (kWh per winter)", "shift", "in a word". */
  readonly heads: {
    readonly held: string;
    readonly rows: string;
    readonly difference: string;
    readonly shift: string;
    readonly word: string;
  };
  readonly axis: Axis | null;
  /** Rows to show as a table: every set up to 12; beyond that base, lowest, highest, reported, and those a filter asks for. */
  readonly rows: readonly ShiftRow[];
  /** All sets in order of estimate; null up to 12 sets. */
  readonly strip: Strip | null;
}

export interface ShiftRow {
  /** Index into Comparison.sets. */
  readonly set: number;
  /** "nothing", or the held-fixed columns joined by ", ". */
  readonly held: string;
  readonly adjustedFor: readonly string[];
  readonly rows: string;
  readonly kind: "single" | "undecided" | "plain" | "varies" | "none";
  /** "+340 (290, 390)", "no single difference: slopes differ in floor_m2", or the reason there is none. */
  readonly difference: string;
  /** What the line on the axis shows, in outcome units; null where nothing can be drawn. A span has no point. */
  readonly line: Line | null;
  /** "−538 (−590, −486)" or "–". */
  readonly shift: string;
  /** Change word, "checking", or "–". */
  readonly word: string;
  readonly base: boolean;
  readonly reported: boolean;
  /** Names the row's special place in a long list: "lowest", "highest"; null otherwise. */
  readonly place: "lowest" | "highest" | null;
  /** The row read aloud as one sentence. */
  readonly aloud: string;
}

export type Line =
  | { readonly kind: "interval"; readonly low: number; readonly mid: number; readonly high: number }
  | { readonly kind: "point"; readonly mid: number }
  | { readonly kind: "span"; readonly low: number; readonly high: number };

export interface Axis {
  readonly low: number;
  readonly high: number;
  /** Round values inside [low, high], zero always among them. */
  readonly ticks: readonly { readonly at: number; readonly text: string }[];
}

/** A long list of sets, ordered by estimate (sets without a single number last, in plan order). */
export interface Strip {
  readonly columns: readonly string[];
  readonly items: readonly {
    readonly set: number;
    readonly line: Line | null;
    /** Indexes into `columns`. */
    readonly holds: readonly number[];
    readonly kind: ShiftRow["kind"];
    /** As in a row's difference cell; what the panel says of the set under the pointer. */
    readonly difference?: string;
  }[];
}
