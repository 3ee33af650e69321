import { join } from "node:path";
import { compare } from "../engine/compare";
import type { Comparison } from "../engine/comparison";
import type { Plan } from "../engine/plan";
import type { Table } from "../engine/table";
import { SecondThread } from "../threads/second";

const second = new SecondThread(join(__dirname, "assistant.js"));

/** A whole comparison, with a second thread where the table is large. */
export function fit(table: Table, plan: Plan): Comparison {
  return compare(table, plan, second.passing(table.rows));
}
