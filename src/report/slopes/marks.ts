import type { AlongFigure } from "../../engine/figure/types";
import type { Plan } from "../../engine/plan";
import { slopesWords } from "../wording/slopesPlots";
import type { Mark } from "./presentation";

/** The ends of what all groups share, where they lie inside the modifier's range. */
export function sharedMarks({ shared, range }: AlongFigure, plan: Plan): Mark[] {
  if (!shared) return [];
  const at = (what: Mark["what"], value: number, label: string): Mark => ({ what, axis: "x", at: value, stretch: null, label });
  return [
    ...(shared[0] > range[0] ? [at("shared from", shared[0], slopesWords.sharedFrom(plan))] : []),
    ...(shared[1] < range[1] ? [at("shared to", shared[1], slopesWords.sharedTo(plan))] : []),
  ];
}

/** Where the difference changes sign, with Fieller's interval where it is a stretch; nothing where that lies outside what is drawn. */
export function crossingMarks({ crossing, range: [from, to] }: AlongFigure): Mark[] {
  if (!crossing || crossing.value < from || crossing.value > to) return [];
  const { kind, low, high } = crossing.interval;
  const stretch: Mark["stretch"] =
    kind === "between" ? [Math.max(from, low ?? from), Math.min(to, high ?? to)] : kind === "everywhere" ? [from, to] : null;
  return [{ what: "crossing", axis: "x", at: crossing.value, stretch, label: slopesWords.crossing(crossing.value) }];
}
