import type { Comparison } from "../../engine/comparison";
import type { FigureChoice, SlopesFigure } from "../../engine/figure/types";
import type { Reason } from "../../engine/findings";
import type { Plan } from "../../engine/plan";
import { columnName, heldName, oneLine } from "../names";
import { holding, voiceOf } from "../wording/difference";
import type { Voice } from "../wording/difference";
import { sayNone } from "../wording/readout";
import { saySlopes, sayVerdict } from "../wording/slopesSection";
import { addedPlot } from "./added";
import { differencePlot } from "./difference";
import { levelsPlot } from "./levels";
import { linesPlot } from "./lines";
import type { Plot, SlopesSection } from "./presentation";

/** Up to this many sets all can be chosen; beyond it the base, those of one column, the reported one and the one looked at. */
const LISTED_SETS = 64;

/**
 * The Slopes section, drawn and said.
 * @param choice what the figure was made for
 * @param figure or why there is none
 */
export function slopesSection(
  comparison: Comparison,
  plan: Plan,
  choice: FigureChoice,
  figure: SlopesFigure | { readonly reason: Reason },
): SlopesSection {
  const set = comparison.sets[choice.set];
  const voice = voiceOf(comparison, plan, set.contrasts[choice.contrast]);
  const shared = {
    sets: listedSets(comparison, choice.set).map((index) => ({
      index,
      label: heldName(comparison.sets[index].adjustedFor, plan),
    })),
    set: choice.set,
    modifiers: comparison.question.modifiers.map((name) => ({
      name,
      label: columnName(name, plan),
      word: sayVerdict(set.slopes.find((test) => test.modifier === name)),
    })),
    modifier: choice.modifier ?? "",
    contrasts: set.contrasts.map(({ contrast }) => oneLine(contrast)),
    contrast: choice.contrast,
  };
  if ("reason" in figure)
    return { ...shared, sentences: [sayNone(voice, holding(set.adjustedFor, plan), figure.reason)], plots: [] };
  return { ...shared, sentences: saySlopes(voice, set, choice.modifier, figure), plots: plotsOf(voice, set, choice, figure) };
}

function plotsOf(voice: Voice, set: Comparison["sets"][number], { modifier }: FigureChoice, figure: SlopesFigure): Plot[] {
  const { along, levels, added } = figure;
  const { readout } = voice.contrast;
  const differs = set.slopes.some((test) => test.modifier === modifier && test.verdict === "differ");
  return [
    ...(along ? [...linesPlot(voice, along), ...differencePlot(voice, along, differs)] : []),
    ...(modifier === null ? [] : levelsPlot(voice, modifier, levels)),
    ...(added && (readout.kind === "single" || readout.kind === "undecided") ? [addedPlot(voice, set, readout, added)] : []),
  ];
}

function listedSets({ sets, reported, question }: Comparison, looked: number): number[] {
  return sets.flatMap(({ adjustedFor }, i) =>
    sets.length <= LISTED_SETS || i === 0 || i === reported || i === looked || adjustedFor.length === question.always.length + 1
      ? [i]
      : [],
  );
}
