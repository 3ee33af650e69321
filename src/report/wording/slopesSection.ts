import type { Comparison, Crossing, Region, SetResult, SlopesTest } from "../../engine/comparison";
import type { SlopesFigure } from "../../engine/figure/types";
import type { Plan } from "../../engine/plan";
import { count, levelName, pValue, significant } from "../digits";
import { columnName, listed, oneLine, rowsName, word } from "../names";
import { comparedGroups, direction, holding, range } from "./difference";
import type { Voice } from "./difference";
import { sayFinding } from "./finding";
import { sayOne } from "./readout";
import { endsOf, placeName, sayAgreement, sayInstead, sayUndecided, sayVaries, sayWhere } from "./slopes";

/** Digits of a modifier's value in the section: even values and the ends of the data are told apart. */
export const PLACE_DIGITS = 5;

/** The Slopes section's finding in one line, of the reported set: "slopes differ in floor_m2 for the reported set". */
export function saySlopesSummary({ sets, reported, question }: Comparison, plan: Plan, checking: boolean): string {
  const set = sets[reported];
  if (question.modifiers.length === 0) return "no modifier was tested";
  if (set.contrasts.every((contrast) => contrast.readout.kind === "none")) return "nothing to compare in the reported set";
  const differing = differingIn(set).map((name) => columnName(name, plan));
  if (differing.length > 0) return `slopes differ in ${listed(differing)} for the reported set`;
  if (checking) return "checking";
  return set.slopes.every((test) => test.verdict === "agree")
    ? `slopes agree in ${listed(set.slopes.map((test) => columnName(test.modifier, plan)))} for the reported set`
    : "slopes not shown to differ or agree for the reported set";
}

/** A modifier's verdict, for a list to choose from: "slopes differ (p < 0.001)". */
export function sayVerdict(test: SlopesTest | undefined): string {
  if (!test || (test.p === null && test.verdict === "cannot tell")) return "not tested";
  const p = test.pHolm === null ? "" : ` (${pValue(test.pHolm)})`;
  switch (test.verdict) {
    case "differ":
      return `slopes differ${p}`;
    case "agree":
      return "slopes agree";
    case "cannot tell":
      return `not shown to differ or agree${p}`;
  }
}

/** What the plots of one modifier show, in sentences. */
export function saySlopes(voice: Voice, set: SetResult, modifier: string | null, figure: SlopesFigure): string[] {
  return [...sayFound(voice, set, modifier, figure), ...sayHow(voice, figure), ...sayAdded(voice, set, figure)];
}

function sayFound(voice: Voice, set: SetResult, modifier: string | null, figure: SlopesFigure): string[] {
  const { comparison, plan, contrast } = voice;
  const { readout } = contrast;
  const held = holding(set.adjustedFor, plan);
  const test = set.slopes.find((t) => t.modifier === modifier);
  const drawn = figure.along?.difference || figure.levels.length > 0;
  const index = comparison.sets.indexOf(set);
  const gap =
    modifier === null || drawn ? [] : [sayFinding({ code: "interaction-not-estimable", set: index, modifier }, comparison, plan)];
  const untested = modifier === null ? [sayFinding({ code: "no-modifier" }, comparison, plan)] : [];
  const where = figure.along ? sayWhere(voice, figure.along) : [];
  switch (readout.kind) {
    case "none":
      return [];
    case "varies":
      if (test?.verdict === "differ")
        return [sayVaries(voice, set, readout.modifiers), ...sayInstead(voice, readout, held), ...gap];
      return [sayVaries(voice, set, readout.modifiers), ...sayNotShown(voice, test), ...gap];
    case "plain":
      if (test?.verdict === "differ") return [sayVaries(voice, set, readout.modifiers), ...where, ...gap];
      return [sayVaries(voice, set, readout.modifiers), ...sayNotShown(voice, test), ...gap];
    case "single":
    case "undecided": {
      const one = sayOne(voice, held, readout);
      if (!test || modifier === null) return [one, ...gap, ...untested];
      const agrees = sayAgreement(voice, { slopes: [test] });
      // where the groups share no range there is a test, but no change to speak of
      const open = test.change === null && test.p !== null ? null : sayUndecided(voice, { slopes: [test] });
      const surely = figure.along ? sayWhere(voice, { crossing: null, regions: figure.along.regions }) : [];
      const along = columnName(modifier, plan);
      const lines = drawn ? [`What is drawn along ${along} comes from a fit in which slopes may differ in it.`] : [];
      return [one, ...(agrees ? [agrees] : sayNotShown(voice, test)), ...(open ? [open] : []), ...lines, ...surely, ...gap];
    }
  }
}

function sayNotShown({ plan }: Voice, test: SlopesTest | undefined): string[] {
  if (!test || test.p === null) return [];
  const p = test.pHolm === null ? "" : ` (${pValue(test.pHolm)})`;
  return [`Slopes were not shown to differ in ${columnName(test.modifier, plan)}${p}.`];
}

/** What stands still while the modifier moves, and where the groups have rows. */
function sayHow(voice: Voice, { averagedOver, heldAt, along, levels }: SlopesFigure): string[] {
  const { plan, comparison } = voice;
  const name = rowsName(plan);
  const sentences: string[] = [];
  if (heldAt.length > 0) {
    const places = heldAt.map(({ column, value }) => {
      const at = typeof value === "number" ? "its median" : "its commonest level";
      return `${placeName(voice, { where: [{ column, value }] })} (${at})`;
    });
    sentences.push(`What is drawn holds at ${listed(places)}, since slopes differ there too.`);
  }
  if (averagedOver.length > 0 && along && along.lines.length > 0)
    sentences.push(
      `The lines are averaged over ${listed(averagedOver.map((c) => columnName(c, plan)))} as all ${count(comparison.rows.common)} ${name} have ${averagedOver.length === 1 ? "it" : "them"}.`,
    );
  if (along && !along.shared) sentences.push(`At no ${columnName(along.modifier, plan)} does every group have ${name}.`);
  else if (along?.shared && (along.shared[0] > along.range[0] || along.shared[1] < along.range[1]))
    sentences.push(
      `Every group has ${name} from ${columnName(along.modifier, plan)} ${placeText(along.shared[0])} to ${placeText(along.shared[1])}; beyond, lines are dashed.`,
    );
  if (levels.some((l) => !l.supported)) sentences.push(`Where some group has no ${name}, this is marked.`);
  return sentences;
}

/** About an amount's added-variable plot, where there is none. */
function sayAdded({ comparison, exposure, outcome }: Voice, set: SetResult, { added }: SlopesFigure): string[] {
  if (comparison.question.kind === "groups" || added) return [];
  return differingIn(set).length > 0
    ? [`A plot of what is left of ${outcome} against what is left of ${exposure} would draw one slope, which there is not.`]
    : [];
}

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
  sharedFrom: "every group has rows from here",
  sharedTo: "every group has rows up to here",
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

function differingIn(set: SetResult): string[] {
  return set.slopes.filter((test) => test.verdict === "differ").map((test) => test.modifier);
}
