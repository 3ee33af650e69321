import { quantile } from "../design/quantile";
import type { Density } from "./types";

/** Even values the curve is given at. */
const POINTS = 64;
/** Rows are shared out to so many even places first, so that a curve costs the same however many rows there are. */
const PLACES = 1024;

/**
 * The density of values in each group by a Gaussian kernel of Silverman's (1986, eq. 3.31) width, 0.9·min(sd, IQR/1.34)·n^(−1/5), over one
 * range; the highest point of all is 1. A group of fewer than two rows, or of equal ones, has none.
 * @param groups values by group
 * @param range of the curve; its ends differ
 * @param log look at the logarithms of the values
 */
export function densitiesOf(groups: readonly Float64Array[], range: readonly [number, number], log: boolean): Density[] {
  const take = (value: number) => (log ? Math.log(value) : value);
  const [low, high] = [take(range[0]), take(range[1])];
  const at = Array.from({ length: POINTS }, (_, i) => low + ((high - low) * i) / (POINTS - 1));
  const x = at.map((value, i) => (i === 0 ? range[0] : i === POINTS - 1 ? range[1] : log ? Math.exp(value) : value));
  const curves = groups.flatMap((values, group) => {
    const taken = log ? values.map(Math.log) : values;
    const width = silverman(taken);
    return width === null ? [] : [{ group, heights: kernel(taken, width, at) }];
  });
  const top = Math.max(...curves.flatMap(({ heights }) => heights));
  if (!(top > 0) || !Number.isFinite(top)) return [];
  return curves.map(({ group, heights }) => ({ group, x, height: heights.map((height) => height / top) }));
}

/** Null where the values do not spread. */
function silverman(values: Float64Array): number | null {
  const n = values.length;
  if (n < 2) return null;
  const sorted = Float64Array.from(values).sort();
  const mean = sorted.reduce((sum, value) => sum + value / n, 0);
  const sd = Math.sqrt(sorted.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (n - 1));
  const iqr = (quantile(sorted, 0.75) - quantile(sorted, 0.25)) / 1.34;
  const spread = iqr > 0 ? Math.min(sd, iqr) : sd;
  return spread > 0 && Number.isFinite(spread) ? 0.9 * spread * n ** -0.2 : null;
}

/** Densities at the given even values, each row shared linearly between the two places it lies between. */
function kernel(values: Float64Array, width: number, at: readonly number[]): number[] {
  const [low, high] = [at[0], at[at.length - 1]];
  const step = (high - low) / (PLACES - 1);
  const mass = new Float64Array(PLACES);
  for (const value of values) {
    const place = Math.min(PLACES - 2, Math.floor((value - low) / step));
    const share = (value - low) / step - place;
    mass[place] += 1 - share;
    mass[place + 1] += share;
  }
  return at.map((centre) => {
    let sum = 0;
    for (let i = 0; i < PLACES; i++) if (mass[i] > 0) sum += mass[i] * Math.exp(-0.5 * ((low + i * step - centre) / width) ** 2);
    return sum / (values.length * width * Math.sqrt(2 * Math.PI));
  });
}
