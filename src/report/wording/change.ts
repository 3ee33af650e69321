import type { SingleReadout } from "../../engine/comparison";
import { fixed } from "../digits";
import { withUnit } from "../scale";
import { decimalsOf, direction } from "./difference";
import type { Voice } from "./difference";

/** "Unadjusted it is 340 higher: the sign reverses (Simpson's paradox)." @param base the base set's readout of the same contrast */
export function sayChange(
  voice: Voice,
  own: SingleReadout,
  base: { estimate: number; standardError: number | null },
  baseName: string,
): string | null {
  if (!own.shift) return null;
  const was = `${baseName} it is ${direction(voice, base.estimate, decimalsOf(voice, base))}`;
  if (!own.change) return `${was}.`;
  return `${was}: ${meaning(voice, own)}.`;
}

function meaning(voice: Voice, own: SingleReadout): string {
  const shift = own.shift!;
  const decimals = decimalsOf(voice, shift);
  const { scale } = voice;
  const moved = withUnit(fixed(Math.abs(scale.show(own.estimate) - scale.show(own.estimate - shift.estimate)), decimals), scale);
  switch (own.change!) {
    case "steady":
      return isTenth(own)
        ? "adjusting hardly moves it"
        : `adjusting moves it by ${moved}, less than the difference stated to matter`;
    case "unclear":
      return "whether adjusting moves it at all is unclear";
    case "reverses":
      return "the sign reverses (Simpson's paradox)";
    case "fades":
      return `adjusting moves it by ${moved}, and the adjusted interval no longer excludes zero`;
    case "emerges":
      return `adjusting moves it by ${moved}, and the adjusted interval now excludes zero`;
    case "crosses":
      return `adjusting moves it by ${moved} across zero, and neither interval excludes zero`;
    case "shrinks":
      return `adjusting takes ${moved} off it`;
    case "grows":
      return `adjusting adds ${moved} to it`;
  }
}

/** Whether the shift is steady by the ten-percent rule, not by the stated margin alone. */
function isTenth({ estimate, shift }: SingleReadout): boolean {
  const tenth = 0.1 * Math.abs(estimate - shift!.estimate);
  return shift!.interval !== null && shift!.interval.every((end) => Math.abs(end) <= tenth);
}
