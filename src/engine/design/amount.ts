import { powerOfTwo, SAFE_SQUARES } from "../linear/scale";
import type { Form } from "../plan";
import { quantile } from "./quantile";
import type { Basis } from "./types";

/** Knots at Harrell's percentiles (Regression Modeling Strategies). */
const KNOTS: Record<number, readonly number[]> = {
  3: [0.1, 0.5, 0.9],
  4: [0.05, 0.35, 0.65, 0.95],
  5: [0.05, 0.275, 0.5, 0.725, 0.95],
};

/**
 * The design columns of a numeric covariate. Values are centred and divided by a power of two before anything else, so that a covariate
 * near 1e8 loses no digits; `raw` undoes it for the table of coefficients.
 * @param values the common rows' values, all finite (and positive for a log)
 */
export function amountBasis(column: string, form: Exclude<Form, "category">, values: Float64Array): Basis {
  const taken = form === "log" ? values.map(Math.log) : values;
  const { centre, scale } = centring(taken);
  const t = (value: number) => ((form === "log" ? Math.log(value) : value) - centre) / scale;
  const shared = { column, form, levels: null, reference: null };
  if (form === "as is" || form === "log") {
    const raw = { terms: [{ column }], map: Float64Array.of(1 / scale), intercept: Float64Array.of(-centre / scale) };
    return { ...shared, size: 1, at: (v) => Float64Array.of(t(Number(v))), raw };
  }
  return "polynomial" in form
    ? polynomial({ ...shared, t, centre, scale }, taken, form.polynomial)
    : spline({ ...shared, t, centre, scale }, taken, form.spline);
}

interface Start {
  column: string;
  form: Form;
  levels: null;
  reference: null;
  t: (value: number) => number;
  centre: number;
  scale: number;
}

/** Mean and a power of two near the standard deviation, free of overflow. */
export function centring(values: Float64Array): { centre: number; scale: number } {
  const n = values.length;
  let sum = 0;
  for (let i = 0; i < n; i++) sum += values[i];
  const mean = sum / n;
  let squares = 0;
  for (let i = 0; i < n; i++) squares += (values[i] - mean) * (values[i] - mean);
  // within these bounds neither overflow nor underflow can have touched a square that counts
  if (squares > SAFE_SQUARES[0] && squares < SAFE_SQUARES[1]) return { centre: mean, scale: powerOfTwo(Math.sqrt(squares / n)) };
  return carefulCentring(values);
}

/** As centring, for values near the ends of double range, or all the same. */
function carefulCentring(values: Float64Array): { centre: number; scale: number } {
  const n = values.length;
  let largest = 0;
  for (let i = 0; i < n; i++) {
    const size = Math.abs(values[i]);
    if (size > largest) largest = size;
  }
  const whole = largest > 0 ? powerOfTwo(largest) : 1;
  let sum = 0;
  // a power of two: dividing by it is exact
  for (let i = 0; i < n; i++) sum += values[i] / whole;
  const centre = n > 0 ? (sum / n) * whole : 0;
  largest = 0;
  for (let i = 0; i < n; i++) {
    const size = Math.abs(values[i] - centre);
    if (size > largest) largest = size;
  }
  if (!(largest > 0) || !Number.isFinite(largest)) return { centre: n > 0 ? values[0] : 0, scale: 1 };
  const unit = powerOfTwo(largest);
  let squares = 0;
  for (let i = 0; i < n; i++) {
    const value = (values[i] - centre) / unit;
    squares += value * value;
  }
  return { centre, scale: powerOfTwo(unit * Math.sqrt(squares / n)) };
}

/** Powers made orthogonal over the rows by the three-term recurrence (Forsythe 1957). */
function polynomial({ t, centre, scale, ...shared }: Start, taken: Float64Array, degree: number): Basis {
  const x = taken.map((value) => (value - centre) / scale);
  const alphas: number[] = [];
  const betas: number[] = [];
  let before = new Float64Array(x.length);
  let now = new Float64Array(x.length).fill(1);
  let norm = x.length;
  for (let d = 0; d < degree; d++) {
    let along = 0;
    for (let i = 0; i < x.length; i++) along += x[i] * now[i] * now[i];
    alphas.push(norm > 0 ? along / norm : 0);
    const next = new Float64Array(x.length);
    let size = 0;
    for (let i = 0; i < x.length; i++) {
      next[i] = (x[i] - alphas[d]) * now[i] - (d > 0 ? betas[d - 1] : 0) * before[i];
      size += next[i] * next[i];
    }
    betas.push(norm > 0 ? size / norm : 0);
    [before, now, norm] = [now, next, size];
  }
  const evaluate = (value: number) => {
    const out = new Float64Array(degree);
    let last = 0;
    let here = 1;
    for (let d = 0; d < degree; d++) {
      const next = (value - alphas[d]) * here - (d > 0 ? betas[d - 1] : 0) * last;
      out[d] = next;
      [last, here] = [here, next];
    }
    return out;
  };
  return {
    ...shared,
    size: degree,
    at: (v) => evaluate(t(Number(v))),
    raw: rawPowers(shared.column, powersOf(alphas, betas, degree), degree, centre, scale),
  };
}

/** Coefficients of each recurrence polynomial in powers of t: rows of length degree + 1. */
function powersOf(alphas: number[], betas: number[], degree: number): Float64Array[] {
  const rows = [Float64Array.from({ length: degree + 1 }, (_, i) => (i === 0 ? 1 : 0))];
  for (let d = 0; d < degree; d++) {
    const next = new Float64Array(degree + 1);
    for (let i = 0; i <= d; i++) {
      next[i + 1] += rows[d][i];
      next[i] -= alphas[d] * rows[d][i];
      if (d > 0) next[i] -= betas[d - 1] * rows[d - 1][i];
    }
    rows.push(next);
  }
  return rows.slice(1);
}

/** The map to the coefficients of z, z², …: each power of t = (z − c)/s expanded by the binomial theorem. */
function rawPowers(column: string, powers: Float64Array[], degree: number, centre: number, scale: number): Basis["raw"] {
  const map = new Float64Array(degree * degree);
  const intercept = new Float64Array(degree);
  powers.forEach((row, k) => {
    for (let m = 0; m <= degree; m++) {
      let choose = 1;
      for (let j = 0; j <= m; j++) {
        const share = (row[m] * choose * (-centre) ** (m - j)) / scale ** m;
        if (j === 0) intercept[k] += share;
        else map[(j - 1) * degree + k] += share;
        choose = (choose * (m - j)) / (j + 1);
      }
    }
  });
  return { terms: Array.from({ length: degree }, (_, j) => ({ column, power: j + 1 })), map, intercept };
}

/** Restricted cubic spline: straight beyond the outer knots. The curved columns are Harrell's, divided by (outer knots' distance)². */
function spline({ t, centre, scale, ...shared }: Start, taken: Float64Array, count: number): Basis {
  const sorted = Float64Array.from(taken, (value) => (value - centre) / scale).sort();
  const knots = [...new Set(KNOTS[count].map((p) => quantile(sorted, p)))];
  const size = Math.max(1, knots.length - 1);
  const last = knots.length - 1;
  const cube = (x: number) => (x > 0 ? x * x * x : 0);
  const evaluate = (x: number) => {
    const out = new Float64Array(size);
    out[0] = x;
    const span = knots[last] - knots[0];
    for (let j = 0; j < size - 1; j++) {
      const gap = knots[last] - knots[last - 1];
      const left = (cube(x - knots[last - 1]) * (knots[last] - knots[j])) / gap;
      const right = (cube(x - knots[last]) * (knots[last - 1] - knots[j])) / gap;
      out[j + 1] = (cube(x - knots[j]) - left + right) / (span * span);
    }
    return out;
  };
  const map = new Float64Array(size * size);
  for (let k = 0; k < size; k++) map[k * size + k] = 1 / scale;
  const terms = Array.from({ length: size }, (_, k) =>
    k === 0 ? { column: shared.column } : { column: shared.column, knot: k },
  );
  const intercept = new Float64Array(size);
  intercept[0] = -centre / scale;
  return { ...shared, size, at: (v) => evaluate(t(Number(v))), raw: { terms, map, intercept } };
}
