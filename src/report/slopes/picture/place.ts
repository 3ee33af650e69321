import type { PlotAxis } from "../presentation";

/** A rectangle of a picture, in px. */
export interface Area {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

/** Where values of an axis lie: its low end at `from` px, its high end at `to`. Values beyond the ends lie beyond them. */
export function placer(axis: PlotAxis, from: number, to: number): (value: number) => number {
  // halves: the span of an axis that reaches over the whole double range is no number
  const scale = axis.log ? Math.log : (value: number) => value / 2;
  const [low, high] = [scale(axis.from), scale(axis.to)];
  const span = high - low || 1;
  return (value) => from + ((scale(value) - low) / span) * (to - from);
}

/** Both placers of a plot laid over an area, and the area. */
export interface Frame {
  readonly area: Area;
  readonly x: (value: number) => number;
  readonly y: (value: number) => number;
}

export function frameOf(across: PlotAxis, up: PlotAxis, area: Area): Frame {
  const { left, top, width, height } = area;
  return { area, x: placer(across, left, left + width), y: placer(up, top + height, top) };
}
