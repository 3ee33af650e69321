import { escapeXml } from "../../escape";
import type { Look, Piece } from "./pieces";
import { isStroked, shapeOf } from "./shapes";

/**
 * Colours of a saved picture, each at least 4.5 to 1 on white (WCAG 2.2, 1.4.3): the reference is drawn in ink, differences in the blue they have
 * in the panel's table.
 */
const INK = "#222222";
const SOFT = "#5a5a5a";
const BLUE = "#1f5fa8";
const GROUPS = [INK, "#b4540a", "#2c7a3f", "#7a3e9d", "#a82020", "#5c5c12"] as const;

/** What of a piece is painted how, in a saved file. The page has the same looks in its theme's colours. */
const PAINT: Readonly<Record<Look, (colour: string) => string>> = {
  band: (colour) => `fill="${colour}" fill-opacity="0.16"`,
  density: (colour) => `fill="${colour}" fill-opacity="0.35"`,
  marker: (colour) => `fill="${colour}" stroke="#ffffff" stroke-width="1"`,
  dot: (colour) => `fill="${colour}"`,
  outline: (colour) => `fill="none" stroke="${colour}" stroke-width="1" stroke-dasharray="4 3"`,
  line: (colour) => `fill="none" stroke="${colour}" stroke-width="2"`,
  beyond: (colour) => `fill="none" stroke="${colour}" stroke-width="1.5" stroke-dasharray="2 4"`,
  points: (colour) => `fill="none" stroke="${colour}" stroke-width="0.9" stroke-opacity="0.55"`,
  interval: (colour) => `fill="none" stroke="${colour}" stroke-width="1.8"`,
  zero: () => `fill="none" stroke="${INK}" stroke-width="1"`,
  crossing: () => `fill="none" stroke="${INK}" stroke-width="1.2"`,
  stretch: () => `fill="none" stroke="${INK}" stroke-width="1"`,
  arrow: () => `fill="none" stroke="${SOFT}" stroke-width="1.2"`,
  shared: () => `fill="none" stroke="${SOFT}" stroke-width="1" stroke-dasharray="3 2"`,
};

/** A piece as an element of an SVG file; nothing where it is empty. */
export function paintPiece({ look, group, d }: Piece): string {
  if (d === "") return "";
  const colour = group === null ? BLUE : GROUPS[group % GROUPS.length];
  const crossed = look === "marker" && isStroked(shapeOf(group));
  const paint = crossed ? `fill="none" stroke="${colour}" stroke-width="2"` : PAINT[look](colour);
  return `<path ${paint} d="${d}"/>`;
}

export interface Lettering {
  readonly size?: number;
  readonly anchor?: "start" | "middle" | "end";
  readonly bold?: boolean;
  readonly soft?: boolean;
  readonly group?: number | null;
  /** A rim of white, for letters over lines. */
  readonly rim?: boolean;
}

/** Letters standing on a base line. */
export function paintText(
  text: string,
  x: number,
  y: number,
  { size = 13, anchor, bold, soft, group, rim }: Lettering = {},
): string {
  const fill = typeof group === "number" ? GROUPS[group % GROUPS.length] : soft ? SOFT : INK;
  const more = [
    anchor && anchor !== "start" ? ` text-anchor="${anchor}"` : "",
    bold ? ` font-weight="600"` : "",
    rim ? ` stroke="#ffffff" stroke-width="3" stroke-linejoin="round" paint-order="stroke"` : "",
  ].join("");
  return `<text x="${x.toFixed(1)}" y="${y.toFixed(1)}" font-size="${size}" fill="${fill}"${more}>${escapeXml(text)}</text>`;
}

/** Grid lines and ticks: thin and pale, under everything. */
export function paintRule(d: string, strong = false): string {
  return d === "" ? "" : `<path fill="none" stroke="${strong ? SOFT : "#e2e2e2"}" stroke-width="1" d="${d}"/>`;
}
