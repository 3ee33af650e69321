import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Estimate } from "../../../src/engine/comparison";
import { changeWord, marginBounds } from "../../../src/engine/shift/word";

const at = (estimate: number, half: number): Estimate => ({
  estimate,
  standardError: half / 2,
  df: 100,
  interval: [estimate - half, estimate + half],
  p: 0.1,
});
const word = (
  base: number,
  baseHalf: number,
  adjusted: number,
  half: number,
  shiftHalf: number,
  margin: number | null = null,
) => {
  const shift = adjusted - base;
  return changeWord(
    at(base, baseHalf),
    at(adjusted, half),
    [shift - shiftHalf, shift + shiftHalf],
    marginBounds(margin, "as is"),
  );
};

describe("the word for a change", () => {
  it("is read from the shift first", () => {
    expect(word(100, 20, 102, 20, 5)).toBe("steady");
    expect(word(100, 20, 102, 20, 30)).toBe("unclear");
    expect(word(100, 20, 130, 20, 5)).toBe("grows");
    expect(word(100, 20, 130, 20, 5, 40)).toBe("steady");
  });
  it("names what happened to sign and interval", () => {
    expect(word(100, 20, -50, 20, 5)).toBe("reverses");
    expect(word(100, 20, 10, 20, 5)).toBe("fades");
    expect(word(100, 20, -10, 20, 5)).toBe("fades");
    expect(word(10, 20, 100, 20, 5)).toBe("emerges");
    expect(word(10, 20, -10, 20, 5)).toBe("crosses");
    expect(word(100, 20, 60, 20, 5)).toBe("shrinks");
  });
  it("is none where an interval is missing", () => {
    expect(changeWord({ ...at(1, 1), interval: null }, at(2, 1), [0, 2], null)).toBeNull();
    expect(changeWord(at(1, 1), at(2, 1), null, null)).toBeNull();
  });
  it("keeps a word when everything changes sign", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -100, max: 100, noNaN: true }),
        fc.double({ min: -100, max: 100, noNaN: true }),
        fc.double({ min: 0.1, max: 80, noNaN: true }),
        (b, a, half) => {
          expect(word(-b, half, -a, half, half / 2)).toBe(word(b, half, a, half, half / 2));
        },
      ),
    );
  });
  it("a margin for a log outcome is a ratio less 1", () => {
    expect(marginBounds(0.25, "log")).toEqual([Math.log(0.75), Math.log(1.25)]);
    expect(marginBounds(2, "log")).toEqual([-Infinity, Math.log(3)]);
  });
});
