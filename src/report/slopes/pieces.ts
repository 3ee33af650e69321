import type { Band, Curve } from "./presentation";

/** A curve in up to three pieces: before, inside and after the stretch that rows support; null supports none of it. */
export function curvesOf(
  { name, group, x, y }: Pick<Curve, "name" | "group" | "x" | "y">,
  supported: readonly [number, number] | null,
): Curve[] {
  const piece = (inside: boolean, takes: (value: number) => boolean): Curve[] => {
    const at = x.flatMap((value, i) => (takes(value) && Number.isFinite(y[i]) ? [i] : []));
    if (at.length < 2) return [];
    return [{ name, group, x: at.map((i) => x[i]), y: at.map((i) => y[i]), supported: inside }];
  };
  if (!supported) return piece(false, () => true);
  const [from, to] = supported;
  return [
    ...piece(false, (value) => value <= from),
    ...piece(true, (value) => value >= from && value <= to),
    ...piece(false, (value) => value >= to),
  ];
}

/** A band over the stretch that rows support; none where an end cannot be drawn. */
export function bandsOf({ x, low, high, ...band }: Band, supported: readonly [number, number] | null): Band[] {
  if (!supported) return [];
  const at = x.flatMap((value, i) => (value >= supported[0] && value <= supported[1] ? [i] : []));
  const drawn = { ...band, x: at.map((i) => x[i]), low: at.map((i) => low[i]), high: at.map((i) => high[i]) };
  return at.length < 2 || ![...drawn.low, ...drawn.high].every(Number.isFinite) ? [] : [drawn];
}

/** About nine of some values, the ends among them: the rows of a text twin. */
export function fewOf<T>(values: readonly T[]): T[] {
  const wanted = Math.min(9, values.length);
  if (wanted < 2) return [...values];
  return Array.from({ length: wanted }, (_, i) => values[Math.round((i * (values.length - 1)) / (wanted - 1))]);
}

/** What a plot of one kind does not have. */
export const NOTHING_DRAWN = { bands: [], curves: [], points: [], intervals: [], densities: [], marks: [] } as const;
