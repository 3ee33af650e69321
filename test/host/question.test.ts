import { beforeEach, describe, expect, test } from "vitest";
import { compared, plan, presentation, question, Stage, stamp } from "./stage";

let stage: Stage;
beforeEach(() => {
  stage = new Stage();
});

describe("the question of a session", () => {
  test("a bare CSV is guessed, and the guess is kept while it fits", async () => {
    stage.save(1);
    expect(stage.last.order.ask).toEqual({ kind: "suggest" });
    await stage.end(compared("one", stamp(1)));
    expect(stage.session.state().question?.guessed).toBe(true);
    stage.save(2);
    expect(stage.last.order.ask).toEqual({ kind: "plan", plan, guessed: true, orSuggest: true });
  });

  test("a choice is shown at once, remembered, and compared without reading the file again", async () => {
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    stage.session.choose({ key: "outcome", column: "cost" });
    expect(stage.session.state().question?.plan.outcome.column).toBe("cost");
    expect(stage.session.apart).toEqual({ plan: { ...plan, outcome: { column: "cost" } }, guessed: false });
    expect(stage.last.order).toMatchObject({
      reread: false,
      known: null,
      ask: { kind: "plan", guessed: false, orSuggest: false },
    });
    await stage.end(compared("one", stamp(1), { presentation: presentation("cost"), guessed: false }));
    expect([stage.shown, stage.session.state().reading?.number]).toEqual(["cost", 1]);
  });

  test("a choice made while the file is changing is compared when it has settled", async () => {
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    stage.now = null;
    stage.session.fileStirs();
    stage.session.fileLikely(stamp(2));
    stage.session.choose({ key: "margin", value: 5 });
    stage.now = stamp(2);
    stage.session.fileSettled(stage.now);
    expect(stage.last.order.ask).toMatchObject({ kind: "plan", plan: { margin: 5 } });
  });

  test("two quick choices build on one another", async () => {
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    stage.session.choose({ key: "margin", value: 5 });
    stage.session.choose({ key: "covariates", columns: ["tenure"] });
    expect(stage.runs.at(-2)!.cancelled).toBe(true);
    expect(stage.last.order.ask).toMatchObject({ plan: { margin: 5, covariates: [{ column: "tenure" }] } });
  });

  test("a remembered question gives way at the first reading only, if it does not fit", async () => {
    stage = new Stage({ chosen: { plan, guessed: false } });
    stage.save(1);
    expect(stage.last.order.ask).toMatchObject({ kind: "plan", orSuggest: true });
    await stage.end(compared("one", stamp(1), { guessed: false, question: question(plan, false) }));
    stage.save(2);
    expect(stage.last.order.ask).toMatchObject({ kind: "plan", orSuggest: false });
  });

  test("a plan file's text is sent as it is, and a new text replaces what was chosen over it", async () => {
    stage = new Stage({ planText: { text: "{1}", file: "heating.slantwise.json" } });
    stage.save(1);
    expect(stage.last.order.ask).toEqual({ kind: "text", text: "{1}", file: "heating.slantwise.json" });
    await stage.end(compared("one", stamp(1), { guessed: false }));
    stage.session.choose({ key: "margin", value: 5 });
    expect(stage.last.order.ask).toMatchObject({ kind: "plan", plan: { margin: 5 }, orSuggest: false });
    await stage.end(compared("one", stamp(1), { guessed: false }));
    stage.session.planChanged({ text: "{2}", file: "heating.slantwise.json" }, null);
    expect(stage.last.order.ask).toEqual({ kind: "text", text: "{2}", file: "heating.slantwise.json" });
  });

  test("a plan's text that asks the same is no reason for a second run: an echo of our own writing, or another layout", async () => {
    const text = (margin: number, space = "") =>
      `{${space} "data": "heating.csv", "outcome": { "column": "kwh" }, "exposure": { "column": "retrofit" }, "margin": ${margin} }`;
    const file = "heating.slantwise.json";
    stage = new Stage({ planText: { text: text(1), file } });
    const asked = (margin: number) => question({ ...plan, data: "heating.csv", covariates: undefined, margin }, false);
    stage.save(1);
    await stage.end(compared("one", stamp(1), { guessed: false, question: asked(1) }));
    stage.session.choose({ key: "margin", value: 5 });
    await stage.end(compared("one", stamp(1), { guessed: false, question: asked(5) }));
    stage.session.planChanged({ text: text(5), file }, null);
    stage.session.planChanged({ text: text(5, "\n"), file }, null);
    expect([stage.runs.length, stage.status, stage.session.apart]).toEqual([2, "ready", null]);
    stage.session.planChanged({ text: text(6), file }, null);
    expect(stage.last.order.ask).toEqual({ kind: "text", text: text(6), file });
  });

  test("a guess that is saved as a plan is one no longer", async () => {
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    const planText = { text: '{ "data": "heating.csv" }', file: "heating.slantwise.json" };
    stage.session.planChanged(planText, null);
    expect(stage.last.order.ask).toEqual({ kind: "text", ...planText });
    await stage.end(compared("one", stamp(1), { guessed: false, question: question(plan, false) }));
    expect([stage.session.state().question?.guessed, stage.session.apart]).toEqual([false, null]);
  });

  test("other rows are presented from the kept comparison", async () => {
    stage.save(1);
    await stage.end(compared("one", stamp(1)));
    await stage.session.setFilter({ holds: ["floor_m2"], omits: [] });
    expect([stage.shown, stage.session.state().filter]).toEqual(["filtered", { holds: ["floor_m2"], omits: [] }]);
    expect(stage.runs.length).toBe(1);
  });
});
