import type { AlongFigure, DifferenceCurve, Interval } from "../../engine/figure/types";
import { decimalsFor, fixed, significant } from "../digits";
import { columnName, rowsName, word } from "../names";
import type { Voice } from "../wording/difference";
import { placeText, sayCourse, saySign, saySpot, slopesWords } from "../wording/slopesPlots";
import type { Spot } from "../wording/slopesPlots";
import { placesAxis, valuesAxis } from "./axes";
import { crossingMarks, sharedMarks } from "./marks";
import { bandsOf, curvesOf, fewOf, NOTHING_DRAWN } from "./pieces";
import type { Plot } from "./presentation";

/** The difference between groups, or an amount's slope, along a numeric modifier with both bands; none where it cannot be estimated. */
export function differencePlot(voice: Voice, along: AlongFigure, differs: boolean): Plot[] {
  const { difference, shared } = along;
  const { comparison, plan, scale } = voice;
  if (!difference) return [];
  const name = columnName(along.modifier, plan);
  const spot = spotsOf(difference, shared);
  const places = along.grid.filter((value) => spot(value).every((v) => Number.isFinite(scale.show(v))));
  const decimals = decimalsFor(
    places.map((value) => scale.showError(difference.standardError[difference.x.indexOf(value)], spot(value)[0])),
    Math.max(0, ...places.map((value) => Math.abs(scale.show(spot(value)[0])))),
  );
  const band = (reach: "pointwise" | "simultaneous", interval: Interval | null) =>
    interval
      ? bandsOf(
          {
            name: reach === "pointwise" ? slopesWords.pointwise(comparison.question.level) : slopesWords.simultaneous,
            group: null,
            reach,
            x: difference.x,
            low: interval.low.map(scale.show),
            high: interval.high.map(scale.show),
          },
          shared,
        )
      : [];
  const bands = [...band("simultaneous", difference.simultaneous), ...band("pointwise", difference.pointwise)];
  const title = slopesWords.difference(voice, name);
  const curves = curvesOf({ name: title, group: null, x: difference.x, y: difference.estimate.map(scale.show) }, shared);
  const drawn = curves.filter((curve) => curve.supported || shared === null);
  const y = valuesAxis(scale.head, [0, ...bands.flatMap((b) => [...b.low, ...b.high]), ...drawn.flatMap((curve) => curve.y)]);
  if (!y || curves.length === 0) return [];
  const stops = places.map((value) => ({
    x: value,
    y: scale.show(spot(value)[0]),
    text: saySpot(voice, along.modifier, value, asSpot(difference, shared, value), decimals),
  }));
  const [first, last] = [drawn[0] ?? curves[0], drawn[drawn.length - 1] ?? curves[0]].map((curve, i) =>
    curve.x.at(i === 0 ? 0 : -1)!,
  );
  const at = (value: number) => [value, difference.estimate[difference.x.indexOf(value)]] as const;
  return [
    {
      ...NOTHING_DRAWN,
      kind: "difference",
      title,
      summary: `${title}: ${sayCourse(voice, at(first), at(last), decimals)}.`,
      x: placesAxis(name, along.range, along.log),
      y,
      groups:
        comparison.question.kind === "groups" ? comparison.question.groups.map(({ level }) => word(level)) : [rowsName(plan)],
      bands,
      curves,
      densities: along.densities,
      marks: [
        { what: "zero", axis: "y", at: 0, stretch: null, label: slopesWords.zero(voice) },
        ...(differs ? crossingMarks(along) : []),
        ...sharedMarks(along, plan),
      ],
      stops,
      twin: twinOf(voice, along, difference, differs, places, decimals),
    },
  ];
}

/** Estimate and pointwise ends at a drawn value. */
function spotsOf(difference: DifferenceCurve, shared: AlongFigure["shared"]) {
  return (value: number): readonly number[] => {
    const { estimate, interval, everywhere } = asSpot(difference, shared, value);
    return [estimate, ...(interval ?? []), ...(everywhere ?? [])];
  };
}

function asSpot({ x, estimate, pointwise, simultaneous }: DifferenceCurve, shared: AlongFigure["shared"], value: number): Spot {
  const i = x.indexOf(value);
  const ends = (band: Interval | null): [number, number] | null => band && [band.low[i], band.high[i]];
  const supported = shared !== null && value >= shared[0] && value <= shared[1];
  return { estimate: estimate[i], interval: ends(pointwise), everywhere: supported ? ends(simultaneous) : null, supported };
}

/** Nine values, then the crossing, then the regions, each under the column it belongs to. */
function twinOf(
  voice: Voice,
  along: AlongFigure,
  difference: DifferenceCurve,
  differs: boolean,
  places: readonly number[],
  decimals: number,
): Plot["twin"] {
  const { scale, plan, comparison } = voice;
  const text = (value: number) => fixed(scale.show(value), decimals);
  const cell = (ends: readonly [number, number] | null) => (ends ? `${text(ends[0])} to ${text(ends[1])}` : "");
  const values = fewOf(places).map((value) => {
    const { estimate, interval, everywhere } = asSpot(difference, along.shared, value);
    return [placeText(value), text(estimate), cell(interval), cell(everywhere)];
  });
  const { crossing, regions, range } = along;
  const shown = differs && crossing && crossing.value >= range[0] && crossing.value <= range[1] ? crossing : null;
  const crossings = shown
    ? [[significant(shown.value), slopesWords.changes, slopesWords.crossingInterval(shown.interval), ""]]
    : [];
  const stretches = regions.map((region) => {
    const sign = saySign(region);
    const where = `${significant(region.from)} to ${significant(region.to)}`;
    return region.band === "pointwise" ? [where, "", sign, ""] : [where, "", "", sign];
  });
  return {
    head: [
      columnName(along.modifier, plan),
      scale.head,
      slopesWords.pointwise(comparison.question.level),
      slopesWords.simultaneous,
    ],
    rows: [...values, ...crossings, ...stretches],
  };
}
