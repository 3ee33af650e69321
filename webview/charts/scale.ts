import type { Axis } from "../../src/report/presentation";

/** Where a value stands on an axis, in percent of its width; beyond the ends it stays at the end. */
export function percent(axis: Axis, value: number): number {
  const share = axis.high > axis.low ? (value - axis.low) / (axis.high - axis.low) : 0.5;
  return Math.min(100, Math.max(0, share * 100));
}

export function within(axis: Axis, value: number): boolean {
  return value >= axis.low && value <= axis.high;
}
