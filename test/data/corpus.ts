import type { Shown, ShownColumn } from "./shown";

/** What DESIGN (Data) makes of each file of the corpus; worked out by hand from its bytes. Lines are 2, 3, 4 … where not given. */
export type Expected = (Partial<Shown> & { columns: Record<string, ShownColumn> }) | { problem: string; line?: number };

const flats: Expected = {
  columns: { flat: ["number", 1, 2, 3], kwh: ["number", 5120.5, null, 7040], tenure: ["category", "rented", "owned", "rented"] },
};
const plain: Expected = { columns: { flat: ["number", 1, 3], kwh: ["number", 2, 4] } };
const upTo = (n: number, cell: (i: number) => number | string | null = (i) => i): (number | string | null)[] =>
  Array.from({ length: n }, (_, i) => cell(i + 1));
const word = (i: number) => `n${((i - 1) * 7) % 31}`;

export const CORPUS: Record<string, Expected> = {
  // — encodings —
  "utf8.csv": flats,
  "utf8-bom.csv": flats,
  "two-marks.csv": plain,
  "utf16le-bom.csv": flats,
  "utf16be-bom.csv": flats,
  "utf16le.csv": flats,
  "utf16be.csv": flats,
  "utf16le-greek.csv": {
    columns: { διαμέρισμα: ["number", 1, 2], κατανάλωση: ["number", 5, null], κατάσταση: ["category", "νοίκι", "ιδιόκτητο"] },
  },
  "bad-utf8.csv": { problem: "bad-encoding", line: 3 },
  "bad-utf8-cr.csv": { problem: "bad-encoding", line: 4 },
  "bad-utf8-number.csv": { problem: "bad-encoding", line: 3 },
  "bad-utf16.csv": { problem: "bad-encoding", line: 2 },
  "odd-utf16.csv": { problem: "bad-encoding", line: 3 },
  "nul.csv": { problem: "bad-encoding", line: 3 },
  "zip.csv": { problem: "bad-encoding", line: 2 },
  // — line ends —
  "cr.csv": plain,
  "crlf.csv": plain,
  "no-last-end.csv": plain,
  "last-cr.csv": plain,
  "mixed-ends.csv": { columns: { flat: ["number", 1, 3, 5, 7], kwh: ["number", 2, 4, 6, 8] } },
  // — separators and decimal marks —
  "bar.csv": plain,
  "tab.csv": { columns: { flat: ["number", 1, 3], kwh: ["category", "2,5", null], note: ["category", "a, b", "c\td"] } },
  "separator-in-cells.csv": { columns: { flat: ["number", 1, 2, 3], place: ["category", "a, b", "c, d, e", "f"] } },
  "semicolon-comma.csv": {
    columns: { flat: ["number", 1, 2, 3], kwh: ["number", 5120.5, -32.5, 7], floor: ["number", 1234.5, 12_000, 0.5] },
    findings: [{ code: "thousands-marks", column: "floor" }, { code: "decimal-comma" }],
  },
  "semicolon-point.csv": { columns: { flat: ["number", 1, 2], kwh: ["number", 5120.5, 3.25] } },
  "semicolon-thousands.csv": {
    columns: { flat: ["number", 1, 2], kwh: ["number", 1234, 12_000], price: ["number", 1.5, 2.25] },
    findings: [{ code: "thousands-marks", column: "kwh" }],
  },
  "semicolon-disagree.csv": { columns: { flat: ["number", 1, 2], kwh: ["category", "1,5", "1.5"] } },
  "semicolon-either.csv": {
    columns: { flat: ["number", 1, 2], kwh: ["number", 1.234, 5.678] },
    findings: [{ code: "decimal-comma" }],
  },
  // — quotes —
  "quoted-newlines.csv": {
    columns: {
      flat: ["number", 1, 2, 3, 4, 5],
      note: ["category", "two\nlines", 'a "quoted" word', "x, y", null, "z"],
      kwh: ["number", 5, 6, 7, 8, 9],
    },
    lines: [2, 4, 5, 6, 10],
  },
  "quoted-header.csv": { columns: { flat: ["number", 1, 3], "kwh, winter": ["number", 2, 4] } },
  "blank-before-quote.csv": {
    columns: { flat: ["number", 1, 2, 3, 4, 5], note: ["category", "a, b", "c", 'd "e" f', "g\nh", "i"] },
    lines: [2, 3, 4, 5, 7],
  },
  "inch.csv": { columns: { flat: ["number", 1, 2, 3], pipe: ["category", '5" pipe', '6" pipe', '7" pipe'] } },
  "open-quote.csv": { problem: "open-quote", line: 3 },
  "open-quote-header.csv": { problem: "open-quote", line: 1 },
  "lone-quote.csv": { problem: "open-quote", line: 2 },
  "stray-quote.csv": { problem: "stray-quote", line: 3 },
  "swallowing-quote.csv": { problem: "stray-quote", line: 2 },
  // — rows —
  "short-rows.csv": {
    columns: {
      flat: ["number", 1, 3, 4, 6],
      kwh: ["number", 2, null, 5, 7],
      tenure: ["category", "rented", null, null, "owned"],
    },
    findings: [{ code: "short-rows", lines: [3, 4] }],
  },
  "long-rows.csv": {
    columns: { flat: ["number", 3, 7], kwh: ["number", 4, 8], tenure: ["category", "owned", "owned"] },
    lines: [3, 5],
    findings: [{ code: "long-rows", lines: [2, 4] }],
  },
  "spare-separators.csv": {
    columns: { flat: ["number", 1, 3, 5], kwh: ["number", 2, 4, null] },
    lines: [2, 3, 5],
    findings: [{ code: "blank-lines", lines: [4] }],
  },
  "all-long.csv": { problem: "no-data-rows" },
  "blank-lines.csv": {
    columns: { flat: ["number", 1, null, 3], kwh: ["number", 2, null, 4] },
    lines: [5, 7, 8],
    findings: [{ code: "blank-lines", lines: [1, 2, 4, 6] }],
  },
  "empty.csv": { problem: "file-empty" },
  "only-bom.csv": { problem: "file-empty" },
  "only-blanks.csv": { problem: "no-data-rows" },
  "header-only.csv": { problem: "no-data-rows" },
  "header-only-no-end.csv": { problem: "no-data-rows" },
  "one-column.csv": { columns: { kwh: ["number", 1, 2] } },
  "title-line.csv": { columns: { "Winter heating 2023": ["category", "flat,kwh", "1,2"] } },
  // — headers —
  "headers.csv": {
    columns: {
      dose: ["number", 1],
      "column 2 (again)": ["number", 2],
      "dose (3)": ["number", 3],
      kwh: ["number", 4],
      "dose (5)": ["number", 5],
      "column 2": ["number", 6],
      "column 7": ["number", 7],
      "column 8": ["number", 8],
    },
    findings: [
      { code: "empty-header", column: "column 2 (again)" },
      { code: "duplicate-header", column: "dose (3)", original: "dose" },
      { code: "duplicate-header", column: "dose (5)", original: "dose" },
      { code: "empty-header", column: "column 7" },
      { code: "empty-header", column: "column 8" },
    ],
  },
  "headers-clash.csv": {
    columns: { a: ["number", 1], "a (2) (again)": ["number", 2], "a (2)": ["number", 3], A: ["number", 4] },
    findings: [{ code: "duplicate-header", column: "a (2) (again)", original: "a" }],
  },
  "prototype.csv": {
    columns: {
      ["__proto__"]: ["number", 1, 3],
      constructor: ["number", 2, 4] as ShownColumn,
      toString: ["category", "hasOwnProperty", "__proto__"] as ShownColumn,
    },
  },
  "hostile.csv": {
    columns: {
      "<img src=x onerror=alert(1)>": ["category", "=1+1"],
      "a|b": ["category", "line\nend"],
      "`c`": ["category", "</script>"],
      "=cmd()": ["number", -2],
    },
  },
  // — missing cells —
  "missing.csv": { columns: { a: ["number", ...upTo(10)], b: ["category", ...upTo(8, () => null), "none", "99"] } },
  "all-missing.csv": { columns: { flat: ["number", 1, 2], kwh: ["number", null, null] } },
  "wide-blanks.csv": { columns: { flat: ["number", 1, 2, 3], tenure: ["category", "rented", "rented", "owned"] } },
  // — numbers —
  "thousands.csv": {
    columns: { flat: ["number", 1, 2, 3, 4], kwh: ["number", 1234.5, 999, -12_345_678, 2000] },
    findings: [{ code: "thousands-marks", column: "kwh" }],
  },
  "thousands-mixed.csv": { columns: { flat: ["number", 1, 2, 3], kwh: ["category", "1,234", "1500", "900"] } },
  "thousands-mixed-many.csv": {
    columns: { flat: ["number", ...upTo(20)], kwh: ["number", ...upTo(19, (i) => 1000 + i), null] },
    findings: [{ code: "unreadable-cells", column: "kwh", lines: [21], examples: ["1,234"] }],
  },
  "thousands-odd.csv": { columns: { flat: ["number", 1, 2, 3], kwh: ["category", "0,123", "12,34", "1234,567"] } },
  "one-in-twenty.csv": {
    columns: { flat: ["number", ...upTo(20)], kwh: ["number", ...upTo(20, (i) => (i === 7 ? null : 10 * i))] },
    findings: [{ code: "unreadable-cells", column: "kwh", lines: [8], examples: ["unread"] }],
  },
  "two-in-twenty.csv": {
    columns: {
      flat: ["number", ...upTo(20)],
      kwh: ["category", ...upTo(20, (i) => (i === 7 || i === 9 ? "unread" : String(10 * i)))],
    },
  },
  "one-in-nineteen.csv": {
    columns: { flat: ["number", ...upTo(19)], kwh: ["category", ...upTo(19, (i) => (i === 7 ? "unread" : String(10 * i)))] },
  },
  "number-forms.csv": {
    columns: {
      form: [
        "category",
        ...["1e5", "+3", ".5", "5.", "-0", "1E-3", "\u22124", "007", "1e400", "-1e999", "1e-400", "0.1", "123456789012345678"],
        ...["0.30000000000000004", "4.9e-324", "1.7976931348623157e308", "2.2250738585072011e-308", "9007199254740993"],
        ...upTo(100, () => "x"),
      ],
      value: [
        "number",
        ...[100_000, 3, 0.5, 5, -0, 0.001, -4, 7, null, null, 0, 0.1, 123456789012345680, 0.30000000000000004, 5e-324],
        ...[Number.MAX_VALUE, 2.225073858507201e-308, 9007199254740992],
        ...upTo(100, (i) => i - 1),
      ],
    },
    findings: [{ code: "beyond-double-range", column: "value", lines: [10, 11] }],
  },
  "no-numbers.csv": {
    columns: {
      a: ["category", "0x1f", "0b1"],
      b: ["category", "1_000", "2_000"],
      c: ["category", "\uff11\uff12", "\uff13"],
      d: ["category", "1 000", "2 000"],
      e: ["category", "5%", "6%"],
      f: ["category", "Infinity", "inf"],
      g: ["category", "1e", "--1"],
    },
  },
  "infinity.csv": {
    columns: {
      flat: ["number", ...upTo(40)],
      kwh: ["number", ...upTo(40, (i) => (i === 3 || i === 5 || i === 30 ? null : i))],
    },
    findings: [
      { code: "unreadable-cells", column: "kwh", lines: [4, 31], examples: ["Infinity", "-inf"] },
      { code: "beyond-double-range", column: "kwh", lines: [6] },
    ],
  },
  // — dates: days from R 4.2.2, as.numeric(as.Date("2024-02-29")) and so on —
  "dates.csv": { columns: { flat: ["number", ...upTo(7)], start: ["date", 19782, 0, -1, -719468, 11016, 19727, null] } },
  "dates-bad.csv": {
    columns: { flat: ["number", ...upTo(20)], start: ["date", ...upTo(20, (i) => (i === 4 ? null : 19398 + (i % 10)))] },
    findings: [{ code: "unreadable-cells", column: "start", lines: [5], examples: ["2023-02-29"], dates: true }],
  },
  "date-times.csv": { columns: { flat: ["number", 1, 2], start: ["category", "2024-02-29T12:30", "2024-02-29T00:00"] } },
  "no-dates.csv": {
    columns: {
      flat: ["number", ...upTo(5)],
      start: ["category", "1900-02-29", "2024-13-01", "2024-04-31", "24-01-01", "2024-1-1"],
    },
  },
  // — words —
  "yes-no.csv": {
    columns: {
      a: ["yes/no", "yes", "No", "yes"],
      b: ["yes/no", "TRUE", "false", null],
      c: ["yes/no", "y", "n", "n"],
      d: ["number", 1, 0, 1],
      e: ["category", "yes", "Yes", "yes"],
    },
  },
  "text.csv": { columns: { flat: ["number", ...upTo(31, (i) => i - 1)], note: ["text", ...upTo(31, word)] } },
  "many-levels.csv": {
    columns: {
      flat: ["number", ...upTo(41, (i) => i - 1)],
      note: ["category", ...upTo(31, word), ...upTo(10, () => "n1")],
    },
  },
  "natural.csv": {
    columns: {
      flat: ["number", ...upTo(15, () => 1)],
      level: [
        "category",
        ...["b10", "B9", "b9", "a", "10th", "9th", "b09", "b1.10", "b1.9", "\u00c4", "z", "\u{1f600}", "\uffee", null, "b"],
      ],
    },
  },
  "word-after-look.csv": {
    columns: {
      flat: ["number", ...upTo(600, (i) => i - 1)],
      kwh: ["category", ...upTo(600, (i) => (i <= 400 ? String(i - 1) : "w"))],
    },
  },
};
