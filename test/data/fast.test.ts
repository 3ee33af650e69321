import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { COMMA } from "../../src/data/fast/line";
import { ReaderMemory } from "../../src/data/fast/memory";
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
  it("is the double that Number() reads, for numbers of up to 19 digits with the mark anywhere and either mark", () => {
    const digits = fc.tuple(fc.bigInt({ min: 0n, max: 10n ** 19n - 1n }), fc.nat(19), fc.nat(19), fc.boolean());
    fc.assert(
      fc.property(digits, ([whole, cut, decimals, minus]) => {
        const kept = String(whole)
          .slice(cut % 12)
          .padStart(decimals + 1, "0");
        const at = kept.length - decimals;
        const text = `${minus ? "-" : ""}${kept.slice(0, at)}.${kept.slice(at)}`;
        expect(parse(text)).toBe(Number(text));
        expect(parseNumber(bytesOf(text.replace(".", ",")), 0, text.length, COMMA)).toBe(Number(text));
      }),
      { numRuns: 20_000 },
    );
  });
  it("is rounded to even exactly between two doubles, and to the nearer one just beside that", () => {
    for (const text of [
      ...["9007199254740993", "9007199254740993.0", "9007199254740993.00", "9007199254740994.99", "9007199254740995.0"],
      // 1 + 2^-53 and 0.5 + 2^-54 cut at 18 digits: just below half-way
      ...["1.00000000000000011", "1.00000000000000012", "0.500000000000000055", "0.500000000000000056"],
      ...["900719925474099.25", "4503599627370496.5", "4503599627370497.5", "2251799813685248.25", "2251799813685248.75"],
      ...["0.1", "1e22", "1e23", "123456789012345e-22", "999999999999999999", "99999999999999999.9", "-0", "-0.0", "0e5"],
    ])
      expect(parse(text), text).toBe(Number(text));
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
      "2,25",
      "1.5",
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
  it("on decimal commas", () => {
    for (const text of [
      "a;b\n1,5;2\n",
      "a;b\n1,234;2\n",
      'a;b\n"1,5";2\n,;3\n',
      "a;b\n1,5;x, y\n5,;z\n-,5;1,5e3\n",
      "a;b\n1;2\n3;x,y\n",
      "a;b\n1.5;2\n3;x,y\n",
      "a;b\n1,5;2;3\n4;5\n",
    ]) {
      same(text);
      expect(taken(text), JSON.stringify(text)).toBe(true);
    }
  });
  it("and leaves to it what is not plain", () => {
    for (const text of [
      'a,b\n"x\ny",2\n',
      'a,b\n"x""y",2\n',
      "a;b\n1,5;2.5\n",
      "a;b\n1.234,5;2\n",
      'a,b\n"1,234",2\n',
      "a\n1\n",
      "a,b\r1,2\r",
      'a,b\nx"y,2\n',
    ]) {
      expect(taken(text), JSON.stringify(text)).toBe(false);
      same(text);
    }
  });
});

describe("a reading with kept arrays", () => {
  it("is the reading without, whatever was read before", () => {
    const cell = fc.constantFrom("1", "-2.5", "x", "yes", "", "NA", "2024-01-05", "?");
    const file = fc
      .tuple(
        fc.integer({ min: 2, max: 4 }),
        fc.array(fc.array(cell, { minLength: 4, maxLength: 4 }), { minLength: 1, maxLength: 60 }),
      )
      .map(([width, rows]) =>
        bytesOf(
          `${["a", "b", "c", "d"].slice(0, width).join(",")}\n${rows.map((row) => row.slice(0, width).join(",")).join("\n")}\n`,
        ),
      );
    fc.assert(
      fc.property(fc.array(file, { minLength: 2, maxLength: 5 }), (files) => {
        const keep = new ReaderMemory();
        for (const bytes of files) {
          expect(readTable(bytes, { file: "t.csv" }, keep)).toEqual(readTable(bytes, { file: "t.csv" }));
        }
      }),
    );
  });
  it("writes into the arrays of the last one", () => {
    const keep = new ReaderMemory();
    const first = readTable(bytesOf("a,b\n1,x\n2,y\n"), { file: "t.csv" }, keep);
    const second = readTable(bytesOf("a,b\n3,x\n4,y\n"), { file: "t.csv" }, keep);
    if (!first.ok || !second.ok) throw new Error("no table");
    const buffers = (columns: typeof first.table.columns) =>
      columns.map((c) => ("values" in c ? c.values.buffer : c.codes.buffer));
    expect(buffers(second.table.columns)).toEqual(buffers(first.table.columns));
    expect(buffers(second.table.columns).every((buffer, c) => buffer === buffers(first.table.columns)[c])).toBe(true);
  });
  it("grows them where a file has more rows than its beginning lets expect", () => {
    const long = "1".repeat(400);
    const text = `a,b\n${`${long},2\n`.repeat(300)}${"1,2\n".repeat(20_000)}`;
    same(text);
    expect(taken(text)).toBe(true);
  });
});
