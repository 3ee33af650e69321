import type { Question } from "../comparison";
import type { Clusters, Frame } from "../linear/types";
import type { RowMemory } from "../passes/types";
import type { Groups } from "../question/columns";
import type { Resolved, Source } from "../question/resolve";
import { amountBasis, centring } from "./amount";
import { categoryBasis } from "./category";
import type { Basis, Block, ContrastColumn, Design, ModifierValues } from "./types";

/** Room for one column of the rows' length. */
type Take = () => Float64Array;

/** Minus sign of a contrast's name. */
const MINUS = "−";

/**
 * Every model of a comparison as columns on the given rows, built once: the constant, the covariates, the exposure, and the exposure times each
 * modifier. Numeric columns are centred and scaled (basis.raw undoes it); the outcome is centred.
 * @param rows table rows, complete for everything named
 * @param memory where the columns are to live; the design is good until its next reset
 */
export function buildDesign(
  resolved: Resolved,
  rows: Int32Array,
  covariates: readonly string[],
  modifiers: readonly string[],
  memory?: RowMemory,
): Design {
  const take: Take = () => memory?.take(rows.length) ?? new Float64Array(rows.length);
  const columns: Float64Array[] = [take().fill(1)];
  const add = (values: Float64Array): number => columns.push(values) - 1;
  const blocks = new Map<string, Block>();
  const scratch = take();
  for (const name of new Set([...covariates, ...modifiers])) {
    const source = resolved.sources.get(name)!;
    const basis = covariateBasis(source, rows, scratch);
    blocks.set(name, { basis, columns: basisColumns(basis, source, rows, take).map(add) });
  }
  const { exposure, contrasts, group } = exposureBlock(resolved, rows, take, add);
  const interactions = new Map<string, { columns: number[][] }>();
  for (const name of modifiers) {
    const own = blocks.get(name)!;
    interactions.set(name, {
      columns: exposure.columns.map((g) => own.columns.map((k) => add(product(columns[g], columns[k], take())))),
    });
  }
  const raw = gather(resolved.outcome, rows, take());
  const { centre } = centring(raw);
  const frame: Frame = {
    n: rows.length,
    columns,
    outcome: less(raw, centre),
    weights: resolved.weights ? gather(resolved.weights, rows, take()) : null,
    clusters: resolved.cluster ? compactClusters(resolved.cluster, rows) : null,
  };
  const modifierValues = new Map<string, ModifierValues>(
    modifiers.map((name) => [name, valuesOf(resolved.sources.get(name)!, rows)]),
  );
  return { frame, outcomeCentre: centre, exposure, contrasts, covariates: blocks, interactions, modifierValues, group };
}

/** Common rows of each exposure group, the reference first; empty for an amount. */
export function countGroups(design: Design): Question["groups"] {
  if (!design.group) return [];
  const counts = new Array<number>(design.group.levels.length).fill(0);
  const { codes } = design.group;
  for (let i = 0; i < codes.length; i++) counts[codes[i]]++;
  return design.group.levels.map((level, i) => ({ level, rows: counts[i] }));
}

/** @param scratch room for the values, which the basis does not keep */
function covariateBasis(source: Source, rows: Int32Array, scratch: Float64Array): Basis {
  if (source.kind === "amount") return amountBasis(source.column, source.form, gather(source.values, rows, scratch));
  return categoryBasis(source.column, source.groups, gatherCodes(source.groups.codes, rows), source.reference);
}

function basisColumns(basis: Basis, source: Source, rows: Int32Array, take: Take): Float64Array[] {
  const columns = Array.from({ length: basis.size }, take);
  if (source.kind === "category") {
    const byLevel = source.groups.levels.map((level) => basis.at(level));
    for (let i = 0; i < rows.length; i++) {
      const values = byLevel[source.groups.codes[rows[i]]];
      for (let k = 0; k < basis.size; k++) columns[k][i] = values[k];
    }
    return columns;
  }
  if (basis.form === "as is") {
    const [slope] = basis.raw.map;
    // (value − centre)/scale with an exact power of two: the same as basis.at, without an array a row
    const centre = -basis.raw.intercept[0] / slope;
    for (let i = 0; i < rows.length; i++) columns[0][i] = (source.values[rows[i]] - centre) * slope;
    return columns;
  }
  for (let i = 0; i < rows.length; i++) {
    const values = basis.at(source.values[rows[i]]);
    for (let k = 0; k < basis.size; k++) columns[k][i] = values[k];
  }
  return columns;
}

function exposureBlock(resolved: Resolved, rows: Int32Array, take: Take, add: (values: Float64Array) => number) {
  const { exposure } = resolved;
  if (exposure.kind === "amount") {
    const values = gather(exposure.values, rows);
    const { centre, scale } = centring(values);
    const centred = take();
    for (let i = 0; i < values.length; i++) centred[i] = (values[i] - centre) / scale;
    const column = add(centred);
    const basis = amountBasis(exposure.column, "as is", values);
    const contrast: ContrastColumn = {
      contrast: `per ${exposure.per} ${exposure.column}`,
      level: null,
      column,
      factor: exposure.per / scale,
    };
    return { exposure: { basis, columns: [column] } as Block, contrasts: [contrast], group: null };
  }
  const { groups, reference } = exposure;
  const order = [reference, ...groups.levels.filter((level) => level !== reference)];
  const place = groups.levels.map((level) => order.indexOf(level));
  const codes = gatherCodes(groups.codes, rows);
  for (let i = 0; i < codes.length; i++) codes[i] = place[codes[i]];
  const counts = new Array<number>(order.length).fill(0);
  for (let i = 0; i < codes.length; i++) counts[codes[i]]++;
  const basis = categoryBasis(exposure.column, groups, gatherCodes(groups.codes, rows), reference);
  const contrasts: ContrastColumn[] = [];
  const placed: number[] = [];
  order.slice(1).forEach((level, g) => {
    // A group without rows has no column, and so no number.
    const column = counts[g + 1] > 0 && counts[0] > 0 ? add(indicator(codes, g + 1, take())) : -1;
    if (column >= 0) placed.push(column);
    contrasts.push({ contrast: `${level} ${MINUS} ${reference}`, level, column, factor: 1 });
  });
  return { exposure: { basis, columns: placed } as Block, contrasts, group: { codes, levels: order } };
}

function valuesOf(source: Source, rows: Int32Array): ModifierValues {
  if (source.kind === "amount") return { kind: "amount", values: gather(source.values, rows) };
  return { kind: "category", codes: gatherCodes(source.groups.codes, rows), levels: source.groups.levels };
}

/** Clusters that have rows, numbered in order of appearance. */
function compactClusters({ codes }: Groups, rows: Int32Array): Clusters {
  const place = new Map<number, number>();
  const compact = Int32Array.from(rows, (row) => {
    const code = codes[row];
    let at = place.get(code);
    if (at === undefined) place.set(code, (at = place.size));
    return at;
  });
  return { codes: compact, count: place.size };
}

function indicator(codes: Int32Array, wanted: number, out: Float64Array): Float64Array {
  for (let i = 0; i < codes.length; i++) out[i] = codes[i] === wanted ? 1 : 0;
  return out;
}

function gather(values: Float64Array, rows: Int32Array, out: Float64Array = new Float64Array(rows.length)): Float64Array {
  for (let i = 0; i < rows.length; i++) out[i] = values[rows[i]];
  return out;
}

function gatherCodes(codes: Int32Array, rows: Int32Array): Int32Array {
  const out = new Int32Array(rows.length);
  for (let i = 0; i < rows.length; i++) out[i] = codes[rows[i]];
  return out;
}

function less(values: Float64Array, centre: number): Float64Array {
  for (let i = 0; i < values.length; i++) values[i] -= centre;
  return values;
}

function product(a: Float64Array, b: Float64Array, out: Float64Array): Float64Array {
  for (let i = 0; i < a.length; i++) out[i] = a[i] * b[i];
  return out;
}
