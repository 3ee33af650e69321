/**
 * The Slopes section as the page draws it: numbers to draw and sentences to say, all made before they cross. The page computes nothing and
 * words nothing.
 */
export interface SlopesSection {
  /** What is looked at, and what else could be. */
  readonly sets: readonly { readonly index: number; readonly label: string }[];
  readonly set: number;
  /** Modifiers that can be looked at; empty where none was tested (an amount still has its added-variable plot then). */
  readonly modifiers: readonly {
    /** The column: what a choice names. */
    readonly name: string;
    /** What a person reads. */
    readonly label: string;
    /** The verdict in words. */
    readonly word: string;
  }[];
  /** The column looked at; "" where there is none. */
  readonly modifier: string;
  /** Contrasts to choose from; one for two groups or an amount. */
  readonly contrasts: readonly string[];
  readonly contrast: number;
  /** What the plots show, in sentences: where the difference lies above and below zero, where it changes sign, how sure that is. */
  readonly sentences: readonly string[];
  /** Empty where nothing can be drawn; the sentences then say why. */
  readonly plots: readonly Plot[];
}

/** What the page asks to see; null members take the first sensible choice. */
export interface SlopesChoice {
  readonly set: number | null;
  readonly modifier: string | null;
  readonly contrast: number | null;
}

export interface Plot {
  /**
   * "lines": rows and each group's fitted line along a numeric modifier · "difference": the difference between groups along it · "levels":
   * dot and interval at each level of a category · "added": residual of the outcome against residual of an amount.
   */
  readonly kind: "lines" | "difference" | "levels" | "added";
  readonly title: string;
  /** One sentence for a screen reader: what the plot shows. */
  readonly summary: string;
  readonly x: PlotAxis;
  readonly y: PlotAxis;
  /** Names of the groups drawn apart, the reference first; index is used by `group` below. */
  readonly groups: readonly string[];
  readonly bands: readonly Band[];
  readonly curves: readonly Curve[];
  readonly points: readonly Points[];
  readonly intervals: readonly IntervalMark[];
  /** Where the rows of each group lie along x: heights in [0, 1] at even x. */
  readonly densities: readonly { readonly group: number; readonly x: readonly number[]; readonly height: readonly number[] }[];
  /** Values marked on the axes: zero, the crossing with its interval, the ends of what all groups share. */
  readonly marks: readonly Mark[];
  /** Stops for hover and keyboard, in order of x: the exact values at each, as one sentence. */
  readonly stops: readonly { readonly x: number; readonly y: number; readonly text: string }[];
  /** The text twin: what the plot shows as a table. */
  readonly twin: { readonly head: readonly string[]; readonly rows: readonly (readonly string[])[] };
}

export interface PlotAxis {
  readonly label: string;
  readonly from: number;
  readonly to: number;
  readonly ticks: readonly { readonly at: number; readonly text: string }[];
  /** Logarithmic scale (a modifier taken as log). */
  readonly log: boolean;
}

export interface Curve {
  readonly name: string;
  /** Null for the difference between groups. */
  readonly group: number | null;
  readonly x: readonly number[];
  readonly y: readonly number[];
  /** Drawn where the group has rows; false for the dotted parts beyond them. */
  readonly supported: boolean;
}

export interface Band {
  readonly name: string;
  readonly group: number | null;
  readonly reach: "pointwise" | "simultaneous";
  readonly x: readonly number[];
  readonly low: readonly number[];
  readonly high: readonly number[];
}

export interface Points {
  readonly group: number | null;
  readonly x: readonly number[];
  readonly y: readonly number[];
  /** Lines of the file, aligned. */
  readonly lines: readonly number[];
  /** "2,000 of 97,461 rows drawn", or null when all are. */
  readonly note: string | null;
}

export interface IntervalMark {
  readonly name: string;
  readonly x: number;
  readonly y: number;
  readonly low: number | null;
  readonly high: number | null;
  readonly text: string;
}

export interface Mark {
  /** The zero line; where the difference changes sign; the first and the last value at which every group has rows. */
  readonly what: "zero" | "crossing" | "shared from" | "shared to";
  readonly axis: "x" | "y";
  readonly at: number;
  /** A stretch of the axis (the crossing's interval), or null for a line alone; ends beyond the axis are cut. */
  readonly stretch: readonly [number, number] | null;
  readonly label: string;
}
