import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { naturalCompare, naturalSort } from "../../../src/engine/question/natural";

const sorted = (texts: string[]) => [...texts].sort(naturalCompare);
const text = fc.oneof(
  fc.string({ unit: fc.constantFrom("a", "B", "b", "0", "1", "9", "10", "-", "é", "\u{1f600}", "\uffee"), maxLength: 6 }),
  fc.string({ unit: "binary", maxLength: 4 }),
);

describe("the natural order of level names", () => {
  it("compares runs of digits as numbers, however long", () => {
    expect(sorted(["b10", "b9", "b100", "b1"])).toEqual(["b1", "b9", "b10", "b100"]);
    expect(sorted(["v1.10", "v1.9", "v1"])).toEqual(["v1", "v1.9", "v1.10"]);
    expect(sorted(["x100000000000000000001", "x99999999999999999999"])).toEqual([
      "x99999999999999999999",
      "x100000000000000000001",
    ]);
  });
  it("ignores letter case, and breaks ties by code point", () => {
    expect(sorted(["b", "A", "a", "B", "C"])).toEqual(["A", "a", "B", "b", "C"]);
    expect(sorted(["b9", "b09", "B9"])).toEqual(["B9", "b09", "b9"]);
    expect(sorted(["\u{1f600}", "\uffee", "z"])).toEqual(["z", "\uffee", "\u{1f600}"]);
  });
  it("is a total order: only equal texts are equal, and any three agree", () => {
    fc.assert(
      fc.property(text, text, text, (a, b, c) => {
        expect(naturalCompare(a, b) === 0).toBe(a === b);
        expect(Math.sign(naturalCompare(a, b)) + Math.sign(naturalCompare(b, a))).toBe(0);
        if (naturalCompare(a, b) < 0 && naturalCompare(b, c) < 0) expect(naturalCompare(a, c)).toBeLessThan(0);
      }),
      { numRuns: 5000 },
    );
  });
  it("sorts indexes as it compares texts", () => {
    fc.assert(
      fc.property(fc.array(text), (texts) => {
        expect(naturalSort(texts).map((i) => texts[i])).toEqual(sorted(texts));
      }),
    );
  });
});
