import { axisAround } from "../axis";
import { significant } from "../digits";
import type { PlotAxis } from "./presentation";

/** A logarithmic axis with fewer round ticks than this takes evenly spaced ones. */
const FEWEST_TICKS = 3;
/** Powers of ten a logarithmic axis has room for. */
const MOST_POWERS = 8;

/** The axis of a modifier: from its smallest to its largest value, ticks between. */
export function placesAxis(label: string, [from, to]: readonly [number, number], log: boolean): PlotAxis {
  const ticks = log ? logTicks(from, to) : [];
  const round = ticks.length < FEWEST_TICKS ? axisAround(from, to).ticks : ticks;
  return { label, from, to, ticks: round.filter(({ at }) => at >= from && at <= to), log };
}

/** An axis of round ticks that holds all the values; null where there are none. */
export function valuesAxis(label: string, values: readonly number[], log = false): PlotAxis | null {
  const [low, high] = endsOf(values);
  if (low > high) return null;
  if (log && low > 0) {
    // a little room beyond the ends, on a scale of ratios
    const room = low === high ? Math.LN2 : 0.03 * (Math.log(high) - Math.log(low));
    const [from, to] = [Math.exp(Math.log(low) - room), Math.exp(Math.log(high) + room)];
    const ticks = logTicks(from, to);
    return {
      label,
      from,
      to,
      ticks: ticks.length < FEWEST_TICKS ? axisAround(from, to).ticks.filter((t) => t.at >= from && t.at <= to) : ticks,
      log,
    };
  }
  const room = low === high ? Math.abs(low) / 10 || 1 : 0;
  const { low: from, high: to, ticks } = axisAround(low - room, high + room);
  return { label, from, to, ticks, log: false };
}

/** 1, 2 and 5 times the powers of ten between two positive ends, or powers alone where these are many. */
function logTicks(from: number, to: number): { at: number; text: string }[] {
  const [first, last] = [Math.floor(Math.log10(from)), Math.ceil(Math.log10(to))];
  const stride = Math.ceil((last - first) / MOST_POWERS);
  const powers = Array.from({ length: Math.floor((last - first) / stride) + 1 }, (_, i) => first + i * stride);
  const steps = powers.length > 4 || stride > 1 ? [1] : [1, 2, 5];
  return powers
    .flatMap((power) => steps.map((step) => Number(`${step}e${power}`)))
    .filter((at) => at >= from && at <= to)
    .map((at) => ({ at, text: significant(at) }));
}

/** Smallest and largest finite value; Infinity and −Infinity where there are none. */
export function endsOf(values: readonly number[]): [number, number] {
  let [low, high] = [Infinity, -Infinity];
  for (const value of values) {
    if (!Number.isFinite(value)) continue;
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  return [low, high];
}
