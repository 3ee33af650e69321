import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { Plan } from "../../../src/engine/plan";
import { sayVerdict } from "../../../src/report/wording/writeup";
import { plansIn, refreshed } from "../../../src/report/writeup/review";
import { planText } from "../../../src/report/writeup/plan";
import { block, crossed, DAY, flats, hash, plan, PLAN, reviewed, sourceOf, states } from "./written";

const first = sourceOf(flats(), plan);
const later = sourceOf(flats({ more: 50, without: 4 }), plan);
const BLOCK = block(first);
const say = (text: string, now: Parameters<typeof reviewed>[1]) => reviewed(text, now).map((item) => sayVerdict(item, null));
const value = (pairs: string, text = "") => `<!-- slantwise:value plan=${PLAN} ${pairs} -->${text}<!-- /slantwise:value -->`;

describe("a block against its plan and data", () => {
  test("is fresh where nothing changed, and then nothing is written", () => {
    const [item] = reviewed(BLOCK, first);
    expect(item).toMatchObject({ verdict: { state: "fresh" }, replacement: null, plan: PLAN, line: 1 });
  });
  test("is stale where a figure moved, and the line says from what to what", () => {
    expect(say(BLOCK, later)[0]).toMatch(/^stale: estimate was −\d{3}\.\d, is −\d{3}\.\d; 4 flats fewer$/);
    const text = refreshed(BLOCK, reviewed(BLOCK, later), false);
    expect(text).toContain("2026-02-01");
    expect(states(reviewed(text, later))).toEqual(["fresh"]);
    expect(say(text, first)[0]).toMatch(/^stale: estimate was −\d{3}\.\d, is −\d{3}\.\d; 4 flats more$/);
  });
  test("that a sign reversed is one word of the line", () => {
    expect(say(BLOCK, sourceOf(flats({ more: 1000 }), plan))[0]).toMatch(/^stale: estimate was −\d{3}\.\d, is \+\d{3}/);
  });
  test("is unchanged where other bytes say the same; a refresh then brings fingerprint and day up to date", () => {
    const moved = {
      ...first,
      comparison: { ...first.comparison, source: { ...first.comparison.source, sha256: hash("other bytes") } },
    };
    expect(say(BLOCK, moved)).toEqual(["checked again, unchanged"]);
    const text = refreshed(BLOCK, reviewed(BLOCK, moved), false);
    expect(text).toContain(`SHA-256 ${hash("other bytes").slice(0, 12)}`);
    expect([states(reviewed(text, moved)), states(reviewed(text, first))]).toEqual([["fresh"], ["unchanged"]]);
  });
  test("a plan changed since is said, in the line and from then on in the block", () => {
    const reasons: Plan = { ...plan, covariates: [{ column: "floor_m2", reason: "larger flats use more" }] };
    expect(say(BLOCK, sourceOf(flats(), reasons))).toEqual([
      "checked again, unchanged; the plan was changed after results were seen",
    ]);
    const report = sourceOf(flats(), { ...plan, report: [] });
    expect(say(BLOCK, report)[0]).toMatch(
      /^stale: the plan was changed after results were seen; reported set was floor_m2, is nothing; estimate was −\d{3}\.\d, is −\d+\.\d$/,
    );
    const once = refreshed(BLOCK, reviewed(BLOCK, report), false);
    expect(BLOCK).not.toContain("after results were seen");
    expect(once).toContain(", changed once after results were seen; ");
    expect(states(reviewed(once, report))).toEqual(["fresh"]);
    expect(refreshed(once, reviewed(once, first), false)).toContain(", changed 2 times after results were seen; ");
  });
  test("a plan written otherwise is the same plan", () => {
    const turned = Object.fromEntries(Object.entries(plan).reverse()) as unknown as Plan;
    expect(planText(turned)).toBe(planText(plan));
    expect(planText({ ...plan, margin: 101 })).not.toBe(planText(plan));
  });
  test("names the sets looked at and the plan with its fingerprint", () => {
    expect(BLOCK).toContain(`; 2 sets looked at; plan ${PLAN} ${first.planSha.slice(0, 12)}; ${DAY}.`);
  });
  test("where slopes differ now, the number is gone and the line says so", () => {
    expect(say(BLOCK, sourceOf(crossed, plan))[0]).toMatch(
      /^stale: estimate was −\d{3}\.\d, is no single difference: slopes differ in floor_m2; /,
    );
  });
  test("edited by hand is noticed, whether or not it is stale, and not overwritten unless asked", () => {
    const edited = BLOCK.replace(/\| −\d{3}\.\d \(/, "| −999 (");
    expect(edited).not.toBe(BLOCK);
    expect(say(edited, first)).toEqual(["edited by hand"]);
    expect(say(edited, later)[0]).toMatch(/^edited by hand, and stale: estimate was −\d{3}\.\d, is −\d{3}\.\d; 4 flats fewer$/);
    expect(refreshed(edited, reviewed(edited, later), false)).toBe(edited);
    const forced = refreshed(edited, reviewed(edited, first), true);
    expect(forced).toBe(BLOCK.replaceAll(DAY, "2026-02-01").replace(/text-sha=\S+/, /text-sha=\S+/.exec(forced)![0]));
    expect(states(reviewed(forced, first))).toEqual(["fresh"]);
  });
  test("without plan or data is unusable, says why, and stays", () => {
    const gone = () => ({ ok: false, why: "flats.csv: the file is not there." }) as const;
    expect(say(BLOCK, gone)).toEqual(["flats.csv: the file is not there."]);
    expect(refreshed(BLOCK, reviewed(BLOCK, gone), true)).toBe(BLOCK);
  });
  test("a set beside the reported one that moved is named", () => {
    const base = sourceOf(flats({ more: 50 }), { ...plan, report: [] });
    const text = block(base).replace(/(nothing","[^"]*","[^"]*","[^"]*"\],\["floor_m2",")[^"%]+/, "$1−77");
    const stale = { ...base, comparison: { ...base.comparison, source: { ...base.comparison.source, file: "moved.csv" } } };
    expect(say(text, stale)[0]).toMatch(/^stale: with floor_m2 held fixed it was −77 .*, is −\d{3}\.\d /);
  });
  test("a change of words alone is said as that", () => {
    const renamed = { ...first, comparison: { ...first.comparison, source: { ...first.comparison.source, file: "moved.csv" } } };
    expect(say(BLOCK, renamed)).toEqual(["stale: sentences changed, no figure of the table did"]);
  });
});

describe("inline numbers", () => {
  test("become what they ask for", () => {
    const figures = ["estimate", "low", "high", "shift", "rows", "p"].map((of) => value(`of=${of}`)).join(" ");
    const text = refreshed(figures, reviewed(figures, first), false);
    const shown = [...text.matchAll(/-->([^<]*)<!-- \//g)].map((match) => match[1]);
    const [estimate, low, high, shift] = shown.slice(0, 4).map((figure) => Number(figure.replace("−", "-")));
    const { readout } = first.comparison.sets[1].contrasts[0];
    if (readout.kind !== "single" || !readout.interval || !readout.shift) throw new Error("not the case that is tested");
    expect(Math.abs(estimate - readout.estimate)).toBeLessThan(0.5);
    expect(Math.abs(low - readout.interval[0])).toBeLessThan(0.5);
    expect(Math.abs(high - readout.interval[1])).toBeLessThan(0.5);
    expect(Math.abs(shift - readout.shift.estimate)).toBeLessThan(0.5);
    expect(shown.slice(4)).toEqual(["60", "&lt; 0.001"]);
    expect(states(reviewed(text, first))).toEqual(Array(6).fill("fresh"));
  });
  test("of another set, contrast and digits", () => {
    const now = (pairs: string) => reviewed(value(pairs), first)[0].replacement?.replace(/^.*?-->|<!--.*$/g, "");
    const base = first.comparison.sets[0].contrasts[0].readout;
    if (base.kind === "none" || base.kind === "varies") throw new Error("not the case that is tested");
    expect(now("of=estimate set= digits=3 contrast=full")).toBe(base.estimate.toFixed(3).replace("-", "−"));
    expect(now("of=estimate set=floor_m2")).toBe(now("of=estimate"));
  });
  test("are stale, edited or fresh like a block; one put right by hand is fresh", () => {
    expect(say(value("of=rows", "64"), first)).toEqual(["stale: was 64, is 60"]);
    expect(say(value("of=rows was=60", "64"), first)).toEqual(["edited by hand"]);
    expect(say(value("of=rows was=60", "64"), later)).toEqual(["edited by hand, and stale: was 64, is 56"]);
    expect(say(value("of=rows was=64", "60"), first)).toEqual(["fresh"]);
    expect(say(value("of=rows", "\n60 "), first)).toEqual(["fresh"]);
    const edited = value("of=rows was=60", "64");
    expect(refreshed(edited, reviewed(edited, later), false)).toBe(edited);
    expect(refreshed(edited, reviewed(edited, later), true)).toBe(value("of=rows was=56", "56"));
  });
  test("where the set varies say so, and are never fresh", () => {
    const now = sourceOf(crossed, plan);
    for (const of of ["estimate", "low", "high", "shift", "p"]) {
      const text = value(`of=${of}`, "−212");
      expect(say(text, now)).toEqual(["no single difference: slopes differ in floor_m2 (was −212, is no single difference)"]);
      const after = refreshed(text, reviewed(text, now), false);
      expect(after).toContain(">no single difference<");
      expect(say(after, now)).toEqual(["no single difference: slopes differ in floor_m2"]);
    }
    expect(say(value("of=rows", "80"), now)).toEqual(["fresh"]);
    expect(reviewed(value("of=estimate set="), now)[0].replacement).toMatch(/>−?[\d.]+, difference in means only</);
  });
  test("that cannot be looked up are unusable, with what there is", () => {
    expect(say(value("of=low set=age"), first)).toEqual(["no set holds exactly age fixed; there are “nothing”, “floor_m2”."]);
    expect(say(value("of=low contrast=half"), first)).toEqual(["there is no contrast half; there is full."]);
    expect(say(value("of=shift set="), first)[0]).toContain("has no shift");
    expect(say(value("of=mean"), first)[0]).toBe("the marker's of must be estimate, low, high, shift, rows or p.");
  });
});

describe("a document", () => {
  test("names its plans once each", () => {
    expect(plansIn(`${BLOCK}\n\n${value("of=p")}\n\n${block(first, "b.slantwise.json")}`)).toEqual([PLAN, "b.slantwise.json"]);
  });
  const line = fc.oneof(
    fc.string({ unit: "grapheme" }).map((text) => text.replace(/[\r\n`~<\\]/g, "")),
    fc.constantFrom("# Title", "", "| a | b |", "- item", "> said", "    code", "<b>bold</b>", "\t"),
  );
  test("keeps all prose around a block and an inline number, byte for byte", () => {
    fc.assert(
      fc.property(fc.array(line), fc.array(line), fc.array(line), fc.constantFrom("\n", "\r\n", "\r"), (a, b, c, ending) => {
        const around = [a, b, c].map((lines) => lines.map((text) => text + ending).join(""));
        const [number, text] = [value("of=rows", "1"), BLOCK.replaceAll("\n", ending)];
        const [before, between, after] = [around[0] + ending, ending + around[1] + ending + "So ", `.${ending}${around[2]}`];
        const document = before + text + between + number + after;
        const items = reviewed(document, later);
        expect(states(items)).toEqual(["stale", "stale"]);
        const now = refreshed(document, items, false);
        expect(now).toBe(before + items[0].replacement! + between + items[1].replacement! + after);
        expect(states(reviewed(now, later))).toEqual(["fresh", "fresh"]);
        expect(items[0].replacement!.split(ending).length).toBe(items[0].replacement!.split(/\r\n|\r|\n/).length);
      }),
      { numRuns: 60 },
    );
  });
  test("an indented block stays indented", () => {
    const text = `- item\n\n  ${BLOCK.replace(/\n(?!\n)/g, "\n  ")}\n`;
    expect(states(reviewed(text, first))).toEqual(["fresh"]);
    const now = refreshed(text, reviewed(text, later), false);
    for (const part of now.split("\n").slice(1)) expect(part).toMatch(/^( {2}\S|$)/);
    expect(states(reviewed(now, later))).toEqual(["fresh"]);
  });
});
