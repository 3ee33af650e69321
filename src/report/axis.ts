import { fixed } from "./digits";
import type { Axis, Line } from "./presentation";

/** Ticks aimed at. */
const TICKS = 5;

/** A common axis for lines on the printed scale: round ticks, zero always among them; null where there is nothing to draw. */
export function axisFor(lines: readonly (Line | null)[]): Axis | null {
  const ends = lines.flatMap((line) => (line === null ? [] : line.kind === "point" ? [line.mid] : [line.low, line.high]));
  if (ends.length === 0) return null;
  const low = Math.min(0, ...ends);
  const high = Math.max(0, ...ends);
  return low === high ? { low: -1, high: 1, ticks: [{ at: 0, text: "0" }] } : axisAround(low, high);
}

/** An axis of round ticks that holds two values apart from each other. */
export function axisAround(low: number, high: number): Axis {
  const step = roundStep((high - low) / TICKS);
  const [first, last] = [Math.floor(low / step + 1e-9), Math.ceil(high / step - 1e-9)];
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9));
  const ticks = Array.from({ length: last - first + 1 }, (_, i) => (first + i) * step).map((at) => ({
    at,
    text: fixed(at, decimals),
  }));
  // + 0 turns −0 into 0
  return { low: first * step + 0, high: last * step + 0, ticks };
}

/** 1, 2 or 5 times a power of ten, at least `rough`. */
function roundStep(rough: number): number {
  const power = 10 ** Math.floor(Math.log10(rough));
  return power * ([1, 2, 5].find((m) => m * power >= rough * (1 - 1e-9)) ?? 10);
}
