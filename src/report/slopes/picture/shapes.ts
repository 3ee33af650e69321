/** How a group's points look: told apart without colour. Groups beyond the sixth begin again. */
export const SHAPES = ["circle", "triangle", "square", "diamond", "cross", "plus"] as const;
export type Shape = (typeof SHAPES)[number];

export function shapeOf(group: number | null): Shape {
  return SHAPES[(group ?? 0) % SHAPES.length];
}

/** Shapes without an inside. */
export function isStroked(shape: Shape): boolean {
  return shape === "cross" || shape === "plus";
}

/** A coordinate of a path: a tenth of a px is more than an eye sees. */
export function px(value: number): string {
  return String(Math.round(value * 10) / 10);
}

/** One point as a path, of about the same weight in every shape. */
export function shapePath(shape: Shape, x: number, y: number, r: number): string {
  const at = (dx: number, dy: number) => `${px(x + dx * r)} ${px(y + dy * r)}`;
  switch (shape) {
    case "circle":
      return `M${at(-1, 0)}a${px(r)} ${px(r)} 0 1 0 ${px(2 * r)} 0a${px(r)} ${px(r)} 0 1 0 ${px(-2 * r)} 0Z`;
    case "triangle":
      return `M${at(0, -1.2)}L${at(1.1, 0.75)}L${at(-1.1, 0.75)}Z`;
    case "square":
      return `M${at(-0.9, -0.9)}L${at(0.9, -0.9)}L${at(0.9, 0.9)}L${at(-0.9, 0.9)}Z`;
    case "diamond":
      return `M${at(0, -1.3)}L${at(1.3, 0)}L${at(0, 1.3)}L${at(-1.3, 0)}Z`;
    case "cross":
      return `M${at(-0.9, -0.9)}L${at(0.9, 0.9)}M${at(0.9, -0.9)}L${at(-0.9, 0.9)}`;
    case "plus":
      return `M${at(-1.2, 0)}L${at(1.2, 0)}M${at(0, -1.2)}L${at(0, 1.2)}`;
  }
}
