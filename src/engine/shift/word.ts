import type { ChangeWord, Estimate } from "../comparison";

/** A shift inside this share of the unadjusted estimate is steady: the change-in-estimate rule (common practice; Mickey & Greenland 1989). */
const STEADY_SHARE = 0.1;

type Interval = readonly [number, number];

/**
 * The word for a change, read from the shift first (METHODS 4, in this order). Null where an interval is missing.
 * @param margin largest difference that does not matter, on the scale of the estimates as [below, above] bounds, or null
 */
export function changeWord(
  base: Estimate,
  adjusted: Estimate,
  shift: Interval | null,
  margin: Interval | null,
): ChangeWord | null {
  if (!shift || !base.interval || !adjusted.interval) return null;
  const tenth = STEADY_SHARE * Math.abs(base.estimate);
  if (within(shift, [-tenth, tenth]) || (margin && within(shift, margin))) return "steady";
  if (shift[0] <= 0 && shift[1] >= 0) return "unclear";
  const was = excludesZero(base.interval);
  const is = excludesZero(adjusted.interval);
  const turned = Math.sign(base.estimate) !== Math.sign(adjusted.estimate);
  if (was && is && turned) return "reverses";
  if (was && !is) return "fades";
  if (!was && is) return "emerges";
  if (!was && !is && turned) return "crosses";
  return Math.abs(adjusted.estimate) < Math.abs(base.estimate) ? "shrinks" : "grows";
}

/** A stated margin as bounds on the scale of the estimates; for a log outcome it is a ratio − 1. */
export function marginBounds(margin: number | null, form: "as is" | "log"): Interval | null {
  if (margin === null) return null;
  return form === "log" ? [margin < 1 ? Math.log(1 - margin) : -Infinity, Math.log(1 + margin)] : [-margin, margin];
}

export function within(interval: Interval, bounds: Interval): boolean {
  return interval[0] >= bounds[0] && interval[1] <= bounds[1];
}

function excludesZero([low, high]: Interval): boolean {
  return low > 0 || high < 0;
}
