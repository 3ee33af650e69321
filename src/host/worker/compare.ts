import { Cancelled } from "../../engine/cancelled";
import { compare } from "../../engine/compare";
import type { CompareOptions } from "../../engine/compare";
import type { Comparison } from "../../engine/comparison";
import type { Problem } from "../../engine/findings";
import type { Plan } from "../../engine/plan";
import type { Table } from "../../engine/table";
import { checkPlan } from "../../plan/check";
import { parsePlan } from "../../plan/parse";
import { suggestPlan } from "../../plan/suggest";
import { present } from "../../report/present";
import { sayProblem } from "../../report/wording/problem";
import type { SecondThread } from "../../threads/second";
import type { Ask, Compared, CompareRequest, Outcome } from "./messages";
import { questionState } from "./question";
import type { Readings, TableRead } from "./readings";

/** A comparison the worker keeps, to present other rows of it or to write it out. */
export interface KeptComparison {
  /** Number of the run that made it. */
  readonly run: number;
  readonly comparison: Comparison;
  readonly plan: Plan;
  readonly guessed: boolean;
  /** The missing marks its columns were read with. */
  readonly missing: Plan["missing"];
}

export interface Hooks {
  readonly progress: (share: number) => void;
  readonly preview: (result: Compared) => void;
  readonly keep: (kept: KeptComparison) => void;
  readonly second: SecondThread;
}

type ReadTable = Extract<TableRead, { kind: "table" }>;
type Taken = { readonly plan: Plan; readonly guessed: boolean; readonly problem: Problem | null };

/** One run: read the file, take the question, compare, present. Never throws for the state of the file or the plan. */
export function runCompare(request: CompareRequest, readings: Readings, hooks: Hooks): Outcome {
  const flag = new Int32Array(request.cancel);
  const cancelled = () => Atomics.load(flag, 0) !== 0;
  if (cancelled()) return { kind: "cancelled" };
  const parsed = request.ask.kind === "text" ? parsePlan(request.ask.text, request.ask.file) : null;
  if (parsed && !parsed.ok) return refuse(parsed.problems[0], null, null, true);
  const missing = parsed ? parsed.plan.missing : request.ask.kind === "plan" ? request.ask.plan.missing : undefined;

  const started = performance.now();
  const read = readings.table(request.path, request.file, missing, request.known, request.reread);
  if (read.kind === "problem") return refuse(read.problem, null, read.stamp, false);
  if (read.kind !== "table") return read;
  if (cancelled()) return { kind: "cancelled" };
  hooks.progress(0.4);
  const readMs = performance.now() - started;

  const { table } = read;
  const taken = takeQuestion(table, request.ask, parsed);
  if ("code" in taken) return refuse(taken, null, read.stamp, false);
  const { plan, guessed, problem } = taken;
  if (problem) return refuse(problem, questionState(table, plan, guessed, null), read.stamp, inPlan(problem, request));

  const result = (comparison: Comparison, checking: boolean): Compared => ({
    run: request.id,
    presentation: present(comparison, plan, { guessed, checking, filter: request.filter }),
    question: questionState(table, plan, guessed, comparison),
    guessed,
    sha256: table.source.sha256,
    stamp: read.stamp,
    ended: read.ended,
    took: { read: readMs, compare: performance.now() - started - readMs },
  });
  const preview = (comparison: Comparison) => {
    hooks.preview(result(comparison, true));
    hooks.progress(0.7);
  };
  const passing = { cancelled, preview, ...hooks.second.passing(table.rows) };
  return finish(read, plan, passing, (comparison) => {
    hooks.keep({ run: request.id, comparison, plan, guessed, missing });
    return result(comparison, false);
  });
}

function finish(read: ReadTable, plan: Plan, options: CompareOptions, result: (comparison: Comparison) => Compared): Outcome {
  try {
    return { kind: "compared", result: result(compare(read.table, plan, options)) };
  } catch (error) {
    if (error instanceof Cancelled) return { kind: "cancelled" };
    throw error;
  }
}

/** The plan to use with what is wrong about it, or the problem that leaves no plan at all. */
function takeQuestion(table: Table, ask: Ask, parsed: ReturnType<typeof parsePlan> | null): Taken | Problem {
  if (parsed?.ok) return { plan: parsed.plan, guessed: false, problem: checkPlan(table, parsed.plan, parsed)[0] ?? null };
  if (ask.kind === "plan") {
    const problem = checkPlan(table, ask.plan)[0] ?? null;
    if (!problem || !ask.orSuggest) return { plan: ask.plan, guessed: ask.guessed, problem };
  }
  const suggested = suggestPlan(table);
  if ("problem" in suggested) return { file: table.source.file, ...suggested.problem };
  return { plan: suggested.plan, guessed: true, problem: checkPlan(table, suggested.plan)[0] ?? null };
}

function inPlan(problem: Problem, request: CompareRequest): boolean {
  return request.ask.kind === "text" && problem.file === request.ask.file;
}

function refuse(
  problem: Problem,
  question: ReturnType<typeof questionState> | null,
  stamp: Compared["stamp"] | null,
  plan: boolean,
): Outcome {
  return { kind: "problem", text: sayProblem(problem), line: problem.line ?? null, inPlan: plan, question, stamp };
}
