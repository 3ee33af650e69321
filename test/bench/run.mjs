// How fast, against what, on this machine: npm run bench [-- --quick] [-- --rows 100000 --covariates 8] [-- --json FILE]
// Everything is measured within one run, each in a process of its own; shared machines are noisy, so read the ratios.
import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync, statSync, writeFileSync } from "node:fs";
import os from "node:os";
import path from "node:path";
import { parseArgs } from "node:util";
import { build } from "esbuild";
import { tableFile } from "./generate.mjs";
import { runPeers } from "./peers.mjs";
import { describeMachine, markdownTable, textTable } from "./report.mjs";

const { values } = parseArgs({
  options: {
    quick: { type: "boolean" },
    rows: { type: "string" },
    covariates: { type: "string" },
    json: { type: "string" },
  },
});
const sizes = values.rows ? [Number(values.rows)] : values.quick ? [1e4, 1e5] : [1e4, 1e5, 1e6];
const counts = values.covariates ? [Number(values.covariates)] : [8, 12];
/** Slopes tests of 24,576 models over a million rows take minutes: left out, and said so. */
const TOO_LONG = 1e10;
/** Peers refit every set up to this many rows times sets, a sample of eight beyond it. */
const EVERY_SET = 3e7;

const program = mkdtempSync(path.join(os.tmpdir(), "slantwise-bench-"));
const root = path.join(import.meta.dirname, "../..");
const bundle = { bundle: true, platform: "node", target: "node20", mainFields: ["module", "main"], logLevel: "error" };
const banner = { js: 'import { createRequire } from "node:module"; const require = createRequire(import.meta.url);' };
await build({
  ...bundle,
  entryPoints: [path.join(import.meta.dirname, "entry.ts")],
  format: "esm",
  banner,
  outfile: path.join(program, "entry.mjs"),
});
await build({
  ...bundle,
  entryPoints: [path.join(root, "src/threads/main.ts")],
  format: "cjs",
  outfile: path.join(program, "assistant.cjs"),
});

function measure(mode, file, k, repeats) {
  const script = path.join(import.meta.dirname, "measure.mjs");
  const args = ["--max-old-space-size=8192", script, program, mode, file, String(k), String(repeats)];
  const run = spawnSync(process.execPath, args, { encoding: "utf8", maxBuffer: 1e8 });
  if (run.status !== 0) throw new Error(`${mode} of ${path.basename(file)} failed:\n${run.stderr}`);
  return JSON.parse(run.stdout);
}

const results = [];
for (const n of sizes) {
  for (const k of counts) {
    const file = tableFile(n, k);
    const repeats = n >= 1e6 ? 4 : 12;
    process.stderr.write(`${n.toLocaleString("en")} rows, ${k} covariates …\n`);
    results.push({
      n,
      k,
      bytes: statSync(file).size,
      cycle: measure("cycle", file, k, n * 2 ** k > 1e9 ? 2 : repeats),
      factor: measure("factor", file, k, repeats),
      papa: measure("papa", file, k, n >= 1e6 ? 2 : repeats),
      naive: measure("naive", file, k, 1),
      slopes: n * k * 2 ** (k - 1) > TOO_LONG ? null : measure("slopes", file, k, n * 2 ** k > 1e8 ? 2 : 4),
      peers: runPeers(file, k, n * 2 ** k <= EVERY_SET ? 2 ** k : 8),
    });
  }
}
rmSync(program, { recursive: true });
const machine = describeMachine();
if (values.json) writeFileSync(values.json, JSON.stringify({ machine, results }, null, 1));
console.log(`\n${machine}\n`);
for (const result of results) console.log(textTable(result) + "\n");
console.log("For the README:\n\n" + markdownTable(results));
