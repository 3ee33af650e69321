import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fingerprint } from "../../src/data/fingerprint";
import { COLUMN_LIMIT, readGeneral, readTable } from "../../src/data/read";
import { cellsOf, shown, tableOf } from "./shown";
import { encode, written } from "./written";

const read = (text: string, missing?: Parameters<typeof readTable>[1]["missing"]) =>
  readTable(new TextEncoder().encode(text), { file: "heating.csv", missing });

describe("a table written to a file is the table read from it", () => {
  it("whatever the separator, quoting, encoding, line ends and blanks, with every lost row on its line", () => {
    fc.assert(
      fc.property(written, ({ bytes, columns, lines, short, long, blank }) => {
        const table = tableOf(readTable(bytes, { file: "t.csv" }));
        expect([...table.lines]).toEqual(lines);
        expect(table.rows).toBe(lines.length);
        columns.forEach(({ name, cells }, c) => {
          expect(table.columns[c].name).toBe(name);
          const mixed = cells.some((cell) => typeof cell === "string");
          expect(cellsOf(table.columns[c])).toEqual(mixed ? cells.map((cell) => (cell === 1 ? "1" : cell)) : cells);
        });
        const linesOf = (code: string) => table.findings.flatMap((f) => (f.code === code && "lines" in f ? f.lines : []));
        expect(linesOf("short-rows")).toEqual(short);
        expect(linesOf("long-rows")).toEqual(long);
        expect(linesOf("blank-lines")).toEqual(blank);
        expect(linesOf("unreadable-cells")).toEqual([]);
      }),
      { numRuns: 1500 },
    );
  });
  it("and by the plain reader and the general one alike", () => {
    fc.assert(
      fc.property(written, ({ bytes }) => {
        expect(readTable(bytes, { file: "t.csv" })).toEqual(readGeneral(bytes, { file: "t.csv" }));
      }),
      { numRuns: 1500 },
    );
  });
});

describe("reading", () => {
  it("answers any bytes with a table or a problem, never an exception, and both readers alike", () => {
    const soup = fc.string({ unit: fc.constantFrom(...'"",;\t|\n\r 1.2e-x\u00a0é\u2212\ufeff'), maxLength: 60 });
    const bytes = fc.oneof(
      fc.uint8Array({ maxLength: 60 }),
      fc
        .tuple(soup, fc.constantFrom("utf-8", "utf-8 mark", "utf-16le", "utf-16be"))
        .map(([text, encoding]) => encode(text, encoding)),
      soup.map((text) => encode(`a,b\n${text}`, "utf-8")),
    );
    fc.assert(
      fc.property(bytes, (given) => {
        const result = readTable(given, { file: "t.csv" });
        expect(result).toEqual(readGeneral(given, { file: "t.csv" }));
        if (!result.ok) return;
        const { table } = result;
        expect(new Set(table.columns.map((c) => c.name)).size).toBe(table.columns.length);
        for (const column of table.columns) {
          if ("values" in column) {
            expect(column.values.length).toBe(table.rows);
            expect(column.values.every((v) => Number.isNaN(v) || Number.isFinite(v))).toBe(true);
          } else {
            expect(column.codes.length).toBe(table.rows);
            expect(column.codes.every((code) => code >= -1 && code < column.levels.length)).toBe(true);
            expect(new Set(column.codes).size - (column.codes.includes(-1) ? 1 : 0)).toBe(column.levels.length);
            expect(column.levels.every((level) => level === level.trim() && level !== "")).toBe(true);
          }
        }
        expect([...table.lines].every((line, i, all) => i === 0 || line > all[i - 1])).toBe(true);
      }),
      { numRuns: 4000 },
    );
  });
  it("accounts for every filled cell: read, or listed by its line", () => {
    const cell = fc.constantFrom("1", "2.5", "x", "?", "1e999", "NA", "");
    fc.assert(
      fc.property(fc.array(cell, { minLength: 1, maxLength: 80 }), (cells) => {
        const { columns, findings, lines } = tableOf(read(`a,b\n${cells.map((c) => `1,${c}`).join("\n")}\n`));
        const listed = findings.flatMap((f) => ("lines" in f ? f.lines : []));
        const lost = cellsOf(columns[1]).flatMap((value, i) =>
          value === null && cells[i] !== "" && cells[i] !== "NA" ? [lines[i]] : [],
        );
        expect(listed.sort((a, b) => a - b)).toEqual(lost);
      }),
    );
  });
  it("takes a plan's missing marks beside the default ones, or instead of them", () => {
    const text = "a,b\n1,n/k\n2,N/K \n3,NA\n4,-99\n5,-99.0\n6,x\n";
    const cells = (missing: Parameters<typeof read>[1]) => cellsOf(tableOf(read(text, missing)).columns[1]);
    expect(cells(undefined)).toEqual(["n/k", "N/K", null, "-99", "-99.0", "x"]);
    expect(cells(["n/k", " -99 "])).toEqual([null, null, null, null, null, "x"]);
    expect(cells({ only: ["N/k"] })).toEqual([null, null, "NA", "-99", "-99.0", "x"]);
    expect(cellsOf(tableOf(read("a,b\n1,\n2,NA\n", { only: [] })).columns[1])).toEqual([null, "NA"]);
  });
  it("reads 5,000 columns, and refuses more than a table has", () => {
    const row = (n: number, cell: (c: number) => string | number) => Array.from({ length: n }, (_, c) => cell(c)).join(",");
    const wide = `${row(5000, (c) => `c${c}`)}\n${row(5000, (c) => c / 8)}\n${row(5000, (c) => `"${c}"`)}\n`;
    const { columns } = tableOf(read(wide));
    expect(columns.length).toBe(5000);
    expect(cellsOf(columns[4999])).toEqual([4999 / 8, 4999]);
    const n = COLUMN_LIMIT + 1;
    expect(read(`${row(n, (c) => `c${c}`)}\n${row(n, (c) => c)}\n`)).toMatchObject({
      ok: false,
      problem: { code: "too-many-columns", columns: n, limit: COLUMN_LIMIT },
    });
  });
  it("names the file, its size and its fingerprint", () => {
    const bytes = new TextEncoder().encode("abc");
    // FIPS 180-2, appendix B.1
    expect(fingerprint(bytes)).toBe("ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
    const table = tableOf(read("a,b\n1,2\n"));
    expect(table.source).toEqual({ file: "heating.csv", bytes: 8, sha256: fingerprint(new TextEncoder().encode("a,b\n1,2\n")) });
    expect(read("")).toEqual({ ok: false, problem: { code: "file-empty", file: "heating.csv" } });
  });
  it("keeps a mixed file's rows where they are", () => {
    expect(shown(read("a;b\n1;x\n2,5;y\n"))).toEqual({
      columns: { a: ["number", 1, 2.5], b: ["category", "x", "y"] },
      lines: [2, 3],
      findings: [{ code: "decimal-comma" }],
    });
  });
});
