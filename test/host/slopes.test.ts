import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, test } from "vitest";
import type { Plan } from "../../src/engine/plan";
import { runCompare } from "../../src/host/worker/compare";
import type { KeptComparison } from "../../src/host/worker/compare";
import type { CompareRequest } from "../../src/host/worker/messages";
import { Readings } from "../../src/host/worker/readings";
import { runSlopes } from "../../src/host/worker/slopes";
import { SecondThread } from "../../src/threads/second";
import { compared, refused, Stage, stamp } from "./stage";

const open = { set: null, modifier: null, contrast: null };
let stage: Stage;
beforeEach(() => {
  stage = new Stage();
});
const ofs = () => stage.figures.map((figure) => figure.of);

describe("the Slopes section of a session", () => {
  test("is asked for only once it is open and something has been compared", async () => {
    stage.session.slopes.choose(open);
    stage.save(1);
    expect(ofs()).toEqual([]);
    await stage.end(compared("one", stamp(1)));
    expect(ofs()).toEqual([1]);
    await stage.draw("of one");
    expect(stage.drawn).toBe("of one");
  });

  test("is not asked for while it is closed, and goes when it is closed", async () => {
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    expect(ofs()).toEqual([]);
    stage.session.slopes.choose(open);
    await stage.draw("of one");
    stage.session.slopes.choose(null);
    expect(stage.drawn).toBeNull();
  });

  test("is not asked for of a first look, whose slopes are still being tested", async () => {
    stage.session.slopes.choose(open);
    stage.save(1);
    const look = compared("look", stamp(1));
    if (look.kind !== "compared") throw new Error(look.kind);
    stage.last.hooks.preview(look.result);
    await Promise.resolve();
    expect([stage.shown, stage.session.state().checking, ofs()]).toEqual(["look", true, []]);
    await stage.end(compared("one", stamp(1)));
    expect(ofs()).toEqual([1]);
  });

  test("is drawn anew for each new reading, and an older one is not seen beside it", async () => {
    stage.session.slopes.choose(open);
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    await stage.draw("of one");
    stage.save(2);
    expect([stage.shown, stage.drawn]).toEqual(["one", "of one"]);
    await stage.end(compared("two", stamp(2)));
    expect([stage.shown, stage.drawn, ofs()]).toEqual(["two", null, [1, 2]]);
    await stage.draw("of two");
    expect(stage.drawn).toBe("of two");
  });

  test("an answer that comes after its comparison has been replaced is never shown", async () => {
    stage.session.slopes.choose(open);
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    const [late] = stage.figures;
    stage.save(2);
    expect(late.cancelled).toBe(true);
    await stage.draw("of one", late);
    expect(stage.drawn).toBeNull();
    await stage.end(compared("two", stamp(2)));
    await stage.draw("of one, again", late);
    expect(stage.drawn).toBeNull();
  });

  test("an answer to an earlier choice is never shown; what is drawn stays until the new choice is", async () => {
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    stage.session.slopes.choose(open);
    await stage.draw("floor");
    stage.session.slopes.choose({ ...open, modifier: "tenure" });
    stage.session.slopes.choose({ ...open, modifier: "wind" });
    const [, tenure, wind] = stage.figures;
    expect([tenure.cancelled, wind.choice.modifier]).toEqual([true, "wind"]);
    await stage.draw("tenure", tenure);
    expect(stage.drawn).toBe("floor");
    await stage.draw("wind", wind);
    expect(stage.drawn).toBe("wind");
  });

  test("makes way for a run, and is asked for again where the run brings nothing new", async () => {
    stage.session.slopes.choose(open);
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    stage.save(2);
    await stage.end({ kind: "same", stamp: stamp(2) });
    expect(ofs()).toEqual([1, 1]);
    await stage.draw("of one");
    stage.save(3);
    await stage.end(refused("line 7", stamp(3)));
    expect([stage.status, stage.drawn, ofs()]).toEqual(["unusable", "of one", [1, 1]]);
  });

  test("where the worker has lost the comparison it is made once more, and not for ever", async () => {
    stage.session.slopes.choose(open);
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    await stage.draw(null);
    expect(stage.runs.length).toBe(2);
    await stage.end(compared("one", stamp(1)));
    await stage.draw(null);
    expect([stage.runs.length, stage.drawn]).toEqual([2, null]);
  });
});

describe("the worker's answer", () => {
  let folder: string;
  beforeEach(() => (folder = mkdtempSync(join(tmpdir(), "slopes-"))));
  afterEach(() => rmSync(folder, { recursive: true }));
  const sample = (name: string) => new URL(`../../samples/${name}`, import.meta.url).pathname;

  function compareOnce(readings: Readings, path: string, id: number): KeptComparison {
    const plan = JSON.parse(readFileSync(sample("glazing.slantwise.json"), "utf8")) as Plan;
    const request: CompareRequest = {
      type: "compare",
      id,
      session: "s",
      cancel: new SharedArrayBuffer(4),
      path,
      file: "glazing.csv",
      ask: { kind: "plan", plan, guessed: false, orSuggest: false },
      filter: null,
      reread: true,
      known: null,
    };
    let kept: KeptComparison | null = null;
    const outcome = runCompare(request, readings, {
      progress: () => undefined,
      preview: () => undefined,
      keep: (comparison) => (kept = comparison),
      second: new SecondThread(""),
    });
    expect(outcome.kind === "compared" && outcome.result.run).toBe(id);
    return kept!;
  }
  const ask = (of: number) =>
    ({ type: "slopes", id: 9, session: "s", of, choice: open, cancel: new SharedArrayBuffer(4) }) as const;

  test("is of the columns that were compared, by the number of the run", () => {
    const path = join(folder, "glazing.csv");
    writeFileSync(path, readFileSync(sample("glazing.csv")));
    const readings = new Readings();
    const kept = compareOnce(readings, path, 7);
    const drawn = runSlopes(ask(7), kept, path, readings)!;
    expect(drawn.plots.map((plot) => plot.kind)).toEqual(["lines", "difference"]);
    expect(drawn.sentences[0]).toContain("There is no single difference");
    expect(runSlopes(ask(6), kept, path, readings)).toBeNull();
    expect(runSlopes(ask(7), undefined, path, readings)).toBeNull();
  });

  test("is none once the columns have given way to a newer file", () => {
    const path = join(folder, "glazing.csv");
    const text = readFileSync(sample("glazing.csv"), "utf8");
    writeFileSync(path, text);
    const readings = new Readings();
    const first = compareOnce(readings, path, 1);
    writeFileSync(path, text.split("\n").slice(0, 200).join("\n") + "\n");
    compareOnce(readings, path, 2);
    expect(runSlopes(ask(1), first, path, readings)).toBeNull();
  });

  test("stops when it is cancelled", () => {
    const path = join(folder, "glazing.csv");
    writeFileSync(path, readFileSync(sample("glazing.csv")));
    const readings = new Readings();
    const request = ask(1);
    Atomics.store(new Int32Array(request.cancel), 0, 1);
    expect(() => runSlopes(request, compareOnce(readings, path, 1), path, readings)).toThrow("cancelled");
  });
});
