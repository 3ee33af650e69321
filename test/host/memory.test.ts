import { beforeEach, describe, expect, test } from "vitest";
import type { Plan } from "../../src/engine/plan";
import { Memory } from "../../src/host/memory";

const plan: Plan = { outcome: { column: "kwh" }, exposure: { column: "retrofit" } };
const chosen = { plan, guessed: false };
let held: Map<string, unknown>;
let memory: Memory;

beforeEach(() => {
  held = new Map();
  memory = new Memory({
    keys: () => [...held.keys()],
    get: <T>(key: string, fallback?: T) => (held.has(key) ? (held.get(key) as T) : fallback),
    update: (key: string, value: unknown) => {
      held.set(key, JSON.parse(JSON.stringify(value)));
      return Promise.resolve();
    },
  });
});

describe("what a workspace remembers", () => {
  test("the question chosen for a bare CSV", () => {
    expect(memory.chosen("file:///a.csv", null)).toBeNull();
    memory.remember("file:///a.csv", chosen, null);
    expect(memory.chosen("file:///a.csv", null)).toEqual(chosen);
    expect(memory.chosen("file:///b.csv", null)).toBeNull();
  });
  test("a choice over a plan holds only while the plan's text is the same", () => {
    const text = { text: "{}", file: "a.slantwise.json" };
    memory.remember("file:///a.slantwise.json", chosen, text);
    expect(memory.chosen("file:///a.slantwise.json", text)).toEqual(chosen);
    expect(memory.chosen("file:///a.slantwise.json", { ...text, text: "{ }" })).toBeNull();
  });
  test("a choice that was written into the plan is forgotten, and nothing else", () => {
    const text = { text: "{}", file: "a.slantwise.json" };
    memory.remember("file:///a.slantwise.json", chosen, text);
    memory.remember("file:///b.csv", chosen, null);
    memory.remember("file:///a.slantwise.json", null, text);
    expect(memory.chosen("file:///a.slantwise.json", text)).toBeNull();
    expect(memory.chosen("file:///b.csv", null)).toEqual(chosen);
  });
  test("open panels are found again by their title until they are closed", () => {
    memory.opened("file:///x/a.csv", "Comparison: a.csv");
    expect(memory.byTitle("Comparison: a.csv")).toBe("file:///x/a.csv");
    memory.closed("file:///x/a.csv");
    expect(memory.byTitle("Comparison: a.csv")).toBeNull();
  });
  test("the oldest questions are forgotten first, the one just used last", () => {
    for (let i = 0; i < 300; i++) memory.remember(`file:///${i}.csv`, chosen, null);
    expect(memory.chosen("file:///0.csv", null)).toBeNull();
    expect(memory.chosen("file:///299.csv", null)).toEqual(chosen);
  });
});
