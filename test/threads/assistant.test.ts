import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { build } from "esbuild";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { Cancelled } from "../../src/engine/cancelled";
import { compare } from "../../src/engine/compare";
import { MANY_ROWS, sizesOf } from "../../src/engine/passes/halves";
import type { RowTask } from "../../src/engine/passes/types";
import { ThreadAssistant } from "../../src/threads/assistant";
import { SharedRows } from "../../src/threads/memory";
import { SecondThread } from "../../src/threads/second";
import { planOf, seeded, tableOf } from "../engine/fixtures";

const folder = mkdtempSync(join(tmpdir(), "slantwise-threads-"));
const script = join(folder, "assistant.cjs");
const rows = MANY_ROWS + 777;

beforeAll(() =>
  build({
    entryPoints: ["src/threads/main.ts"],
    outfile: script,
    bundle: true,
    platform: "node",
    format: "cjs",
    logLevel: "error",
  }),
);
afterAll(() => rmSync(folder, { recursive: true }));

function question() {
  const { normal, uniform } = seeded(99);
  const z = Array.from({ length: rows }, normal);
  const x = z.map((value) => value + normal());
  const g = z.map((value) => (value + normal() > 0 ? "new" : "old"));
  const y = z.map((value, i) => value + 0.2 * x[i] + (g[i] === "new" ? 1 : 0) + normal());
  const w = z.map(() => 0.5 + uniform());
  const table = tableOf({ y, g, x, z, w });
  return { table, plan: planOf("y", "g", ["x", "z"], { sets: "every" }) };
}

const factorTask = (memory: SharedRows): RowTask => {
  const columns = [memory.take(rows).fill(1), memory.take(rows).map((_, i) => i % 7)].map((column) => {
    const shared = memory.take(rows);
    shared.set(column);
    return shared;
  });
  return { kind: "factor", columns, scale: Float64Array.of(1, 1), weights: null, from: 0, to: rows };
};

/** The thread takes a moment to start: tried until it takes a task. */
async function begun(assistant: ThreadAssistant, task: RowTask) {
  for (let i = 0; i < 200; i++) {
    const started = assistant.begin(task);
    if (started) return started;
    await new Promise((resolve) => setTimeout(resolve, 25));
  }
  throw new Error("the thread took no task");
}

describe("a second thread", () => {
  it("does half of the passes, and the comparison is the same to the last bit", async () => {
    const { table, plan } = question();
    const second = new SecondThread(script);
    const passing = second.passing(rows);
    const task = factorTask(new SharedRows());
    await begun(passing.assistant as ThreadAssistant, task).then(({ wait }) => wait());
    let taken = 0;
    const counted = {
      begin: (half: RowTask) => {
        const started = passing.assistant!.begin(half);
        if (started) taken++;
        return started;
      },
    };
    for (const variance of ["HC3", "HC1", "classical"] as const) {
      for (const weights of [null, "w"]) {
        const asked = { ...plan, variance, weights };
        expect(compare(table, asked, { ...passing, assistant: counted })).toEqual(compare(table, asked));
      }
    }
    expect(taken).toBeGreaterThan(12);
    second.end();
  });

  it("is not asked for small tables, nor for memory it cannot see, nor while it works", async () => {
    expect(new SecondThread(script).passing(MANY_ROWS - 1)).toEqual({});
    const assistant = new ThreadAssistant(script);
    const task = factorTask(new SharedRows());
    const [column] = (task as Extract<RowTask, { kind: "factor" }>).columns;
    const long: RowTask = { ...task, columns: new Array(80).fill(column), scale: new Float64Array(80).fill(1) } as RowTask;
    const started = await begun(assistant, long);
    expect(assistant.begin(task)).toBeNull();
    expect(started.wait()!.map((array) => array.length)).toEqual(sizesOf(long));
    const own = { ...task, columns: [new Float64Array(rows), new Float64Array(rows)] } as RowTask;
    expect(assistant.begin(own)).toBeNull();
    assistant.end();
    expect(assistant.begin(task)).toBeNull();
  });

  it("leaves a half it cannot do to the one that asks", async () => {
    const assistant = new ThreadAssistant(script);
    const task = factorTask(new SharedRows());
    const broken = { ...task, scale: null } as unknown as RowTask;
    expect((await begun(assistant, broken)).wait()).toBeNull();
    const dropped = await begun(assistant, task);
    dropped.drop();
    dropped.wait();
    expect((await begun(assistant, task)).wait()).not.toBeNull();
    assistant.end();
    const missing = new ThreadAssistant(join(folder, "absent.cjs"));
    expect(missing.begin(task)).toBeNull();
    missing.end();
  });

  it("is stopped with the comparison", () => {
    const { table, plan } = question();
    const second = new SecondThread(script);
    let asked = 0;
    const cancelled = () => ++asked > 30;
    expect(() => compare(table, plan, { cancelled, ...second.passing(rows) })).toThrow(Cancelled);
    second.end();
  });
});

describe("shared rows", () => {
  it("are kept between comparisons, each taking a view of its own", () => {
    const memory = new SharedRows();
    const first = memory.take(1000);
    memory.reset();
    const second = memory.take(990);
    expect(second.buffer).toBe(first.buffer);
    expect(second).not.toBe(first);
    memory.reset();
    expect(memory.take(5000).buffer).not.toBe(first.buffer);
  });
});
