import type { Crossing, Region, SetResult } from "../../engine/comparison";
import type { Plan } from "../../engine/plan";
import { count, levelName, significant } from "../digits";
import { columnName, listed, oneLine, rowsName, word } from "../names";
import { comparedGroups, direction, range } from "./difference";
import type { Voice } from "./difference";
import { endsOf, placeName } from "./slopes";

/** Digits of a modifier's value in the section: even values and the ends of the data are told apart. */
export const PLACE_DIGITS = 5;

/** A value of a modifier as a place: "84", "1,990.5". */
export function placeText(value: number): string {
  return significant(value, PLACE_DIGITS);
}

/** One contrast at one place. */
export interface Spot {
  readonly estimate: number;
  readonly interval: readonly [number, number] | null;
  /** At all values at once; null where it is not drawn. */
  readonly everywhere: readonly [number, number] | null;
  readonly supported: boolean;
}

/** "At floor_m2 84, kwh is 212 kWh lower for retrofit = full than for none (95 % interval 160 to 264 lower; at all values at once 150 to 274 lower)." */
export function saySpot(voice: Voice, column: string, value: number | string, spot: Spot, decimals: number): string {
  const { outcome, comparison } = voice;
  const { estimate, interval, everywhere, supported } = spot;
  const at = placeName(voice, { where: [{ column, value }] }, PLACE_DIGITS);
  const surely = interval
    ? `${levelName(comparison.question.level)} interval ${range(voice, interval, decimals)}`
    : "no interval can be computed";
  const all = everywhere ? `; at all values at once ${range(voice, everywhere, decimals)}` : "";
  const beyond = supported ? "" : ` Some group has no ${rowsName(voice.plan)} there.`;
  return `At ${at}, ${outcome} is ${direction(voice, estimate, decimals)} ${comparedGroups(voice)} (${surely}${all}).${beyond}`;
}

/** "below zero", "above zero", "not settled": a region's sign. */
export function saySign({ sign }: Region): string {
  return sign === 0 ? "not settled" : sign > 0 ? "above zero" : "below zero";
}

/** "from 400 kWh higher at 40 to 190 kWh lower at 120". */
export function sayCourse(
  voice: Voice,
  from: readonly [number, number],
  to: readonly [number, number],
  decimals: number,
): string {
  const end = ([x, y]: readonly [number, number]) => `${direction(voice, y, decimals)} at ${placeText(x)}`;
  return `from ${end(from)} to ${end(to)}`;
}

/** "2,000 of 97,461 flats drawn", or null when all are. */
export function sayDrawn(drawn: number, of: number, plan: Plan): string | null {
  return drawn < of ? `${count(drawn)} of ${count(of)} ${rowsName(plan)} drawn` : null;
}

/** What the plots and their parts are called. */
export const slopesWords = {
  lines: ({ outcome }: Voice, along: string) => `${outcome} along ${along}`,
  difference: (voice: Voice, along: string) =>
    voice.comparison.question.kind === "groups"
      ? `Difference in ${voice.outcome}, ${contrastName(voice)}, along ${along}`
      : `Slope of ${voice.outcome} ${comparedGroups(voice)}, along ${along}`,
  levels: (voice: Voice, by: string) =>
    voice.comparison.question.kind === "groups"
      ? `Difference in ${voice.outcome}, ${contrastName(voice)}, by ${by}`
      : `Slope of ${voice.outcome} ${comparedGroups(voice)}, by ${by}`,
  added: ({ outcome, exposure }: Voice) => `What is left of ${outcome} against what is left of ${exposure}`,
  left: (name: string, unit = "") => `${name}, what is left${unit === "" ? "" : ` (${unit})`}`,
  logarithm: "logarithm",
  removed: (voice: Voice, set: SetResult, slope: string) =>
    set.adjustedFor.length === 0
      ? `Nothing is removed but the means; the line's slope is the table's, ${slope}.`
      : `${listed(set.adjustedFor.map((c) => columnName(c, voice.plan)))} removed from both; the line's slope is the table's, ${slope}.`,
  pointwise: (level: number) => `${levelName(level)} interval`,
  simultaneous: "at all values at once",
  zero: ({ comparison }: Voice) => (comparison.question.kind === "groups" ? "no difference" : "no slope"),
  crossing: (at: number) => `changes sign at ${significant(at)}`,
  sharedFrom: (plan: Plan) => `every group has ${rowsName(plan)} from here`,
  sharedTo: (plan: Plan) => `every group has ${rowsName(plan)} up to here`,
  fitted: (group: string) => `${group}, fitted`,
  line: "fitted line",
  mean: "as expected",
  changes: "changes sign",
  crossingInterval: ({ kind, low, high }: Crossing["interval"]) =>
    kind === "everywhere" ? "anywhere" : kind === "between" ? endsOf(low, high) : `not between ${endsOf(low, high, "and")}`,
} as const;

function contrastName({ contrast }: Voice): string {
  return oneLine(contrast.contrast);
}

/** A group's mean at one place, in digits. */
export interface Mean {
  readonly level: string;
  readonly mean: string;
  readonly interval: readonly [string, string] | null;
  /** Whether the group has rows there. */
  readonly supported: boolean;
}

/** "At floor_m2 84, kwh is 4,283 (4,221 to 4,344) for retrofit = none and 4,466 (4,410 to 4,521) for full." */
export function sayMeans(voice: Voice, column: string, value: number, means: readonly Mean[]): string {
  const { plan, outcome, exposure } = voice;
  const said = means.map(({ level, mean, interval, supported }, i) => {
    const whose = i === 0 ? `${exposure} = ${word(level)}` : word(level);
    return `${meanCell(mean, interval)} for ${whose}${supported ? "" : ` (no ${rowsName(plan)} there)`}`;
  });
  return `At ${placeName(voice, { where: [{ column, value }] }, PLACE_DIGITS)}, ${outcome} is ${listed(said)}.`;
}

/** "4,283 (4,221 to 4,344)". */
export function meanCell(mean: string, interval: Mean["interval"]): string {
  return interval ? `${mean} (${interval[0]} to ${interval[1]})` : mean;
}

/** "retrofit = none from 2,651 at 26 to 6,906 at 98.7" of each group's line. */
export function sayLines(voice: Voice, along: string, courses: readonly { level: string; from: string; to: string }[]): string {
  const said = courses.map(({ level, from, to }) => `${voice.exposure} = ${word(level)} from ${from} to ${to}`);
  return `${slopesWords.lines(voice, along)}, each group's fitted line: ${listed(said)}.`;
}

/** "Where Education is 11.4 lower than expected, Fertility is 8.9 points higher than expected (95 % interval 5.8 to 12.2 higher)." */
export function sayLeft(
  voice: Voice,
  at: number,
  value: number,
  interval: readonly [number, number] | null,
  decimals: number,
): string {
  const { outcome, exposure } = voice;
  const side = at < 0 ? "lower" : "higher";
  const surely = interval ? ` (${levelName(voice.comparison.question.level)} interval ${range(voice, interval, decimals)})` : "";
  return `Where ${exposure} is ${significant(Math.abs(at))} ${side} than expected, ${outcome} is ${direction(voice, value, decimals)} than expected${surely}.`;
}
