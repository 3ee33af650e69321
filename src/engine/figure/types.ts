import type { Crossing, Region } from "../comparison";

/** What a figure of slopes is asked for. */
export interface FigureChoice {
  /** Index into Comparison.sets. */
  readonly set: number;
  /** A column of Question.modifiers; null for an amount without modifiers. */
  readonly modifier: string | null;
  /** Index into the contrasts of a set. */
  readonly contrast: number;
}

/**
 * What there is to draw of one set along one modifier, from the fit that holds the set, the modifier and its products with the exposure. No
 * number in here is NaN or infinite. Where the slopes of the set differ nothing in it comes from a fit with one slope.
 * The outcome is as fitted (logs for a log form), contrasts per the question's step.
 */
export interface SlopesFigure {
  /** Modifiers whose products with the exposure the fit holds: the chosen one, and any others whose slopes differ in the set. */
  readonly modifiers: readonly string[];
  /** Where these others are held: at the median or the commonest level. */
  readonly heldAt: readonly { readonly column: string; readonly value: number | string }[];
  /** Other columns of the set: lines are averaged over them as the common rows have them. */
  readonly averagedOver: readonly string[];
  /** A numeric modifier with more than two values; else null. */
  readonly along: AlongFigure | null;
  /** The contrast at each level of a category, or at both values of a two-valued number; else empty. */
  readonly levels: readonly LevelDifference[];
  /** An amount in a set that has one slope to print; else null. */
  readonly added: AddedFigure | null;
}

export interface AlongFigure {
  readonly modifier: string;
  /** The modifier enters as its logarithm. */
  readonly log: boolean;
  /** Smallest and largest value on the common rows. */
  readonly range: readonly [number, number];
  /** Where every group has rows (an amount: the range); null where the groups do not overlap. */
  readonly shared: readonly [number, number] | null;
  /** Values hover and tables go through, ascending, both ends of the range among them: even ones, or all there are where these are few. */
  readonly grid: readonly number[];
  /** One a group that has rows, the reference first; empty for an amount. */
  readonly lines: readonly GroupLine[];
  /** Null where the contrast cannot be estimated along the modifier. */
  readonly difference: DifferenceCurve | null;
  /** Null for a curve, and where other modifiers' slopes differ too. */
  readonly crossing: Crossing | null;
  readonly regions: readonly Region[];
  /** Rows as they are; empty for an amount. */
  readonly points: DrawnRows;
  readonly densities: readonly Density[];
}

/** A stretch of values with the curve over it; `low` and `high` are null where there is no interval. */
export interface Interval {
  readonly low: readonly number[];
  readonly high: readonly number[];
}

export interface GroupLine {
  /** Index into Question.groups. */
  readonly group: number;
  /** Smallest and largest value of the modifier among the group's rows. */
  readonly rows: readonly [number, number];
  /** Even values with the grid and the ends of `rows`. */
  readonly x: readonly number[];
  readonly estimate: readonly number[];
  readonly standardError: readonly (number | null)[];
  /** At the plan's level; null where it cannot be computed. */
  readonly interval: Interval | null;
}

export interface DifferenceCurve {
  /** Even values with the grid and the ends of the shared range. */
  readonly x: readonly number[];
  readonly estimate: readonly number[];
  readonly standardError: readonly (number | null)[];
  /** At each value by itself. */
  readonly pointwise: Interval | null;
  /** At all values at once (Potthoff 1964). */
  readonly simultaneous: Interval | null;
}

export interface LevelDifference {
  readonly value: number | string;
  readonly estimate: number;
  readonly standardError: number | null;
  readonly interval: readonly [number, number] | null;
  /** False where some group has no rows at this level. */
  readonly supported: boolean;
}

/** Rows to draw, thinned evenly where there are many. */
export interface DrawnRows {
  /** Index into Question.groups; 0 for an amount. */
  readonly group: readonly number[];
  readonly x: readonly number[];
  readonly y: readonly number[];
  /** Line of the file each starts on. */
  readonly lines: readonly number[];
  /** Rows there are. */
  readonly of: number;
}

/** Where a group's rows lie: a Gaussian kernel with Silverman's (1986) width, at even values; the highest of all groups is 1. */
export interface Density {
  /** Index into Question.groups; 0 for an amount. */
  readonly group: number;
  readonly x: readonly number[];
  readonly height: readonly number[];
}

/** Residuals of outcome and amount after removing the other columns of the set: their slope is the set's estimate (Frisch & Waugh 1933). */
export interface AddedFigure {
  /** `x` in the amount's unit, `y` in the outcome's. */
  readonly points: DrawnRows;
  /** Ends of the residuals of all rows, drawn or not. */
  readonly range: readonly [number, number];
  /** Per unit of `x`: the set's own estimate, divided by the question's step. */
  readonly slope: number;
  readonly interval: readonly [number, number] | null;
}
