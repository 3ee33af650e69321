// One measurement in a process of its own, so that its memory is its own: node measure.mjs PROGRAM MODE FILE K REPEATS; prints JSON.
import { closeSync, fstatSync, openSync, readFileSync, readSync } from "node:fs";
import path from "node:path";
import Papa from "papaparse";
import { naiveRefit } from "./naive.mjs";

const [program, mode, file, kText, repeatsText] = process.argv.slice(2);
const k = Number(kText);
const repeats = Number(repeatsText);
const { ReaderMemory, readTable, compare, buildDesign, factorise, resolveQuestion, findRows, SecondThread } = await import(
  path.join(program, "entry.mjs")
);
const names = Array.from({ length: k }, (_, j) => `x${j + 1}`);
const plan = (more) => ({
  outcome: { column: "y" },
  exposure: { column: "d" },
  covariates: names.map((column) => ({ column })),
  sets: "every",
  modifiers: [],
  ...more,
});
const second = new SecondThread(path.join(program, "assistant.cjs"));
const timed = (work) => {
  const start = performance.now();
  const result = work();
  return { ms: performance.now() - start, result };
};
const repeated = (work) => {
  const times = Array.from({ length: repeats }, () => timed(work).ms);
  return { first: times[0], warm: median(times.slice(1)) };
};
const median = (values) => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)];

/** As the host's worker does: one buffer that stays. */
let buffer = new Uint8Array(0);
function readKept() {
  const handle = openSync(file, "r");
  const { size } = fstatSync(handle);
  if (buffer.length < size) buffer = new Uint8Array(Math.ceil(size * 1.1));
  for (let at = 0; at < size;) at += readSync(handle, buffer, at, size - at, at);
  closeSync(handle);
  return buffer.subarray(0, size);
}

const memory = new ReaderMemory();
const table = () => readTable(readKept(), { file: path.basename(file) }, memory).table;

/** Reading alone, then whole cycles from the disk: the first table (every set, classical) and every set with HC3. */
function cycle() {
  const bytes = repeated(() => readFileSync(file));
  const kept = repeated(readKept);
  const first = [];
  const total = [];
  const read = [];
  let sets = 0;
  for (let i = 0; i < repeats; i++) {
    const start = performance.now();
    const held = table();
    read.push(performance.now() - start);
    let preview = NaN;
    const options = { ...second.passing(held.rows), preview: () => (preview = performance.now() - start) };
    sets = compare(held, plan(), options).sets.length;
    total.push(performance.now() - start);
    first.push(preview);
  }
  const warm = (times) => ({ first: times[0], warm: median(times.slice(1)) });
  return { bytes, kept, read: warm(read), table: warm(first), total: warm(total), sets };
}

/** The pass that reduces the rows to a triangle, once the columns stand. */
function factor() {
  const held = table();
  const resolved = resolveQuestion(held, plan());
  const rows = findRows(held, plan(), resolved);
  const passing = second.passing(held.rows);
  passing.memory?.reset();
  const { frame } = buildDesign(resolved, rows.common, names, [], passing.memory);
  return { rows: frame.n, factor: repeated(() => factorise(frame, passing)) };
}

/** Every set, and the slopes tests of every covariate in every set. */
function slopes() {
  const held = table();
  const options = second.passing(held.rows);
  const without = repeated(() => compare(held, plan(), options));
  const withTests = repeated(() => compare(held, plan({ modifiers: names }), options));
  return { without, withTests, models: k * 2 ** (k - 1) };
}

function papa() {
  const bytes = readFileSync(file);
  return { papa: repeated(() => Papa.parse(bytes.toString("utf8"))) };
}

/** A sample of sets refitted one by one, per set. */
function naive() {
  const held = table();
  const column = (name) => held.columns.find((c) => c.name === name).values;
  const { common } = findRows(held, plan(), resolveQuestion(held, plan()));
  const gather = (name) => Float64Array.from(common, (row) => column(name)[row]);
  const [y, d] = [gather("y"), gather("d")];
  const x = names.map(gather);
  const sample = Array.from({ length: 8 }, (_, s) => Math.round((s * (2 ** k - 1)) / 7));
  const times = sample.map((set) => timed(() => naiveRefit(y, [d, ...x.filter((_, j) => set & (1 << j))])).ms);
  return { perSet: times.reduce((sum, ms) => sum + ms, 0) / times.length, sampled: sample.length };
}

const found = { cycle, factor, slopes, papa, naive }[mode]();
second.end();
process.stdout.write(JSON.stringify({ ...found, megabytes: process.resourceUsage().maxRSS / 1024 }));
