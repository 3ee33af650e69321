import { readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { covariance } from "../../../src/engine/errors/covariance";
import { influence } from "../../../src/engine/errors/influence";
import { factorise } from "../../../src/engine/linear/factorise";
import { fitColumns } from "../../../src/engine/linear/fit";
import type { Fit, Frame } from "../../../src/engine/linear/types";
import type { Variance } from "../../../src/engine/plan";
import { treeErrors } from "../../../src/engine/tree";
import { compiledKernels } from "../../../src/engine/kernels/compiled";
import { plainKernels } from "../../../src/engine/kernels/plain";
import { writeProgram } from "../../../src/engine/tree/program";
import { walkRows, walkSizes } from "../../../src/engine/tree/rows";
import { growTree } from "../../../src/engine/tree/trie";
import { relativeError, TOLERANCE } from "../../tolerances";
import { seeded } from "../fixtures";
import { SOURCES, translate } from "../kernels/compile.mjs";

const KINDS: readonly Variance[] = ["classical", "HC0", "HC1", "HC2", "HC3"];

/** Constant, `covariates` related columns, `targets` columns that lean on them; an outcome of them all. */
function frameOf(seed: number, n: number, covariates: number, targets: number, weighted: boolean): Frame {
  const { normal, uniform } = seeded(seed);
  const column = (make: (i: number) => number) => Float64Array.from({ length: n }, (_, i) => make(i));
  const shared = column(normal);
  const x = Array.from({ length: covariates }, () => column((i) => 0.6 * shared[i] + normal()));
  const d = Array.from({ length: targets }, (_, a) => column((i) => (a % 2 === 0 ? +(x[0][i] + normal() > 0) : normal())));
  const outcome = column((i) => normal() * (1 + Math.abs(x[0][i])) + x.reduce((sum, c) => sum + c[i], 0) + d[0][i]);
  const weights = weighted ? column(() => 0.2 + uniform()) : null;
  return { n, columns: [column(() => 1), ...x, ...d], outcome, weights, clusters: null };
}

/** Every subset of the covariates, as fits that end with the targets. */
function everyFit(frame: Frame, covariates: number, targets: readonly number[]): Fit[] {
  const factor = factorise(frame);
  return Array.from({ length: 2 ** covariates }, (_, bits) => {
    const held = Array.from({ length: covariates }, (_, j) => j + 1).filter((j) => bits & (1 << (j - 1)));
    return fitColumns(factor, [0, ...held, ...targets]);
  });
}

const unit = (fit: Fit, column: number) => Float64Array.from(fit.columns, (c) => (c === column ? 1 : 0));
const targetsOf = (covariates: number, targets: number) => Array.from({ length: targets }, (_, a) => covariates + 1 + a);

describe("the compiled loops", () => {
  it("are their sources, translated", async () => {
    for (const each of SOURCES) expect(readFileSync(each.target, "utf8")).toBe(await translate(each));
  });

  it("give what the plain ones give, whatever the height of the last block", () => {
    for (const [n, q] of [
      [256, 1],
      [257, 1],
      [700, 1],
      [511, 2],
    ] as const) {
      const frame = frameOf(n, n, 3, q, true);
      const targets = targetsOf(3, q);
      const fits = everyFit(frame, 3, targets);
      const { roots, models } = growTree(fits.map((fit) => fit.columns.slice(0, -q)));
      const { program } = writeProgram(factorise(frame), roots, models, targets);
      const columns = [...program.columns.map((column) => frame.columns[column]), frame.outcome];
      for (const base of [null, targets.map((column) => frame.columns[column])]) {
        const source = { n, columns, weights: frame.weights, base };
        const [plain, compiled] = [plainKernels(), compiledKernels()!].map((kernels) => {
          const task = { kind: "walk", program, source, meat: "HC3", from: 0, to: n } as const;
          const into = walkSizes(task).map((size) => new Float64Array(size));
          walkRows(task, into, () => {}, kernels);
          return into.flatMap((sums) => [...sums]);
        });
        compiled.forEach((value, i) => expect(relativeError(value, plain[i])).toBeLessThan(1e-12));
      }
    }
  });
});

describe("errors of many fits in one pass over the rows", () => {
  it("are those of each fit's own pass: every kind, one target or several, weighted or not", () => {
    fc.assert(
      fc.property(
        fc.record({
          seed: fc.integer({ min: 1, max: 1e9 }),
          n: fc.integer({ min: 20, max: 700 }),
          covariates: fc.integer({ min: 1, max: 4 }),
          q: fc.integer({ min: 1, max: 3 }),
          weighted: fc.boolean(),
          kind: fc.constantFrom(...KINDS),
        }),
        ({ seed, n, covariates, q, weighted, kind }) => {
          const frame = frameOf(seed, n, covariates, q, weighted);
          const targets = targetsOf(covariates, q);
          const fits = everyFit(frame, covariates, targets);
          const found = treeErrors({ frame, factor: factorise(frame), targets, kind, base: null, passing: {} }, fits);
          fits.forEach((fit, i) => {
            const own = covariance(frame, fit, kind);
            const p = fit.columns.length;
            expect(found[i]!.shift).toBeNull();
            for (let a = p - q; a < p; a++) {
              for (let b = p - q; b < p; b++) {
                const size = Math.sqrt(own.matrix[a * p + a] * own.matrix[b * p + b]);
                expect(relativeError(found[i]!.errors.matrix[a * p + b], own.matrix[a * p + b], size)).toBeLessThan(
                  TOLERANCE.coefficient,
                );
              }
            }
          });
        },
      ),
      { numRuns: 60 },
    );
  });

  it("give the shift's squared error as the paired influences do", () => {
    for (const [kind, q] of [
      ["HC3", 1],
      ["HC1", 1],
      ["classical", 2],
      ["HC3", 2],
    ] as const) {
      const frame = frameOf(11 + q, 900, 3, q, kind === "HC1");
      const targets = targetsOf(3, q);
      const fits = everyFit(frame, 3, targets);
      const [first] = fits;
      const cov = covariance(frame, first, kind);
      const base = targets.map((column) => influence(frame, first, cov, unit(first, column)));
      const found = treeErrors({ frame, factor: factorise(frame), targets, kind, base, passing: {} }, fits);
      fits.slice(1).forEach((fit, i) => {
        const own = covariance(frame, fit, kind);
        targets.forEach((column, a) => {
          const psi = influence(frame, fit, own, unit(fit, column));
          const paired = psi.reduce((sum, value, row) => sum + (value - base[a][row]) ** 2, 0);
          expect(relativeError(found[i + 1]!.shift![a], paired)).toBeLessThan(TOLERANCE.coefficient);
        });
      });
      expect(Math.max(...found[0]!.shift!)).toBeLessThan(1e-20);
    }
  });

  it("come from two halves of many rows, with or without a second thread, to the last bit", () => {
    const frame = frameOf(5, 50_100, 2, 1, false);
    const fits = everyFit(frame, 2, [3]);
    const input = { frame, factor: factorise(frame), targets: [3], kind: "HC3" as const, base: null, passing: {} };
    const alone = treeErrors(input, fits);
    const refused = treeErrors({ ...input, passing: { assistant: { begin: () => null } } }, fits);
    const failed = treeErrors(
      { ...input, passing: { assistant: { begin: () => ({ wait: () => null, drop: () => {} }) } } },
      fits,
    );
    fits.forEach((fit, i) => {
      const own = covariance(frame, fit, "HC3").matrix;
      expect(relativeError(alone[i]!.errors.matrix[own.length - 1], own[own.length - 1])).toBeLessThan(TOLERANCE.coefficient);
      expect(refused[i]!.errors.matrix).toEqual(alone[i]!.errors.matrix);
      expect(failed[i]!.errors.matrix).toEqual(alone[i]!.errors.matrix);
    });
  });

  it("are left to the single pass where this one would lose digits or has no answer", () => {
    const frame = frameOf(7, 200, 2, 1, false);
    const [one, x, z, d] = frame.columns;
    const near = { ...frame, columns: [one, x, x.map((value, i) => value + 1e-7 * z[i]), d] };
    const lone = { ...frame, columns: [one, x, z.map((_, i) => (i === 3 ? 1 : 0)), d] };
    for (const odd of [near, lone]) {
      const fits = everyFit(odd, 2, [3]);
      const found = treeErrors({ frame: odd, factor: factorise(odd), targets: [3], kind: "HC3", base: null, passing: {} }, fits);
      expect(found.map((f) => f !== null)).toEqual([true, true, odd === near, false]);
    }
    const told = { ...frame, columns: [one, d, z, d] };
    const fits = everyFit(told, 2, [3]);
    const found = treeErrors({ frame: told, factor: factorise(told), targets: [3], kind: "HC3", base: null, passing: {} }, fits);
    expect(found.map((f) => f !== null)).toEqual([true, false, true, false]);
  });

  it("stop when told to", () => {
    const frame = frameOf(3, 100, 2, 1, false);
    const input = { frame, factor: factorise(frame), targets: [3], kind: "HC3" as const, base: null, passing: {} };
    expect(() => treeErrors({ ...input, passing: { cancelled: () => true } }, everyFit(frame, 2, [3]))).toThrow("cancelled");
  });
});
