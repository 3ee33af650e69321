import type { Finding, Reason } from "./findings";
import type { OutcomeKind, Variance } from "./plan";
import type { Source } from "./table";

/**
 * One question, refitted under every listed adjustment set on the same rows.
 * The JSON of the command line (report/json) is this, with findings and reasons turned into sentences.
 * No number in here is NaN or infinite: what cannot be computed is null, with a finding.
 */
export interface Comparison {
  readonly source: Source & { readonly rows: number };
  readonly question: Question;
  readonly rows: RowCount;
  /** In plan order, the base set first. */
  readonly sets: readonly SetResult[];
  /** Index into `sets` of the reported set. */
  readonly reported: number;
  readonly findings: readonly Finding[];
}

export interface Question {
  readonly outcome: string;
  readonly outcomeKind: OutcomeKind;
  /** "log" makes every estimate a difference of logs; readouts are said as ratios of geometric means. */
  readonly outcomeForm: "as is" | "log";
  readonly exposure: string;
  readonly kind: "groups" | "amount";
  readonly reference: string | null;
  readonly per: number;
  readonly design: "randomised" | "observational";
  readonly variance: Variance;
  readonly level: number;
  readonly margin: number | null;
  readonly slopesAlpha: number;
  readonly cluster: string | null;
  readonly weights: string | null;
  readonly always: readonly string[];
  /** Exposure groups with their common rows, the reference first; empty for an amount. */
  readonly groups: readonly { readonly level: string; readonly rows: number }[];
  readonly modifiers: readonly string[];
}

export interface RowCount {
  /** Rows of the table. */
  readonly read: number;
  /** Rows complete in everything the comparison uses: the rows of every fit. */
  readonly common: number;
  /** Columns that cost rows, each with the rows missing in it (a row missing in two is under both). */
  readonly droppedBy: readonly { readonly column: string; readonly rows: number }[];
}

export interface SetResult {
  /** Every column of the set, always-adjusted ones first. */
  readonly adjustedFor: readonly string[];
  /** Rows complete for this set alone. */
  readonly ownRows: number;
  readonly residualDf: number;
  readonly contrasts: readonly ContrastResult[];
  /** Joint test that all contrasts are zero (several groups only); null where the set varies or it cannot be computed. */
  readonly joint: { readonly statistic: number; readonly df: readonly [number, number]; readonly p: number } | null;
  readonly slopes: readonly SlopesTest[];
  readonly model: readonly { readonly term: Term; readonly estimate: number; readonly standardError: number | null }[];
  /** `part`: other design columns of the covariate stay in the fit; `combinationOf` then is empty where these alone determine it. */
  readonly setAside: readonly { readonly column: string; readonly combinationOf: readonly string[]; readonly part?: true }[];
}

export interface SlopesTest {
  readonly modifier: string;
  /** Null where the interaction cannot be tested (verdict then "cannot tell"). */
  readonly statistic: number | null;
  readonly df: readonly [number, number] | null;
  readonly p: number | null;
  readonly pHolm: number | null;
  /** Largest change of a contrast across the modifier's central range (METHODS 5), D; null where it cannot be computed. */
  readonly change: {
    readonly contrast: string;
    readonly estimate: number;
    readonly interval90: readonly [number, number];
    readonly from: number | string;
    readonly to: number | string;
  } | null;
  readonly verdict: "differ" | "agree" | "cannot tell";
}

export type Term =
  | { readonly role: "intercept" }
  | {
      readonly column: string;
      readonly level?: string;
      readonly power?: number;
      readonly knot?: number;
      readonly times?: { readonly column: string; readonly level?: string; readonly power?: number; readonly knot?: number };
    };

export interface ContrastResult {
  /** "LEVEL − REFERENCE" (U+2212), or "per N COLUMN". */
  readonly contrast: string;
  readonly level: string | null;
  readonly readout: Readout;
  /** Change of the estimate from the set's own rows to the common rows; null where equal rows, or where either has no single number. */
  readonly fromRows: number | null;
}

/** What may be printed for one contrast of one set. `varies` and `none` cannot carry one estimate. */
export type Readout = SingleReadout | PlainReadout | VariesReadout | NoReadout;

export interface Estimate {
  readonly estimate: number;
  readonly standardError: number | null;
  readonly df: number | null;
  readonly interval: readonly [number, number] | null;
  readonly p: number | null;
}

export interface SingleReadout extends Estimate {
  readonly kind: "single" | "undecided";
  /** Null for the base set, and where the base set has no single number. */
  readonly shift: Shift | null;
  readonly change: ChangeWord | null;
}

export interface PlainReadout extends Estimate {
  readonly kind: "plain";
  readonly modifiers: readonly string[];
}

export interface VariesReadout {
  readonly kind: "varies";
  readonly modifiers: readonly string[];
  readonly profiles: readonly Profile[];
  readonly crossing: Crossing | null;
  readonly regions: readonly Region[];
  /** Only when the plan asks for it. */
  readonly average?: AverageOverRows;
}

/** The mean of the differences over stated rows: not "the effect", which does not exist where slopes differ. */
export interface AverageOverRows {
  /** "all rows" or an exposure group. */
  readonly over: string;
  readonly rows: number;
  readonly estimate: number;
  readonly standardError: number | null;
  readonly interval: readonly [number, number] | null;
}

export interface NoReadout {
  readonly kind: "none";
  readonly reason: Reason;
}

export interface Shift {
  readonly estimate: number;
  readonly standardError: number | null;
  readonly interval: readonly [number, number] | null;
  readonly parts: readonly { readonly covariate: string; readonly estimate: number; readonly standardError: number | null }[];
}

export type ChangeWord = "steady" | "unclear" | "reverses" | "fades" | "emerges" | "crosses" | "shrinks" | "grows";

export interface Profile {
  readonly where: readonly { readonly column: string; readonly value: number | string }[];
  readonly estimate: number;
  readonly standardError: number | null;
  readonly interval: readonly [number, number] | null;
  /** False where some group has no rows at this value: an extrapolation, marked so. */
  readonly supported: boolean;
}

export interface Crossing {
  readonly modifier: string;
  readonly value: number;
  /** Fieller's interval: between low and high, outside them, or everywhere. */
  readonly interval: {
    readonly kind: "between" | "outside" | "everywhere";
    readonly low: number | null;
    readonly high: number | null;
  };
  /** Share of the common rows below and above the crossing. */
  readonly below: number;
  readonly above: number;
}

export interface Region {
  readonly modifier: string;
  readonly from: number;
  readonly to: number;
  readonly sign: 1 | -1 | 0;
  readonly band: "pointwise" | "simultaneous";
  readonly rowsShare: number;
}
