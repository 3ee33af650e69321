import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  decodeNames,
  decodeValue,
  encodeNames,
  encodeValue,
  readPairs,
  writePairs,
} from "../../../src/report/writeup/attributes";

const text = fc.string({ unit: "grapheme" });
const hostile = fc.oneof(
  text,
  fc.constantFrom("--", "-->", "a--b", "--->", "-", "\n", '"', "'", "%2D", "a|b", "<!--", "`", "é −", "\0", ","),
);
const strung = fc.array(hostile, { maxLength: 5 }).map((parts) => parts.join(""));

describe("a value in a marker", () => {
  test("is what was written, and holds nothing a comment or a table would act on", () => {
    fc.assert(
      fc.property(strung, (value) => {
        const written = encodeValue(value);
        expect(written).not.toMatch(/\s|--|[<>|`]/);
        expect(decodeValue(written)).toBe(value);
      }),
    );
  });
  test("stays readable where nothing has to be encoded", () => {
    expect(encodeValue("2026-01-31")).toBe("2026-01-31");
    expect(encodeValue("reports/my plan.slantwise.json")).toBe("reports/my%20plan.slantwise.json");
    expect(encodeValue("a---b −212")).toBe("a%2D%2D-b%20−212");
  });
  test("half a character, which UTF-8 cannot hold, becomes the mark for one", () => {
    expect(decodeValue(encodeValue("a\ud800b"))).toBe("a\ufffdb");
  });
  test("that nobody encoded is told from one that was", () => {
    expect(decodeValue("100%")).toBeNull();
    expect(decodeNames("a,100%")).toBeNull();
  });
  test("lists names, none too", () => {
    fc.assert(
      fc.property(
        fc.array(
          strung.filter((name) => name !== "\0"),
          { maxLength: 4 },
        ),
        (names) => {
          expect(decodeNames(encodeNames(names))).toEqual(names);
        },
      ),
    );
  });
});

describe("pairs", () => {
  test("are read as they were written, in whatever blanks", () => {
    const pairs = { a: "1", b: "", "c-d": "x=y" };
    expect(writePairs({ ...pairs, e: undefined })).toBe("a=1 b= c-d=x=y");
    expect(Object.fromEntries(readPairs("  a=1\n b=\tc-d=x=y ")!)).toEqual(pairs);
  });
  test("a word alone or a key twice is no pair", () => {
    expect([readPairs("a"), readPairs("=a"), readPairs("a=1 a=2")]).toEqual([null, null, null]);
  });
});
