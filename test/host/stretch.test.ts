import fc from "fast-check";
import { expect, test } from "vitest";
import { stretchOf } from "../../src/host/stretch";

const text = fc.array(fc.constantFrom("a", "b", "\r\n", "\n", "😀", "😁", "é"), { maxLength: 12 }).map((parts) => parts.join(""));

test("putting the stretch in place of the old one gives the new text, and parts no character or line end", () => {
  fc.assert(
    fc.property(text, text, (before, after) => {
      const { from, to, content } = stretchOf(before, after);
      expect(before.slice(0, from) + content + before.slice(to)).toBe(after);
      for (const at of [from, to]) {
        if (at > 0 && at < before.length)
          expect(before.slice(at - 1, at + 1)).not.toMatch(/^(\r\n|[\uD800-\uDBFF][\uDC00-\uDFFF])$/);
      }
    }),
    { seed: 4, numRuns: 2000 },
  );
});

test("only what differs is in it", () => {
  expect(stretchOf('{ "margin": 150 }', '{ "margin": 170 }')).toEqual({ from: 13, to: 14, content: "7" });
  expect(stretchOf("same", "same")).toEqual({ from: 4, to: 4, content: "" });
});
