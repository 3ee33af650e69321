import { beforeEach, describe, expect, test, vi } from "vitest";
import { compared, refused, Stage, stamp } from "./stage";

let stage: Stage;
beforeEach(() => {
  stage = new Stage();
});

describe("a session", () => {
  test("goes from reading to ready, and numbers its readings", async () => {
    expect(stage.status).toBe("reading");
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    expect([stage.status, stage.shown, stage.session.state().reading?.number]).toEqual(["ready", "one", 1]);
    stage.save(2);
    expect([stage.status, stage.shown]).toEqual(["updating", "one"]);
    await stage.end(compared("two", stamp(2)));
    expect([stage.status, stage.shown, stage.session.state().reading?.number]).toEqual(["ready", "two", 2]);
  });

  test("the newest save wins: an overtaken run is cancelled and shows nothing", async () => {
    stage.save(1);
    const slow = stage.last;
    stage.save(2);
    expect(slow.cancelled).toBe(true);
    await stage.end(compared("two", stamp(2)));
    await stage.end(compared("one", stamp(1)), slow);
    expect([stage.status, stage.shown]).toEqual(["ready", "two"]);
  });

  test("a result of a file that has changed again is not shown", async () => {
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    stage.save(2);
    stage.now = stamp(3);
    stage.session.fileStirs();
    await stage.end(compared("half", stamp(2)));
    expect([stage.status, stage.shown]).toEqual(["updating", "one"]);
    stage.session.fileSettled(stage.now);
    await stage.end(compared("three", stamp(3)));
    expect([stage.status, stage.shown]).toEqual(["ready", "three"]);
  });

  test("an unusable file is said so only when it has stood still, and the old result stays", async () => {
    vi.useFakeTimers();
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    stage.save(2);
    stage.still = 200;
    await stage.end(refused("line 7 is cut off", stamp(2)));
    expect([stage.status, stage.shown]).toEqual(["updating", "one"]);
    vi.advanceTimersByTime(5000);
    expect(stage.session.state().status).toEqual({ kind: "unusable", text: "line 7 is cut off", line: 7, inPlan: false });
    expect(stage.shown).toBe("one");
    vi.useRealTimers();
    stage.still = 10_000;
    stage.save(3);
    await stage.end(compared("three", stamp(3)));
    expect([stage.status, stage.shown]).toEqual(["ready", "three"]);
  });

  test("a half-written file's problem is never shown when the rest follows", async () => {
    vi.useFakeTimers();
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    stage.save(2);
    stage.still = 200;
    await stage.end(refused("half", stamp(2)));
    stage.save(3);
    vi.advanceTimersByTime(5000);
    expect([stage.status, stage.shown]).toEqual(["updating", "one"]);
    vi.useRealTimers();
    await stage.end(compared("three", stamp(3)));
    expect([stage.status, stage.shown]).toEqual(["ready", "three"]);
  });

  test("a file that lost its last line break is waited for", async () => {
    vi.useFakeTimers();
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    stage.save(2);
    stage.still = 200;
    await stage.end(compared("cut", stamp(2), { ended: false }));
    expect([stage.status, stage.shown]).toEqual(["updating", "one"]);
    vi.advanceTimersByTime(5000);
    vi.useRealTimers();
    expect([stage.status, stage.shown]).toEqual(["ready", "cut"]);
  });

  test("a missing file keeps the old result and comes back", async () => {
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    stage.session.fileStirs();
    stage.now = null;
    stage.session.fileSettled(null);
    expect(stage.session.state().status).toEqual({ kind: "missing", text: "heating.csv is missing" });
    expect(stage.shown).toBe("one");
    stage.save(2);
    await stage.end(compared("two", stamp(2)));
    expect([stage.status, stage.shown]).toEqual(["ready", "two"]);
  });

  test("a run that began before its file had settled shows its result only then, and is not repeated", async () => {
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    stage.now = null;
    stage.session.fileStirs();
    stage.session.fileLikely(stamp(2));
    await stage.end(compared("two", stamp(2)));
    expect([stage.status, stage.shown]).toEqual(["updating", "one"]);
    stage.now = stamp(2);
    stage.session.fileSettled(stage.now);
    await new Promise((done) => setTimeout(done));
    expect([stage.status, stage.shown, stage.runs.length]).toEqual(["ready", "two", 2]);
  });

  test("a run that began too early is cancelled when its file changes again", async () => {
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    stage.now = null;
    stage.session.fileStirs();
    stage.session.fileLikely(stamp(2));
    const early = stage.last;
    stage.session.fileStirs();
    expect(early.cancelled).toBe(true);
    stage.now = stamp(3);
    stage.session.fileSettled(stage.now);
    await stage.end(compared("half", stamp(2)), early);
    await stage.end(compared("three", stamp(3)));
    expect([stage.status, stage.shown]).toEqual(["ready", "three"]);
  });

  test("a file torn while it was read is looked at again", async () => {
    stage.save(1);
    await stage.end({ kind: "torn" });
    expect([stage.doubted, stage.status]).toEqual([1, "reading"]);
  });

  test("equal bytes are not a new reading", async () => {
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    stage.save(2);
    expect(stage.last.order.known).toBe("one");
    await stage.end({ kind: "same", stamp: stamp(2) });
    expect([stage.status, stage.shown, stage.session.state().reading?.number]).toEqual(["ready", "one", 1]);
  });
});
