// A seeded table of an invented housing survey: outcome, two groups, k related amounts of several scales, a category, a cluster; about three
// rows in a hundred lack a cell. The same bytes every time.
import { closeSync, existsSync, mkdirSync, openSync, renameSync, writeSync } from "node:fs";
import os from "node:os";
import path from "node:path";

/** Kept outside the tree between runs. */
const FOLDER = path.join(os.homedir(), ".cache", "slantwise", "bench");
const SCALES = [1, 10, 1, 100, 1, 1000, 1, 1, 50, 1, 1, 5];
const CENTRES = [0, 40, 0, 500, 0, 20000, 0, 3, 0, 0, 1, 2];
const REGIONS = ["coast", "hills", "plain", "town"];

/** Path of the table with n rows and k covariates x1 … xk, made where it is not there yet. */
export function tableFile(n, k) {
  const file = path.join(FOLDER, `rows${n}-covariates${k}-v1.csv`);
  if (existsSync(file)) return file;
  mkdirSync(FOLDER, { recursive: true });
  const half = `${file}.${process.pid}`;
  const handle = openSync(half, "w");
  for (const piece of tableText(n, k, 1)) writeSync(handle, piece);
  closeSync(handle);
  renameSync(half, file);
  return file;
}

/** The table in pieces of about a thousand lines. */
export function* tableText(n, k, seed) {
  const { uniform, normal } = generator(seed);
  const names = Array.from({ length: k }, (_, j) => `x${j + 1}`);
  let text = ["y", "d", ...names, "region", "block"].join(",") + "\n";
  for (let i = 0; i < n; i++) {
    const shared = normal();
    const z = names.map(() => 0.5 * shared + 0.8 * normal());
    const region = Math.floor(uniform() * 4);
    const group = z.reduce((sum, v, j) => sum + (j % 2 ? 0.2 : -0.1) * v, 0) + 0.5 * normal() + 0.2 * (region - 1.5) > 0 ? 1 : 0;
    const along = z.reduce((sum, v, j) => sum + (j % 4 === 0 ? 0.5 : 0.15) * v, 0);
    const y = 2 + 0.75 * group + along + 0.3 * region + (0.5 + 0.4 * Math.abs(z[0])) * normal();
    const cells = z.map((v, j) => (v * SCALES[j % 12] + CENTRES[j % 12]).toFixed(j % 12 === 1 ? 0 : j % 2 ? 4 : 6));
    if (uniform() < 0.01) cells[1] = "";
    if (uniform() < 0.01) cells[4] = "";
    const outcome = uniform() < 0.005 ? "" : y.toFixed(5);
    text += `${outcome},${group},${cells.join(",")},${REGIONS[region]},B${Math.floor(uniform() * Math.max(20, n / 50))}\n`;
    if (i % 1000 === 999) {
      yield text;
      text = "";
    }
  }
  yield text;
}

/** xorshift of 32 bits (Marsaglia 2003) and normals by the polar method. */
function generator(seed) {
  let state = (seed * 2654435769) >>> 0 || 1;
  const uniform = () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return (state >>> 0) / 4294967296;
  };
  for (let i = 0; i < 20; i++) uniform();
  const normal = () => {
    for (;;) {
      const [a, b] = [2 * uniform() - 1, 2 * uniform() - 1];
      const s = a * a + b * b;
      if (s > 0 && s < 1) return a * Math.sqrt((-2 * Math.log(s)) / s);
    }
  };
  return { uniform, normal };
}
