import type { Profile } from "../comparison";
import { quantile } from "../design/quantile";
import type { ContrastColumn, Design } from "../design/types";
import type { Plan } from "../plan";
import { combine, contrastAt, intervalOf } from "./fit";
import { levelsOf, rangeOf } from "./range";
import { sortedValues } from "./sorted";
import type { InteractionFit } from "./types";

/** Profiles of a full grid; with more, one modifier moves at a time. */
const FULL_GRID = 9;

interface Stop {
  readonly value: number | string;
  readonly supported: boolean;
}

/** The differences of one contrast at stated values of the modifiers; profiles that cannot be estimated are left out. */
export function profilesOf(
  design: Design,
  interaction: InteractionFit,
  contrast: ContrastColumn,
  level: number,
  reportAt: Plan["reportAt"],
): Profile[] {
  const { modifiers } = interaction;
  const stops = modifiers.map((name) => stopsOf(design, name, reportAt?.[name]));
  return gridOf(
    stops,
    modifiers.map((name) => middleOf(design, name)),
  ).flatMap((choice): Profile[] => {
    const where = modifiers.map((column, i) => ({ column, value: choice[i].value }));
    const combination = contrastAt(design, interaction, contrast, new Map(where.map(({ column, value }) => [column, value])));
    if (!combination) return [];
    const combined = combine(interaction, combination);
    const { estimate, standardError } = combined;
    return [
      {
        where,
        estimate,
        standardError,
        interval: intervalOf(combined, level),
        supported: choice.every((stop) => stop.supported),
      },
    ];
  });
}

function stopsOf(design: Design, name: string, stated: readonly (number | string)[] | undefined): Stop[] {
  const values = design.modifierValues.get(name)!;
  if (values.kind === "category") {
    const { present, shared } = levelsOf(design, values);
    const wanted = stated ? stated.map(String).filter((level) => present.includes(level)) : present;
    return (wanted.length > 0 ? wanted : present).map((value) => ({ value, supported: shared.has(value) }));
  }
  const { shared, reporting } = rangeOf(design, values.values);
  const wanted = stated?.map(Number).filter(Number.isFinite) ?? [];
  return (wanted.length > 0 ? wanted : reporting).map((value) => ({
    value,
    supported: shared !== null && value >= shared[0] && value <= shared[1],
  }));
}

/** Median of a numeric modifier, commonest level of a category. */
export function middleOf(design: Design, name: string): Stop {
  const values = design.modifierValues.get(name)!;
  if (values.kind === "amount") return { value: quantile(sortedValues(values.values), 0.5), supported: true };
  const counts = values.levels.map(() => 0);
  for (const code of values.codes) counts[code]++;
  return { value: values.levels[counts.indexOf(Math.max(...counts))], supported: true };
}

/** Every combination up to nine; beyond that each modifier's stops in turn, the others in the middle. */
function gridOf(stops: readonly Stop[][], middles: readonly Stop[]): Stop[][] {
  const size = stops.reduce((product, list) => product * list.length, 1);
  if (size <= FULL_GRID || stops.length === 1)
    return stops.reduce<Stop[][]>((grid, list) => grid.flatMap((row) => list.map((stop) => [...row, stop])), [[]]);
  return stops.flatMap((list, i) => list.map((stop) => middles.map((middle, k) => (k === i ? stop : middle))));
}
