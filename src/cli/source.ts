import { fingerprint } from "../data/fingerprint";
import { checkPlan } from "../plan/check";
import { planText } from "../report/writeup/plan";
import type { Now } from "../report/writeup/review";
import { sayProblem } from "../report/wording/problem";
import { fit } from "./fit";
import { readInput } from "./input";

/** SHA-256 of a text's UTF-8 bytes. */
export const hashOf = (text: string): string => fingerprint(new TextEncoder().encode(text));

/** What a plan file gives now, or the sentence why nothing. */
export function sourceOf(path: string): Now {
  const read = readInput(path, undefined);
  if (!read.ok) return { ok: false, why: sayProblem(read.problem) };
  const { table, parsed, shown } = read.input;
  const { plan } = parsed!; // a path that ends in .slantwise.json was read as a plan
  const [problem] = checkPlan(table, plan, parsed);
  // the table knows its file's name, a person the path
  if (problem) return { ok: false, why: sayProblem(problem.file === table.source.file ? { ...problem, file: shown } : problem) };
  return { ok: true, comparison: fit(table, plan), plan, planSha: hashOf(planText(plan)) };
}
