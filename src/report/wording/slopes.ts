import type { AverageOverRows, Crossing, Profile, Region, SetResult, SlopesTest, VariesReadout } from "../../engine/comparison";
import { count, decimalsFor, exactly, fixed, levelName, percent, pValue, significant } from "../digits";
import { columnName, listed, rowsName, word } from "../names";
import { withUnit } from "../scale";
import { decimalsOf, direction, intervalPhrase, range } from "./difference";
import type { Voice } from "./difference";

/** Places that one sentence can hold. */
const FEW_PLACES = 4;

/** What stays open about slopes where one estimate is printed: which modifiers, and how much the data leave open. */
export function sayUndecided(voice: Voice, set: Pick<SetResult, "slopes">): string | null {
  const open = set.slopes.filter((s) => s.verdict === "cannot tell");
  if (open.length === 0) return null;
  const { plan, comparison } = voice;
  const names = open.map((s) => columnName(s.modifier, plan));
  const widest = widestOf(open);
  const start = `Not shown: that this is the same at every ${listed(names, "or")}`;
  if (!widest) return `${start}; the data do not allow a test.`;
  const size = Math.max(...widest.change!.interval90.map((v) => Math.abs(shownChange(voice, v))));
  const error = (shownChange(voice, widest.change!.interval90[1]) - shownChange(voice, widest.change!.interval90[0])) / 3.3;
  const upTo = withUnit(fixed(size, decimalsFor([error], size)), voice.scale);
  const where = open.length > 1 ? `across ${columnName(widest.modifier, plan)}` : "across it";
  const { margin } = comparison.question;
  const against =
    margin === null ? "" : size > shownMargin(voice, margin) ? `, more than ${exactly(shownMargin(voice, margin))}` : "";
  return `${start}; it may change by up to ${upTo} ${where}${against}. The estimate takes the slopes to be equal.`;
}

/** "Slopes were shown to agree within 150 kWh in floor_m2." */
export function sayAgreement(voice: Voice, set: Pick<SetResult, "slopes">): string | null {
  const { margin } = voice.comparison.question;
  const agreeing = set.slopes.filter((s) => s.verdict === "agree").map((s) => columnName(s.modifier, voice.plan));
  if (margin === null || agreeing.length === 0 || agreeing.length < set.slopes.length) return null;
  return `Slopes agree within ${withUnit(exactly(shownMargin(voice, margin)), voice.scale)} along ${listed(agreeing)}.`;
}

/** The headline of a set without a single difference. */
export function sayVaries(
  { comparison, plan, outcome, exposure, contrast }: Voice,
  set: SetResult,
  modifiers: readonly string[],
): string {
  const { question } = comparison;
  const tests = modifiers.map((m) => set.slopes.find((s) => s.modifier === m)!);
  const how = listed(tests.map((t) => `${columnName(t.modifier, plan)}${t.pHolm === null ? "" : ` (${pValue(t.pHolm)})`}`));
  if (question.kind === "amount") return `There is no single slope of ${outcome} on ${exposure}: it changes with ${how}.`;
  return `There is no single difference in ${outcome} between ${exposure} = ${word(contrast.level!)} and ${word(question.reference!)}: slopes differ in ${how}.`;
}

/** The sentences that stand in place of a number: differences at stated values, the crossing, the regions, what to report. */
export function sayInstead(voice: Voice, readout: VariesReadout, held: string): string[] {
  const sentences = sayProfiles(voice, readout, held);
  sentences.push(...sayWhere(voice, readout));
  if (readout.average) sentences.push(sayAverage(voice, readout.average));
  return sentences;
}

/** Where the difference changes sign and where its sign is known. */
export function sayWhere(voice: Voice, { crossing, regions }: Pick<VariesReadout, "crossing" | "regions">): string[] {
  const surely = sayRegions(voice, regions);
  return [...(crossing ? [sayCrossing(voice, crossing, regions)] : []), ...(surely ? [surely] : [])];
}

/** What to report, and both ways on. */
export function sayWaysOn({ comparison }: Voice): string {
  const what = comparison.question.kind === "groups" ? "differences" : "slopes";
  const margin =
    comparison.question.margin === null
      ? "state what difference would matter, if small ones do not"
      : "state a larger difference that would matter, if this one does not";
  return `Report the ${what} at stated values. Two ways on: ${margin}; or ask for the average over stated rows (the plan's “average”).`;
}

/** The average that was asked for, under that name. */
function sayAverage(voice: Voice, average: AverageOverRows): string {
  const { plan, comparison, exposure } = voice;
  const decimals = decimalsOf(voice, average);
  const name = rowsName(plan);
  const whose =
    average.over === "all rows"
      ? `all ${count(average.rows)} ${name}`
      : `the ${count(average.rows)} ${name} with ${exposure} = ${word(average.over)}`;
  const what = comparison.question.kind === "groups" ? "difference" : "slope";
  return `Averaged over ${whose}, the ${what} is ${direction(voice, average.estimate, decimals)} ${intervalPhrase(voice, average, decimals)}; it is an average of differing ${what}s and belongs to these rows.`;
}

/** One sentence for a few places; for many, a sentence each. */
function sayProfiles(voice: Voice, { profiles }: VariesReadout, held: string): string[] {
  const { comparison, outcome, exposure, contrast } = voice;
  const decimals = profileDecimals(voice, profiles);
  const who =
    comparison.question.kind === "groups"
      ? `${outcome} for ${exposure} = ${word(contrast.level!)}`
      : `${outcome} per ${exactly(comparison.question.per)} more of ${exposure}`;
  if (profiles.length > FEW_PLACES) {
    const each = profiles.map(
      (profile) =>
        `At ${placeName(voice, profile)}${beyond(voice, profile, ",")} it is ${sayProfile(voice, profile, decimals, true)}.`,
    );
    return [`${held}, ${who} depends on where one looks.`, ...each];
  }
  // a list has commas of its own, but none before its "and"
  const after = (i: number) => (i === profiles.length - 2 ? "," : "");
  const said = profiles.map(
    (profile, i) =>
      `${sayProfile(voice, profile, decimals, i === 0)} at ${placeName(voice, profile)}${beyond(voice, profile, after(i))}`,
  );
  return [`${held}, ${who} is ${listed(said)}.`];
}

/** "212 kWh lower (160 to 264 lower)". */
function sayProfile(voice: Voice, { estimate, interval }: Profile, decimals: number, withUnits: boolean): string {
  const shown = voice.scale.show(estimate);
  const size = fixed(Math.abs(shown), decimals);
  const ends = interval ? ` (${range(voice, interval, decimals)})` : "";
  return `${withUnits ? withUnit(size, voice.scale) : size} ${shown < 0 ? "lower" : "higher"}${ends}`;
}

/** ", where some group has no flats", and what closes it. */
function beyond({ plan }: Voice, { supported }: Profile, close: string): string {
  return supported ? "" : `, where some group has no ${rowsName(plan)}${close}`;
}

/** Where the difference changes sign, with how sure that is. */
function sayCrossing(voice: Voice, crossing: Crossing, regions: readonly Region[]): string {
  const { plan, comparison } = voice;
  const { modifier, value, interval, below } = crossing;
  const name = columnName(modifier, plan);
  const range = regions.filter((r) => r.band === "pointwise");
  const [first, last] = [range[0]?.from ?? -Infinity, range[range.length - 1]?.to ?? Infinity];
  const what = comparison.question.kind === "groups" ? "difference" : "slope";
  if (value < first || value > last) return `The ${what} does not change sign where every group has rows.`;
  const level = levelName(comparison.question.level);
  const at = significant(value);
  switch (interval.kind) {
    case "between":
      return `The ${what} changes sign at ${name} ${at} (${level} interval ${endsOf(interval.low, interval.high)}); ${percent(below)} of the ${rowsName(plan)} lie below it.`;
    case "outside":
      return `The ${what} changes sign at ${name} ${at}, but the data only say that it lies outside of ${endsOf(interval.low, interval.high)}.`;
    case "everywhere":
      return `The ${what} is estimated to change sign at ${name} ${at}, but the data do not say where: its ${level} interval is the whole line.`;
  }
}

/** Ends of a crossing's interval, open where they are beyond all numbers. */
export function endsOf(low: number | null, high: number | null, joint = "to"): string {
  if (low === null) return `up to ${significant(high ?? 0)}`;
  return high === null ? `${significant(low)} and up` : `${significant(low)} ${joint} ${significant(high)}`;
}

/** Where the sign is known at all values at once (simultaneous bands). */
export function sayRegions(voice: Voice, regions: readonly Region[]): string | null {
  const known = regions.filter((r) => r.band === "simultaneous");
  if (known.length === 0) return null;
  const { plan, comparison } = voice;
  const what = comparison.question.kind === "groups" ? "difference" : "slope";
  const sure = known.filter((r) => r.sign !== 0);
  const name = columnName(known[0].modifier, plan);
  if (sure.length === 0) return `Taken over all of ${name} at once, the data do not settle the sign of the ${what} anywhere.`;
  const said = sure.map(
    (r) => `${r.sign > 0 ? "above" : "below"} zero ${stretch(r)} (${percent(r.rowsShare)} of the ${rowsName(plan)})`,
  );
  const rest = sure.length < known.length ? "; elsewhere they do not settle it" : "";
  return `Taken over all of ${name} at once, the data put the ${what} ${listed(said)}${rest}.`;
}

function stretch({ from, to }: Region): string {
  return `from ${significant(from)} to ${significant(to)}`;
}

/** "wind 1.7", "tenure = owner and floor_m2 60". */
export function placeName({ plan }: Voice, { where }: Pick<Profile, "where">, digits = 3): string {
  return listed(
    where.map(({ column, value }) =>
      typeof value === "number"
        ? `${columnName(column, plan)} ${significant(value, digits)}`
        : `${columnName(column, plan)} = ${word(value)}`,
    ),
  );
}

/** Decimals for a list of profile differences. */
export function profileDecimals({ scale }: Voice, profiles: readonly Profile[]): number {
  return decimalsFor(
    profiles.map((p) => scale.showError(p.standardError, p.estimate)),
    Math.max(0, ...profiles.map((p) => Math.abs(scale.show(p.estimate)))),
  );
}

function widestOf(tests: readonly SlopesTest[]): SlopesTest | null {
  const known = tests.filter((t) => t.change !== null);
  const size = (t: SlopesTest) => Math.max(...t.change!.interval90.map(Math.abs));
  return known.length === 0 ? null : known.reduce((a, b) => (size(b) > size(a) ? b : a));
}

function shownChange({ scale }: Voice, value: number): number {
  return scale.show(value);
}

/** A margin on the printed scale: a proportion in points, a ratio − 1 in percent. */
function shownMargin({ comparison, scale }: Voice, margin: number): number {
  return comparison.question.outcomeForm === "log" ? 100 * margin : scale.show(margin);
}
