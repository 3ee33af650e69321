import type { Form } from "../plan";
import type { Term } from "../comparison";
import type { Frame } from "../linear/types";

/** The columns one covariate (or the exposure) contributes to a model, and how to evaluate them anywhere. */
export interface Basis {
  readonly column: string;
  readonly form: Form;
  /** Number of design columns; 0 for a category with one level on the common rows. */
  readonly size: number;
  /** The design columns' values (length `size`) at one value of the covariate, in its own units (a level for a category). */
  at(value: number | string): Float64Array;
  /** Levels in natural order, the reference included (category); null otherwise. */
  readonly levels: readonly string[] | null;
  readonly reference: string | null;
  /**
   * Raw terms of the `model` table and the map from design coefficients to raw ones:
   * raw term t = Σ_k map[t·size + k]·b_k, and the intercept gains Σ_k intercept[k]·b_k.
   */
  readonly raw: { readonly terms: readonly Term[]; readonly map: Float64Array; readonly intercept: Float64Array };
}

/** A basis placed in the frame: `columns[k]` is the frame index of its k-th design column. */
export interface Block {
  readonly basis: Basis;
  readonly columns: readonly number[];
}

/** One contrast of the exposure: the frame column whose coefficient it is, and what that is multiplied by for printing (`per`, scale). */
export interface ContrastColumn {
  readonly contrast: string;
  readonly level: string | null;
  readonly column: number;
  readonly factor: number;
}

/** Every model of the comparison as columns: built once. */
export interface Design {
  readonly frame: Frame;
  readonly outcomeCentre: number;
  readonly exposure: Block;
  readonly contrasts: readonly ContrastColumn[];
  /** By covariate and modifier column name. */
  readonly covariates: ReadonlyMap<string, Block>;
  /** By modifier: `columns[g][k]` is the frame index of exposure column g times the modifier's design column k. */
  readonly interactions: ReadonlyMap<string, { readonly columns: readonly (readonly number[])[] }>;
  /** Of each modifier, its raw values on the common rows (numeric), or its level codes and levels. */
  readonly modifierValues: ReadonlyMap<string, ModifierValues>;
  /** Exposure group of each common row (0 = reference), for a groups exposure; null for an amount. */
  readonly group: { readonly codes: Int32Array; readonly levels: readonly string[] } | null;
}

export type ModifierValues =
  | { readonly kind: "amount"; readonly values: Float64Array }
  | { readonly kind: "category"; readonly codes: Int32Array; readonly levels: readonly string[] };
