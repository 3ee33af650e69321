import type { Look, Piece } from "../../src/report/slopes/picture/pieces";
import { isStroked, shapeOf } from "../../src/report/slopes/picture/shapes";
import { svg } from "../dom";
import type { Palette } from "./palette";

/** How a piece is painted in the theme's colours, as in a saved picture. */
export interface Paint {
  readonly fill: string | null;
  readonly fillShare: number;
  readonly stroke: string | null;
  readonly strokeShare: number;
  readonly width: number;
  readonly dash: readonly number[];
}

/** Colour of a group; null is the difference between groups, or rows that are not told apart. */
export function colourOf({ groups, difference }: Palette, group: number | null): string {
  return group === null ? difference : groups[group % groups.length];
}

export function paintOf(look: Look, group: number | null, palette: Palette): Paint {
  const colour = colourOf(palette, group);
  const filled = (share: number): Paint => ({ fill: colour, fillShare: share, stroke: null, strokeShare: 1, width: 0, dash: [] });
  const stroked = (stroke: string, width: number, dash: readonly number[] = [], share = 1): Paint => ({
    fill: null,
    fillShare: 1,
    stroke,
    strokeShare: share,
    width,
    dash,
  });
  switch (look) {
    case "band":
      return filled(0.2);
    case "density":
      return filled(0.4);
    case "dot":
      return filled(1);
    case "marker":
      return isStroked(shapeOf(group)) ? stroked(colour, 2) : { ...filled(1), stroke: palette.ground, width: 1 };
    case "line":
      return stroked(colour, 2);
    case "beyond":
      return stroked(colour, 1.5, [2, 4]);
    case "outline":
      return stroked(colour, 1, [4, 3]);
    case "points":
      return stroked(colour, 1, [], 0.6);
    case "interval":
      return stroked(colour, 1.8);
    case "zero":
    case "stretch":
      return stroked(palette.ink, 1);
    case "crossing":
      return stroked(palette.ink, 1.2);
    case "shared":
      return stroked(palette.soft, 1, [3, 2]);
    case "arrow":
      return stroked(palette.soft, 1.2);
  }
}

/** Pieces on a canvas, in their order. */
export function paintOn(ctx: CanvasRenderingContext2D, pieces: readonly Piece[], palette: Palette): void {
  ctx.save();
  for (const { look, group, d } of pieces) {
    const { fill, fillShare, stroke, strokeShare, width, dash } = paintOf(look, group, palette);
    const path = new Path2D(d);
    if (fill !== null) {
      ctx.globalAlpha = fillShare;
      ctx.fillStyle = fill;
      ctx.fill(path);
    }
    if (stroke === null) continue;
    ctx.globalAlpha = strokeShare;
    ctx.strokeStyle = stroke;
    ctx.lineWidth = width;
    ctx.setLineDash([...dash]);
    ctx.stroke(path);
  }
  ctx.restore();
}

/** Pieces as a small picture among the words. */
export function paintedIcon(pieces: readonly Piece[], width: number, height: number, palette: Palette): SVGSVGElement {
  const paths = pieces.map(({ look, group, d }) => {
    const { fill, fillShare, stroke, strokeShare, width: thick, dash } = paintOf(look, group, palette);
    return svg("path", {
      d,
      fill: fill ?? "none",
      "fill-opacity": fillShare,
      stroke,
      "stroke-opacity": strokeShare,
      "stroke-width": thick,
      "stroke-dasharray": dash.join(" ") || null,
    });
  });
  return svg("svg", { width, height, viewBox: `0 0 ${width} ${height}`, "aria-hidden": "true" }, ...paths);
}
