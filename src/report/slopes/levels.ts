import type { LevelDifference } from "../../engine/figure/types";
import { decimalsFor, fixed } from "../digits";
import { columnName, word } from "../names";
import type { Voice } from "../wording/difference";
import { placeText, saySpot, slopesWords } from "../wording/slopesPlots";
import { valuesAxis } from "./axes";
import { NOTHING_DRAWN } from "./pieces";
import type { Plot } from "./presentation";

/** Up to this many levels the summary says each; of more, the lowest and the highest. */
const SAID_LEVELS = 4;

/** The difference at each level of a category, a dot and an interval each; none where it cannot be estimated. */
export function levelsPlot(voice: Voice, modifier: string, levels: readonly LevelDifference[]): Plot[] {
  const { plan, scale, comparison } = voice;
  const drawn = levels.filter(({ estimate, interval }) =>
    [estimate, ...(interval ?? [])].every((v) => Number.isFinite(scale.show(v))),
  );
  const y = valuesAxis(scale.head, [
    0,
    ...drawn.flatMap(({ estimate, interval }) => [estimate, ...(interval ?? [])].map(scale.show)),
  ]);
  if (!y || drawn.length === 0) return [];
  const name = columnName(modifier, plan);
  const decimals = decimalsFor(
    drawn.map(({ standardError, estimate }) => scale.showError(standardError, estimate)),
    Math.max(...drawn.map(({ estimate }) => Math.abs(scale.show(estimate)))),
  );
  const label = ({ value }: LevelDifference) => (typeof value === "number" ? placeText(value) : word(value));
  const texts = drawn.map((level) => saySpot(voice, modifier, level.value, { ...level, everywhere: null }, decimals));
  const order = drawn.map((_, i) => i).sort((a, b) => drawn[a].estimate - drawn[b].estimate);
  const [lowest, highest] = [order[0], order[order.length - 1]];
  const text = (value: number) => fixed(scale.show(value), decimals);
  return [
    {
      ...NOTHING_DRAWN,
      kind: "levels",
      title: slopesWords.levels(voice, name),
      summary: texts.length <= SAID_LEVELS ? texts.join(" ") : [texts[lowest], texts[highest]].join(" "),
      x: {
        label: name,
        from: -0.5,
        to: drawn.length - 0.5,
        ticks: drawn.map((level, at) => ({ at, text: label(level) })),
        log: false,
      },
      y,
      groups: [],
      intervals: drawn.map((level, x) => ({
        name: label(level),
        x,
        y: scale.show(level.estimate),
        low: level.interval && scale.show(level.interval[0]),
        high: level.interval && scale.show(level.interval[1]),
        text: texts[x],
      })),
      marks: [{ what: "zero", axis: "y", at: 0, stretch: null, label: slopesWords.zero(voice) }],
      stops: drawn.map(({ estimate }, x) => ({ x, y: scale.show(estimate), text: texts[x] })),
      twin: {
        head: [name, scale.head, slopesWords.pointwise(comparison.question.level)],
        rows: drawn.map((level) => [
          label(level),
          text(level.estimate),
          level.interval ? `${text(level.interval[0])} to ${text(level.interval[1])}` : "",
        ]),
      },
    },
  ];
}
