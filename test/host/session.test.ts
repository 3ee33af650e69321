import { beforeEach, describe, expect, test, vi } from "vitest";
import type { Plan } from "../../src/engine/plan";
import { Session } from "../../src/host/session";
import type { Chosen } from "../../src/host/sessionParts";
import type { Order, RunHooks } from "../../src/host/worker/client";
import type { Compared, Outcome, Stamp } from "../../src/host/worker/messages";
import { sameStamp } from "../../src/host/worker/stamp";
import type { QuestionState } from "../../src/protocol";
import type { Presentation } from "../../src/report/presentation";

interface FakeRun {
  readonly order: Order;
  readonly hooks: RunHooks;
  readonly end: (outcome: Outcome) => void;
  cancelled: boolean;
}

const plan: Plan = { outcome: { column: "kwh" }, exposure: { column: "retrofit" }, covariates: [{ column: "floor_m2" }] };
const stamp = (size: number): Stamp => ({ size, mtimeMs: size, ctimeMs: size, ino: 1 });
const presentation = (title: string): Presentation => ({
  title,
  facts: [],
  readout: [],
  blocks: [],
  joint: null,
  notes: [],
  provenance: [],
  summary: title,
});
const question = (asked: Plan, guessed: boolean): QuestionState => ({
  plan: asked,
  guessed,
  columns: [],
  levels: [],
  reference: null,
  kind: "groups",
  setsChoice: "each",
  setCount: 2,
});
const compared = (title: string, at: Stamp, more: Partial<Compared> = {}): Outcome => ({
  kind: "compared",
  result: {
    presentation: presentation(title),
    question: question(plan, true),
    guessed: true,
    sha256: title,
    stamp: at,
    ended: true,
    took: { read: 1, compare: 1 },
    ...more,
  },
});
const refused = (text: string, at: Stamp | null): Outcome => ({
  kind: "problem",
  text,
  line: 7,
  inPlan: false,
  question: null,
  stamp: at,
});

let runs: FakeRun[];
let now: Stamp | null;
let still: number;
let session: Session;
let remembered: Chosen[];
let doubted: number;

function make(over: { chosen?: Chosen; planText?: { text: string; file: string } } = {}): void {
  session = new Session({
    target: "file:///heating.csv",
    csv: { path: "/heating.csv", file: "heating.csv" },
    compute: {
      compare(order, hooks) {
        let end!: (outcome: Outcome) => void;
        const outcome = new Promise<Outcome>((resolve) => (end = resolve));
        const run: FakeRun = { order, hooks, end, cancelled: false };
        runs.push(run);
        return { outcome, cancel: () => void (run.cancelled = true) };
      },
      present: () => Promise.resolve(presentation("filtered")),
      copy: (_session, as) => Promise.resolve(as),
      forget: () => undefined,
    },
    followed: {
      accept: () => undefined,
      stands: (asked) => now !== undefined && sameStamp(asked, now),
      quiet: () => still,
      afresh: () => void doubted++,
    },
    planText: over.planText ?? null,
    chosen: over.chosen ?? null,
    changed: () => undefined,
    remember: (chosen) => void remembered.push(chosen),
    missingText: (file) => `${file} is missing`,
    log: () => undefined,
  });
}

function save(size: number): void {
  now = null;
  session.fileStirs();
  now = stamp(size);
  session.fileSettled(now);
}
const last = () => runs.at(-1)!;
const end = async (outcome: Outcome, run = last()) => {
  run.end(outcome);
  for (let i = 0; i < 5; i++) await Promise.resolve();
};
const shown = () => session.state().presentation?.title ?? null;
const status = () => session.state().status.kind;

beforeEach(() => {
  runs = [];
  remembered = [];
  still = 10_000;
  doubted = 0;
  make();
});

describe("a session", () => {
  test("goes from reading to ready, and numbers its readings", async () => {
    expect(status()).toBe("reading");
    save(1);
    await end(compared("one", stamp(1)));
    expect([status(), shown(), session.state().reading?.number]).toEqual(["ready", "one", 1]);
    save(2);
    expect([status(), shown()]).toEqual(["updating", "one"]);
    await end(compared("two", stamp(2)));
    expect([status(), shown(), session.state().reading?.number]).toEqual(["ready", "two", 2]);
  });

  test("the newest save wins: an overtaken run is cancelled and shows nothing", async () => {
    save(1);
    const slow = last();
    save(2);
    expect(slow.cancelled).toBe(true);
    await end(compared("two", stamp(2)));
    await end(compared("one", stamp(1)), slow);
    expect([status(), shown()]).toEqual(["ready", "two"]);
  });

  test("a result of a file that has changed again is not shown", async () => {
    save(1);
    await end(compared("one", stamp(1)));
    save(2);
    now = stamp(3);
    session.fileStirs();
    await end(compared("half", stamp(2)));
    expect([status(), shown()]).toEqual(["updating", "one"]);
    session.fileSettled(now);
    await end(compared("three", stamp(3)));
    expect([status(), shown()]).toEqual(["ready", "three"]);
  });

  test("an unusable file is said so only when it has stood still, and the old result stays", async () => {
    vi.useFakeTimers();
    save(1);
    await end(compared("one", stamp(1)));
    save(2);
    still = 200;
    await end(refused("line 7 is cut off", stamp(2)));
    expect([status(), shown()]).toEqual(["updating", "one"]);
    vi.advanceTimersByTime(5000);
    expect(session.state().status).toEqual({ kind: "unusable", text: "line 7 is cut off", line: 7, inPlan: false });
    expect(shown()).toBe("one");
    vi.useRealTimers();
    still = 10_000;
    save(3);
    await end(compared("three", stamp(3)));
    expect([status(), shown()]).toEqual(["ready", "three"]);
  });

  test("a half-written file's problem is never shown when the rest follows", async () => {
    vi.useFakeTimers();
    save(1);
    await end(compared("one", stamp(1)));
    save(2);
    still = 200;
    await end(refused("half", stamp(2)));
    save(3);
    vi.advanceTimersByTime(5000);
    expect([status(), shown()]).toEqual(["updating", "one"]);
    vi.useRealTimers();
    await end(compared("three", stamp(3)));
    expect([status(), shown()]).toEqual(["ready", "three"]);
  });

  test("a file that lost its last line break is waited for", async () => {
    vi.useFakeTimers();
    save(1);
    await end(compared("one", stamp(1)));
    save(2);
    still = 200;
    await end(compared("cut", stamp(2), { ended: false }));
    expect([status(), shown()]).toEqual(["updating", "one"]);
    vi.advanceTimersByTime(5000);
    vi.useRealTimers();
    expect([status(), shown()]).toEqual(["ready", "cut"]);
  });

  test("a missing file keeps the old result and comes back", async () => {
    save(1);
    await end(compared("one", stamp(1)));
    session.fileStirs();
    now = null;
    session.fileSettled(null);
    expect(session.state().status).toEqual({ kind: "missing", text: "heating.csv is missing" });
    expect(shown()).toBe("one");
    save(2);
    await end(compared("two", stamp(2)));
    expect([status(), shown()]).toEqual(["ready", "two"]);
  });

  test("a run that began before its file had settled shows its result only then, and is not repeated", async () => {
    save(1);
    await end(compared("one", stamp(1)));
    now = null;
    session.fileStirs();
    session.fileLikely(stamp(2));
    await end(compared("two", stamp(2)));
    expect([status(), shown()]).toEqual(["updating", "one"]);
    now = stamp(2);
    session.fileSettled(now);
    await new Promise((done) => setTimeout(done));
    expect([status(), shown(), runs.length]).toEqual(["ready", "two", 2]);
  });

  test("a run that began too early is cancelled when its file changes again", async () => {
    save(1);
    await end(compared("one", stamp(1)));
    now = null;
    session.fileStirs();
    session.fileLikely(stamp(2));
    const early = last();
    session.fileStirs();
    expect(early.cancelled).toBe(true);
    now = stamp(3);
    session.fileSettled(now);
    await end(compared("half", stamp(2)), early);
    await end(compared("three", stamp(3)));
    expect([status(), shown()]).toEqual(["ready", "three"]);
  });

  test("a file torn while it was read is looked at again", async () => {
    save(1);
    await end({ kind: "torn" });
    expect([doubted, status()]).toEqual([1, "reading"]);
  });

  test("equal bytes are not a new reading", async () => {
    save(1);
    await end(compared("one", stamp(1)));
    save(2);
    expect(last().order.known).toBe("one");
    await end({ kind: "same", stamp: stamp(2) });
    expect([status(), shown(), session.state().reading?.number]).toEqual(["ready", "one", 1]);
  });
});

describe("the question of a session", () => {
  test("a bare CSV is guessed, and the guess is kept while it fits", async () => {
    save(1);
    expect(last().order.ask).toEqual({ kind: "suggest" });
    await end(compared("one", stamp(1)));
    expect(session.state().question?.guessed).toBe(true);
    save(2);
    expect(last().order.ask).toEqual({ kind: "plan", plan, guessed: true, orSuggest: true });
  });

  test("a choice is shown at once, remembered, and compared without reading the file again", async () => {
    save(1);
    await end(compared("one", stamp(1)));
    session.choose({ key: "outcome", column: "cost" });
    expect(session.state().question?.plan.outcome.column).toBe("cost");
    expect(remembered).toEqual([{ plan: { ...plan, outcome: { column: "cost" } }, guessed: false }]);
    expect(last().order).toMatchObject({ reread: false, known: null, ask: { kind: "plan", guessed: false, orSuggest: false } });
    await end(compared("one", stamp(1), { presentation: presentation("cost"), guessed: false }));
    expect([shown(), session.state().reading?.number]).toEqual(["cost", 1]);
  });

  test("a choice made while the file is changing is compared when it has settled", async () => {
    save(1);
    await end(compared("one", stamp(1)));
    now = null;
    session.fileStirs();
    session.fileLikely(stamp(2));
    session.choose({ key: "margin", value: 5 });
    now = stamp(2);
    session.fileSettled(now);
    expect(last().order.ask).toMatchObject({ kind: "plan", plan: { margin: 5 } });
  });

  test("two quick choices build on one another", async () => {
    save(1);
    await end(compared("one", stamp(1)));
    session.choose({ key: "margin", value: 5 });
    session.choose({ key: "covariates", columns: ["tenure"] });
    expect(runs.at(-2)!.cancelled).toBe(true);
    expect(last().order.ask).toMatchObject({ plan: { margin: 5, covariates: [{ column: "tenure" }] } });
  });

  test("a remembered question gives way at the first reading only, if it does not fit", async () => {
    make({ chosen: { plan, guessed: false } });
    save(1);
    expect(last().order.ask).toMatchObject({ kind: "plan", orSuggest: true });
    await end(compared("one", stamp(1), { guessed: false, question: question(plan, false) }));
    save(2);
    expect(last().order.ask).toMatchObject({ kind: "plan", orSuggest: false });
  });

  test("a plan file's text is sent as it is, and a new text replaces what was chosen over it", async () => {
    make({ planText: { text: "{1}", file: "heating.slantwise.json" } });
    save(1);
    expect(last().order.ask).toEqual({ kind: "text", text: "{1}", file: "heating.slantwise.json" });
    await end(compared("one", stamp(1), { guessed: false }));
    session.choose({ key: "margin", value: 5 });
    expect(last().order.ask).toMatchObject({ kind: "plan", plan: { margin: 5 }, orSuggest: false });
    await end(compared("one", stamp(1), { guessed: false }));
    session.planChanged({ text: "{2}", file: "heating.slantwise.json" }, null);
    expect(last().order.ask).toEqual({ kind: "text", text: "{2}", file: "heating.slantwise.json" });
  });

  test("other rows are presented from the kept comparison", async () => {
    save(1);
    await end(compared("one", stamp(1)));
    await session.setFilter({ holds: ["floor_m2"], omits: [] });
    expect([shown(), session.state().filter]).toEqual(["filtered", { holds: ["floor_m2"], omits: [] }]);
    expect(runs.length).toBe(1);
  });
});
