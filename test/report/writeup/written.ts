import { fingerprint } from "../../../src/data/fingerprint";
import { readTable } from "../../../src/data/read";
import { compare } from "../../../src/engine/compare";
import type { Plan } from "../../../src/engine/plan";
import type { Table } from "../../../src/engine/table";
import { blockText, originOf } from "../../../src/report/writeup/block";
import type { Source } from "../../../src/report/writeup/block";
import { planText } from "../../../src/report/writeup/plan";
import { review } from "../../../src/report/writeup/review";
import type { Now, Reviewed, Reviewing } from "../../../src/report/writeup/review";
import { csvOf, tableOf } from "../../plan/tables";

export const hash = (text: string): string => fingerprint(new TextEncoder().encode(text));
export const PLAN = "flats.slantwise.json";
export const DAY = "2026-01-31";

export function sourceOf(table: Table, plan: Plan): Now & Source {
  return { ok: true, comparison: compare(table, plan), plan, planSha: hash(planText(plan)) };
}

export const block = (source: Source, path = PLAN): string => blockText(source, originOf(source, path, DAY), hash);

/** A document read over again with what its plans give now, on another day. */
export function reviewed(text: string, now: Reviewing["now"] | Now): Reviewed[] {
  return review(text, { hash, date: "2026-02-01", now: typeof now === "function" ? now : () => now });
}

/** Sixty flats; `more` is added to the kwh of the retrofitted ones, and the first `without` of them are left out. */
export function flats({ more = 0, without = 0, file = "flats.csv" } = {}): Table {
  const csv = csvOf(60, {
    retrofit: (i) => ["none", "full"][i % 2],
    floor_m2: (i) => 50 + ((i * 17) % 31),
    kwh: (i) => 3000 + ((i * 7919) % 97) + ((i * 17) % 31) * 10 - (i % 2) * 200 + (i % 2) * more,
  });
  const [head, ...rows] = csv.split("\n");
  return tableOf([head, ...rows.slice(without)].join("\n"), file);
}

export const plan: Plan = {
  data: "flats.csv",
  outcome: { column: "kwh", unit: "kWh" },
  exposure: { column: "retrofit", reference: "none" },
  covariates: [{ column: "floor_m2" }],
  rowsAre: "flats",
  margin: 100,
};
/** The same question where the difference grows with the floor: no set with floor_m2 has one number. */
export const crossed: Table = tableOf(
  csvOf(80, {
    retrofit: (i) => ["none", "full"][i % 2],
    floor_m2: (i) => 50 + ((i * 17) % 31),
    kwh: (i) => 3000 + ((i * 7919) % 97) + (i % 2) * (((i * 17) % 31) - 15) * 40,
  }),
);

export const states = (items: readonly Reviewed[]): string[] => items.map(({ verdict }) => verdict.state);

/** A question in which every name is this one, or holds it. */
export function hostile(name: string): { source: ReturnType<typeof sourceOf>; path: string } {
  const cell = (text: string) => `"${text.replaceAll('"', '""')}"`;
  const rows = Array.from({ length: 60 }, (_, i) => [
    i % 2 ? cell(name) : "none",
    50 + ((i * 17) % 31),
    3000 + ((i * 7919) % 97),
  ]);
  const csv = [["g", cell(`x ${name}`), "y"], ...rows].map((row) => row.join(",")).join("\n");
  const read = readTable(new TextEncoder().encode(csv), { file: `${name}.csv` });
  if (!read.ok) throw new Error(read.problem.code);
  const [, covariate] = read.table.columns;
  const question: Plan = {
    outcome: { column: "y", unit: name },
    exposure: { column: "g", reference: "none" },
    covariates: [{ column: covariate.name }],
    rowsAre: name,
  };
  return { source: sourceOf(read.table, question), path: `a ${name}.slantwise.json` };
}
