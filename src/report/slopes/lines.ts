import type { AlongFigure } from "../../engine/figure/types";
import { decimalsFor, fixed } from "../digits";
import { columnName, word } from "../names";
import { outcomeScaleOf } from "../scale";
import type { Voice } from "../wording/difference";
import { meanCell, placeText, sayDrawn, sayLines, sayMeans, slopesWords } from "../wording/slopesPlots";
import type { Mean } from "../wording/slopesPlots";
import { endsOf, placesAxis, valuesAxis } from "./axes";
import { sharedMarks } from "./marks";
import { bandsOf, curvesOf, fewOf, NOTHING_DRAWN } from "./pieces";
import type { Plot } from "./presentation";

/** Rows and each group's fitted line along a numeric modifier; none for an amount, or where no line can be drawn. */
export function linesPlot(voice: Voice, along: AlongFigure): Plot[] {
  const { comparison, plan, outcome } = voice;
  if (along.lines.length === 0) return [];
  const { question } = comparison;
  const scale = outcomeScaleOf(question, plan);
  const groups = question.groups.map(({ level }) => word(level));
  const name = columnName(along.modifier, plan);
  const bands = along.lines.flatMap(({ group, rows, x, interval }) =>
    interval
      ? bandsOf(
          {
            name: `${groups[group]}, ${slopesWords.pointwise(question.level)}`,
            group,
            reach: "pointwise",
            x,
            low: interval.low.map(scale.show),
            high: interval.high.map(scale.show),
          },
          rows,
        )
      : [],
  );
  const curves = along.lines.flatMap(({ group, rows, x, estimate }) =>
    curvesOf({ name: slopesWords.fitted(groups[group]), group, x, y: estimate.map(scale.show) }, rows),
  );
  const points = pointsByGroup(along, scale.show);
  const y = valuesAxis(
    scale.unit === "" ? outcome : `${outcome} (${scale.unit})`,
    [
      ...points.flatMap((p) => p.y),
      ...bands.flatMap((band) => [...band.low, ...band.high]),
      ...curves.filter((curve) => curve.supported).flatMap((curve) => curve.y),
    ],
    scale.log,
  );
  if (!y || curves.length === 0) return [];
  const means = meansAt(along, voice);
  const places = along.grid.filter((value) => means(value).every((mean) => Number.isFinite(mean.y)));
  return [
    {
      ...NOTHING_DRAWN,
      kind: "lines",
      title: slopesWords.lines(voice, name),
      summary: summaryOf(along, voice, name),
      x: placesAxis(name, along.range, along.log),
      y,
      groups,
      bands,
      curves,
      points: points.map(({ group, x, y: drawn, lines }, i) => ({
        group,
        x,
        y: drawn,
        lines,
        // said once, for all groups together
        note: i === 0 ? sayDrawn(along.points.x.length, along.points.of, plan) : null,
      })),
      marks: sharedMarks(along, plan),
      stops: places.map((value) => ({
        x: value,
        y: means(value)[0].y,
        text: sayMeans(voice, along.modifier, value, means(value)),
      })),
      twin: {
        head: [name, ...along.lines.map(({ group }) => groups[group])],
        rows: fewOf(places).map((value) => [
          placeText(value),
          ...means(value).map(({ mean, interval }) => meanCell(mean, interval)),
        ]),
      },
    },
  ];
}

function pointsByGroup({ points, lines }: AlongFigure, show: (value: number) => number) {
  return lines.map(({ group }) => {
    const at = points.group.flatMap((code, i) => (code === group ? [i] : []));
    return { group, x: at.map((i) => points.x[i]), y: at.map((i) => show(points.y[i])), lines: at.map((i) => points.lines[i]) };
  });
}

/** Each group's mean at a value of the grid, in digits. */
function meansAt({ lines }: AlongFigure, { comparison, plan }: Voice) {
  const { question } = comparison;
  const scale = outcomeScaleOf(question, plan);
  const errors = lines.flatMap((line) => line.estimate.map((value, i) => scale.showError(line.standardError[i], value)));
  const [low, high] = endsOf(lines.flatMap((line) => line.estimate.map(scale.show)));
  const decimals = decimalsFor(errors, Math.max(Math.abs(low), Math.abs(high)));
  const text = (value: number) => fixed(scale.show(value), decimals);
  return (value: number) =>
    lines.map(({ group, rows, x, estimate, interval }): Mean & { readonly y: number } => {
      const i = x.indexOf(value);
      const known = interval && [interval.low[i], interval.high[i]].every((end) => Number.isFinite(scale.show(end)));
      return {
        y: scale.show(estimate[i]),
        level: question.groups[group].level,
        mean: text(estimate[i]),
        interval: known ? [text(interval.low[i]), text(interval.high[i])] : null,
        supported: value >= rows[0] && value <= rows[1],
      };
    });
}

/** Where each group's line begins and ends among its own rows. */
function summaryOf(along: AlongFigure, voice: Voice, name: string): string {
  const scale = outcomeScaleOf(voice.comparison.question, voice.plan);
  const courses = along.lines.map(({ group, rows, x, estimate, standardError }) => {
    const at = rows.map((end) => x.indexOf(end));
    const decimals = decimalsFor(
      at.map((i) => scale.showError(standardError[i], estimate[i])),
      Math.abs(scale.show(estimate[at[0]])),
    );
    const [from, to] = at.map((i) => `${fixed(scale.show(estimate[i]), decimals)} at ${placeText(x[i])}`);
    return { level: voice.comparison.question.groups[group].level, from, to };
  });
  return sayLines(voice, name, courses);
}
