import { readFileSync } from "node:fs";
import { readTable } from "../../src/data/read";
import { compare } from "../../src/engine/compare";
import type { Comparison } from "../../src/engine/comparison";
import type { Plan } from "../../src/engine/plan";
import type { Table } from "../../src/engine/table";
import { toCsv } from "../../src/report/csv";
import { toJson } from "../../src/report/json";
import { toMarkdown } from "../../src/report/markdown";
import { present } from "../../src/report/present";
import { toTabSeparated } from "../../src/report/table";
import { toText } from "../../src/report/text";

const root = new URL("../..", import.meta.url).pathname;

/** A sample's table and plan, changed as asked. */
export function sample(name: string, more: Partial<Plan> = {}): { table: Table; plan: Plan } {
  const plan = { ...(JSON.parse(readFileSync(`${root}samples/${name}.slantwise.json`, "utf8")) as Plan), ...more };
  return { table: tableOfFile(`${root}samples/${name}.csv`, plan), plan };
}

/** Open data of the reference suite. */
export function openData(name: string, plan: Plan): { table: Table; plan: Plan } {
  return { table: tableOfFile(`${root}test/reference/data/${name}.csv`, plan), plan };
}

function tableOfFile(path: string, plan: Plan): Table {
  const read = readTable(readFileSync(path), { file: path.slice(path.lastIndexOf("/") + 1), missing: plan.missing });
  if (!read.ok) throw new Error(read.problem.code);
  return read.table;
}

/** Everything that is ever shown of a comparison, by surface. */
export function everyOutput(table: Table, plan: Plan): Record<string, string> & { comparison?: never } {
  return outputsOf(compare(table, plan), plan);
}

export function outputsOf(comparison: Comparison, plan: Plan): Record<string, string> {
  const presentation = present(comparison, plan);
  return {
    panel: JSON.stringify(presentation),
    markdown: toMarkdown(presentation, comparison, { date: "2026-01-31" }),
    text: toText(presentation),
    table: toTabSeparated(presentation),
    csv: toCsv(comparison, plan),
    json: JSON.stringify(toJson(comparison, plan)),
  };
}
