import { beforeEach, describe, expect, test } from "vitest";
import { Keeping } from "../../src/host/keeping";
import type { Rewritten } from "../../src/host/keeping";
import type { Chosen } from "../../src/host/sessionParts";
import { applyChange } from "../../src/plan/change";
import { parsePlan } from "../../src/plan/parse";
import type { PlanChange } from "../../src/protocol";

const FILE = "heating.slantwise.json";
const TEXT =
  '{\n  "data": "heating.csv", // cleaned\n  "outcome": { "column": "kwh" },\n  "exposure": { "column": "retrofit" },\n  "margin": 150\n}\n';

let disk: string;
let known: string | null;
let asked: Chosen | null;
let ended: Rewritten[];
let writes: number;
/** Lets the writing that waits go on. */
let go: () => void;
let keeping: Keeping;

function planOf(text: string) {
  const parsed = parsePlan(text, FILE);
  if (!parsed.ok) throw new Error("no plan");
  return parsed.plan;
}

beforeEach(() => {
  [disk, known, asked, ended, writes, go] = [TEXT, TEXT, null, [], 0, () => undefined];
  keeping = new Keeping({
    path: FILE,
    known: () => (known === null ? null : { text: known, file: FILE }),
    apart: () => asked,
    ended: (result) => void ended.push(result),
    rewrite: async (_path, edit) => {
      await new Promise<void>((done) => (go = done));
      const text = edit(disk);
      if (text === null) return { ok: false, note: "broken" };
      writes++;
      disk = text;
      return { ok: true, text };
    },
  });
});

/** What a session does with a choice. */
function choose(change: PlanChange): void {
  asked = { plan: applyChange(asked?.plan ?? planOf(known!), change), guessed: false };
  keeping.keep(change);
}
async function written(): Promise<void> {
  while (keeping.busy) {
    go();
    await new Promise((done) => setTimeout(done));
  }
}

describe("choices kept in a plan file", () => {
  test("are written where they belong, with the comments of the file", async () => {
    choose({ key: "margin", value: 200 });
    await written();
    expect(disk).toBe(TEXT.replace("150", "200"));
    expect(ended).toEqual([{ ok: true, text: disk }]);
  });

  test("made while one is being written are one more writing, and all of them are in it", async () => {
    choose({ key: "margin", value: 200 });
    choose({ key: "covariates", columns: ["tenure"] });
    choose({ key: "reference", level: "none" });
    await written();
    expect([writes, ended.length]).toEqual([2, 1]);
    expect(planOf(disk)).toEqual(asked!.plan);
  });

  test("are added to what somebody has changed in the file meanwhile", async () => {
    disk = TEXT.replace("kwh", "cost").replace("cleaned", "cleaned again");
    choose({ key: "margin", value: 200 });
    await written();
    expect(disk).toBe(TEXT.replace("kwh", "cost").replace("cleaned", "cleaned again").replace("150", "200"));
  });

  test("that could not be written before are written with the next one", async () => {
    asked = { plan: applyChange(planOf(TEXT), { key: "reference", level: "full" }), guessed: false };
    choose({ key: "margin", value: 200 });
    await written();
    expect(planOf(disk)).toMatchObject({ margin: 200, exposure: { reference: "full" } });
  });

  test("leave a file alone that is no plan at the moment, and say so", async () => {
    disk = TEXT.replace("margin", "margn");
    const before = disk;
    choose({ key: "margin", value: 200 });
    await written();
    expect([disk, ended]).toEqual([before, [{ ok: false, note: "broken" }]]);
  });

  test("know a file by its text, whether or not it has a byte-order mark", async () => {
    disk = "\uFEFF" + TEXT;
    asked = { plan: applyChange(planOf(TEXT), { key: "reference", level: "full" }), guessed: false };
    choose({ key: "margin", value: 200 });
    await written();
    expect(disk.startsWith("\uFEFF{")).toBe(true);
    expect(planOf(disk).exposure.reference).toBe("full");
  });
});
