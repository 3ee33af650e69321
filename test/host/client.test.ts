import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, test } from "vitest";
import { WorkerClient } from "../../src/host/worker/client";
import type { Order } from "../../src/host/worker/client";

/** A worker that does what the file's name asks: answer, heed the flag, never end, or die. */
const SCRIPT = `
const { parentPort, threadId } = require("node:worker_threads");
parentPort.on("message", (m) => {
  if (m.type === "copy") return parentPort.postMessage({ type: "text", id: m.id, text: m.as + " " + m.date });
  if (m.type === "slopes") {
    if (m.session === "dies") process.exit(3);
    const section = m.session === "draws" ? { set: m.of } : null;
    return parentPort.postMessage({ type: "slopes", id: m.id, section, detail: m.session === "fails" ? "the stack" : null });
  }
  if (m.type !== "compare") return;
  const flag = new Int32Array(m.cancel);
  if (m.file === "dies") process.exit(3);
  if (m.file === "hangs") for (;;);
  if (m.file === "heeds") { while (Atomics.load(flag, 0) === 0); return parentPort.postMessage({ type: "done", id: m.id, outcome: { kind: "cancelled" } }); }
  parentPort.postMessage({ type: "progress", id: m.id, share: 0.5 });
  parentPort.postMessage({ type: "done", id: m.id, outcome: { kind: "failed", text: "thread", detail: String(threadId) } });
});`;

let folder: string;
let client: WorkerClient;
let said: string[];
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "client-"));
  writeFileSync(join(folder, "worker.cjs"), SCRIPT);
});
afterAll(() => rmSync(folder, { recursive: true }));
beforeEach(() => {
  said = [];
  client = new WorkerClient(
    join(folder, "worker.cjs"),
    (file) => `${file} was lost`,
    (text) => said.push(text),
  );
});
afterEach(() => client.dispose());

const order = (file: string): Order => ({
  session: file,
  path: file,
  file,
  ask: { kind: "suggest" },
  filter: null,
  reread: true,
  known: null,
});
const none = { progress: () => undefined, preview: () => undefined };
const thread = async () => {
  const outcome = await client.compare(order("answers"), none).outcome;
  return outcome.kind === "failed" ? outcome.detail : outcome.kind;
};

describe("the host's end of the worker thread", () => {
  test("answers come back with their progress, from one thread that lives on", async () => {
    const shares: number[] = [];
    await client.compare(order("answers"), { ...none, progress: (share) => shares.push(share) }).outcome;
    expect(shares).toEqual([0.5]);
    expect(await thread()).toBe(await thread());
    expect(await client.copy("s", "markdown", "2026-01-01")).toBe("markdown 2026-01-01");
  });
  test("a cancelled run that heeds its flag ends without costing the thread", async () => {
    const first = await thread();
    const run = client.compare(order("heeds"), none);
    run.cancel();
    expect(await run.outcome).toEqual({ kind: "cancelled" });
    expect(await thread()).toBe(first);
  });
  test("a cancelled run that does not is ended with its thread; the one behind it is answered by a new one", async () => {
    const first = await thread();
    const run = client.compare(order("hangs"), none);
    const behind = client.compare(order("answers"), none);
    run.cancel();
    expect(await run.outcome).toEqual({ kind: "cancelled" });
    const after = await behind.outcome;
    expect(after.kind === "failed" && after.detail).not.toBe(first);
    expect(said.length).toBe(1);
  });
  test("a figure is answered, a fault in one goes to the log, and a thread that dies leaves none", async () => {
    const choice = { set: null, modifier: null, contrast: null };
    expect(await client.slopes("draws", 7, choice).section).toEqual({ set: 7 });
    expect(await client.slopes("fails", 7, choice).section).toBeNull();
    expect(said).toEqual(["the stack"]);
    expect(await client.slopes("dies", 7, choice).section).toBeNull();
    expect(await thread()).toMatch(/^\d+$/);
  });
  test("a thread that dies fails its runs in words, and the next run gets a new thread", async () => {
    const outcome = await client.compare(order("dies"), none).outcome;
    expect(outcome).toMatchObject({ kind: "failed", text: "dies was lost" });
    expect(await thread()).toMatch(/^\d+$/);
  });
});
