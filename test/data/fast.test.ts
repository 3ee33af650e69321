import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { missingTest } from "../../src/data/missing";
import { parseNumber } from "../../src/data/fast/number";
import { readFast } from "../../src/data/fast/read";
import { readGeneral, readTable } from "../../src/data/read";

const bytesOf = (text: string) => new TextEncoder().encode(text);
const same = (text: string, missing?: string[]) => {
  const bytes = bytesOf(text);
  const options = { file: "t.csv", missing };
  expect(readTable(bytes, options)).toEqual(readGeneral(bytes, options));
};
const taken = (text: string) => readFast(bytesOf(text), missingTest()) !== null;

describe("a number read from bytes", () => {
  const parse = (text: string) => parseNumber(bytesOf(text), 0, text.length);
  it("is the double that Number() reads, for every way a double is printed", () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), fc.nat(17), (value, places) => {
        for (const text of [
          String(value),
          value.toFixed(Math.min(places, 15)),
          value.toExponential(Math.min(places, 20)),
          value.toPrecision(places + 1),
        ]) {
          expect(parse(text)).toBe(Number(text));
        }
      }),
      { numRuns: 2000 },
    );
  });
  it("is none where the cell is no plain number", () => {
    for (const text of ["", "-", "+", ".", "1.2.3", "1e", "1e+", "0x10", "1 2", "1_000", "Infinity", "NaN", "12a", "--1", "١"])
      expect(parse(text)).toBeNaN();
  });
});

describe("the fast reader makes of a file what the general reader makes of it", () => {
  const cell = fc.oneof(
    fc.double({ noNaN: true, noDefaultInfinity: true }).map(String),
    fc.integer().map(String),
    fc.constantFrom(
      "",
      "NA",
      " n/a ",
      "yes",
      "no",
      "x",
      "é",
      "-99",
      "1e999",
      "1,5",
      "2024-02-30",
      "2024-02-29",
      '""',
      "a b",
      "\u00a0x",
      "−3",
    ),
    fc.string({ maxLength: 6 }).map((s) => s.replace(/[",\n\r]/g, "")),
  );
  it("on random tables", () => {
    fc.assert(
      fc.property(
        fc.array(fc.array(cell, { minLength: 2, maxLength: 5 }), { minLength: 1, maxLength: 12 }),
        fc.constantFrom(",", ";", "\t", "|"),
        fc.constantFrom("\n", "\r\n"),
        fc.boolean(),
        (rows, separator, end, last) =>
          same(["a", "b", "c"].join(separator) + end + rows.map((r) => r.join(separator)).join(end) + (last ? end : ""), ["-99"]),
      ),
      { numRuns: 1500 },
    );
  });
  it("on columns that are nearly all numbers, or nearly all dates", () => {
    const many = (value: (i: number) => string) =>
      `a,b\n${Array.from({ length: 300 }, (_, i) => `${value(i)},${i}`).join("\n")}\n`;
    for (const text of [
      many((i) => (i % 40 === 3 ? "?" : String(i / 7))),
      many((i) => (i % 15 === 3 ? "?" : String(i / 7))),
      many((i) => (i < 250 ? "" : String(i))),
      many((i) => (i < 250 ? "w" : String(i))),
      many((i) => (i > 220 ? "w" : String(i))),
      many((i) => (i % 50 === 1 ? "soon" : `2024-01-${String(1 + (i % 28)).padStart(2, "0")}`)),
      many((i) => `id${i}`),
      many((i) => (i % 2 ? "TRUE" : "false")),
      many((i) => (i === 7 ? "1e400" : String(i))),
    ]) {
      same(text);
    }
    expect(taken(many((i) => (i % 40 === 3 ? "?" : String(i / 7))))).toBe(true);
    expect(taken(many((i) => `id${i}`))).toBe(true);
  });
  it("on blank lines, short rows, quoted cells, a byte-order mark", () => {
    for (const text of [
      "a,b\n\n1,2\n\n3\n\n",
      'a,b\n"x",2\n"y z",3\n',
      "\ufeffa,b\n1,2\n",
      "a,b\n1,2",
      "a,b\n1,2,\n3,4,5\n",
      "a,b\n \n1,2\n",
    ])
      same(text);
  });
  it("and leaves to it what is not plain", () => {
    for (const text of ['a,b\n"x\ny",2\n', 'a,b\n"x""y",2\n', "a;b\n1,5;2\n", "a\n1\n", "a,b\r1,2\r", 'a,b\nx"y,2\n']) {
      expect(taken(text), JSON.stringify(text)).toBe(false);
      same(text);
    }
  });
});
