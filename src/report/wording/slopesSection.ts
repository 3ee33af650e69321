import type { Comparison, SetResult, SlopesTest } from "../../engine/comparison";
import type { SlopesFigure } from "../../engine/figure/types";
import type { Plan } from "../../engine/plan";
import { count, pValue } from "../digits";
import { columnName, listed, rowsName } from "../names";
import { holding } from "./difference";
import type { Voice } from "./difference";
import { sayFinding } from "./finding";
import { sayOne } from "./readout";
import { placeName, sayAgreement, sayInstead, sayUndecided, sayVaries, sayWhere } from "./slopes";
import { placeText } from "./slopesPlots";

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
      const too = set.adjustedFor.includes(modifier) ? "" : "that holds it fixed too and ";
      const lines = drawn ? [`What is drawn along ${along} comes from a fit ${too}in which slopes may differ in it.`] : [];
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
      `Every group has ${name} from ${columnName(along.modifier, plan)} ${placeText(along.shared[0])} to ${placeText(along.shared[1])}; beyond, lines are dotted.`,
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

function differingIn(set: SetResult): string[] {
  return set.slopes.filter((test) => test.verdict === "differ").map((test) => test.modifier);
}
