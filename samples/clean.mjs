// The cleaning script: three raw files become heating.csv, one row a flat. Change a rule, run
//   node samples/clean.mjs
// with the comparison open beside it, and watch what the change does to the answer.
import { readFileSync, writeFileSync } from "node:fs";

const here = import.meta.dirname;
const read = (name) => {
  const [header, ...lines] = readFileSync(`${here}/raw/${name}.csv`, "utf8").trim().split("\n");
  const names = header.split(",");
  return lines.map((line) => Object.fromEntries(line.split(",").map((cell, i) => [names[i], cell])));
};

const finished = new Map(read("works").map((row) => [row.flat, row.finished]));
const meters = new Map(read("meters").map((row) => [row.flat, row])); // a flat sent twice counts once

/** Winter use in kWh; empty where the meter was not read. The counter rolls over at 100,000. */
function winterUse({ october, april }) {
  if (!/^\d+$/.test(april)) return "";
  const used = Number(april) - Number(october);
  return used < 0 ? used + 100_000 : used;
}

const rows = [];
for (const flat of read("flats")) {
  const meter = meters.get(flat.flat);
  if (!meter) continue; // the installer's trial entries have no meter
  const retrofit = finished.has(flat.flat) ? "full" : "none";
  rows.push([flat.flat, flat.block, retrofit, flat.tenure, flat.floor_m2, flat.persons, winterUse(meter)]);
}

const header = ["flat_id", "block", "retrofit", "tenure", "floor_m2", "persons", "kwh"];
writeFileSync(`${here}/heating.csv`, [header, ...rows].map((row) => row.join(",")).join("\n") + "\n");
console.log(`heating.csv: ${rows.length} flats`);
