import type { Comparison, SingleReadout } from "../../engine/comparison";
import type { AddedFigure } from "../../engine/figure/types";
import { fixed, significant } from "../digits";
import { outcomeScaleOf } from "../scale";
import { comparedGroups, decimalsOf, direction, intervalPhrase } from "../wording/difference";
import type { Voice } from "../wording/difference";
import { sayDrawn, sayLeft, slopesWords } from "../wording/slopesPlots";
import { placesAxis, valuesAxis } from "./axes";
import { fewOf, NOTHING_DRAWN } from "./pieces";
import type { Plot } from "./presentation";

/** Values of the amount's residual at which the line is said. */
const STOPS = 21;

/**
 * Residuals of the outcome against residuals of an amount, with the line whose slope the table prints. A log outcome stays in logarithms: its
 * residuals are differences of logs.
 */
export function addedPlot(voice: Voice, set: Comparison["sets"][number], readout: SingleReadout, added: AddedFigure): Plot {
  const { comparison, plan, outcome, exposure } = voice;
  const { question } = comparison;
  const { log, show, unit } = outcomeScaleOf(question, plan);
  const y = log ? (value: number) => value : show;
  const [from, to] = added.range;
  const x = Array.from({ length: STOPS }, (_, i) => (i === STOPS - 1 ? to : from + ((to - from) * i) / (STOPS - 1)));
  const line = x.map((value) => y(added.slope * value));
  const { interval } = added;
  // at a residual below 0 the steeper end is the lower one
  const ends = (value: number): [number, number] | null =>
    interval && (value < 0 ? [interval[1] * value, interval[0] * value] : [interval[0] * value, interval[1] * value]);
  const low = interval && x.map((value) => y(ends(value)![0]));
  const high = interval && x.map((value) => y(ends(value)![1]));
  const drawn = added.points.y.map(y);
  const decimals = decimalsOf(voice, readout);
  const slope = `${direction(voice, readout.estimate, decimals)} ${comparedGroups(voice)} ${intervalPhrase(voice, readout, decimals)}`;
  const labels = [slopesWords.left(exposure), slopesWords.left(outcome, log ? slopesWords.logarithm : unit)] as const;
  const text = (value: number) => fixed(voice.scale.show(value), decimals);
  return {
    ...NOTHING_DRAWN,
    kind: "added",
    title: slopesWords.added(voice),
    summary: slopesWords.removed(voice, set, slope),
    x: placesAxis(labels[0], added.range, false),
    y: valuesAxis(labels[1], [0, ...drawn, ...line, ...(low ?? []), ...(high ?? [])])!,
    groups: [],
    bands: low && high ? [{ name: slopesWords.pointwise(question.level), group: null, reach: "pointwise", x, low, high }] : [],
    curves: [{ name: slopesWords.line, group: null, x, y: line, supported: true }],
    points: [
      {
        group: null,
        x: added.points.x,
        y: drawn,
        lines: added.points.lines,
        note: sayDrawn(added.points.x.length, added.points.of, plan),
      },
    ],
    marks: [{ what: "zero", axis: "y", at: 0, stretch: null, label: slopesWords.mean }],
    stops: x.map((value, i) => ({
      x: value,
      y: line[i],
      text: sayLeft(voice, value, added.slope * value, ends(value), decimals),
    })),
    twin: {
      head: [labels[0], slopesWords.left(outcome, voice.scale.unit), slopesWords.pointwise(question.level)],
      rows: fewOf(x).map((value) => [significant(value), text(added.slope * value), ends(value)?.map(text).join(" to ") ?? ""]),
    },
  };
}
