import type { Plan } from "../../src/engine/plan";
import type { Column, Table } from "../../src/engine/table";
import { naturalCompare } from "../../src/engine/question/natural";

/** A table from plain columns: numbers (null missing) become numbers, strings categories. */
export function tableOf(columns: Record<string, readonly (number | string | null)[]>): Table {
  const names = Object.keys(columns);
  const rows = columns[names[0]].length;
  return {
    rows,
    columns: names.map((name) => columnOf(name, columns[name])),
    lines: Uint32Array.from({ length: rows }, (_, i) => i + 2),
    source: { file: "test.csv", sha256: "0".repeat(64), bytes: 0 },
    findings: [],
  };
}

function columnOf(name: string, cells: readonly (number | string | null)[]): Column {
  if (cells.every((cell) => cell === null || typeof cell === "number")) {
    return { kind: "number", name, values: Float64Array.from(cells, (cell) => (cell === null ? NaN : (cell as number))) };
  }
  const levels = [...new Set(cells.filter((cell) => cell !== null).map(String))].sort(naturalCompare);
  return {
    kind: "category",
    name,
    levels,
    codes: Int32Array.from(cells, (cell) => (cell === null ? -1 : levels.indexOf(String(cell)))),
  };
}

/** A plan in short. */
export function planOf(outcome: string, exposure: string, covariates: readonly string[] = [], more: Partial<Plan> = {}): Plan {
  return {
    outcome: { column: outcome },
    exposure: { column: exposure },
    covariates: covariates.map((column) => ({ column })),
    ...more,
  };
}

/** A seeded generator in [0, 1) (xorshift, Marsaglia 2003) and a normal from twelve of its draws. */
export function seeded(seed: number): { uniform: () => number; normal: () => number } {
  let state = seed >>> 0 || 1;
  const uniform = () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return (state >>> 0) / 4294967296;
  };
  for (let i = 0; i < 20; i++) uniform();
  return { uniform, normal: () => Array.from({ length: 12 }, uniform).reduce((a, b) => a + b, -6) };
}
