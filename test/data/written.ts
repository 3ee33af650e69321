import fc from "fast-check";

/** A table as it was meant, and one of the many files that say so. */
export interface Written {
  bytes: Uint8Array;
  /** Meant cells by column, null where missing. */
  columns: { name: string; cells: (number | string | null)[] }[];
  /** Line on which each row starts. */
  lines: number[];
  short: number[];
  long: number[];
  blank: number[];
}

const SEPARATORS = [",", ";", "\t", "|"] as const;
const MARKS = ["", "NA", "n/a", "NaN", "null", ".", "-", "#N/A"];

// A leading letter keeps a word from being a number, a date or a mark; lone surrogates and zero characters are no text.
const word = fc
  .oneof(
    fc.string({ unit: "binary", maxLength: 5 }),
    fc.string({ unit: fc.constantFrom(",", ";", "\t", "|", '"', "\n", " ", "a", "é", "1"), maxLength: 6 }),
  )
  .map((tail) => `w${tail.replace(/[\0\r]/g, "")}`.trim());
const amount = fc.oneof(
  fc.double({ noNaN: true, noDefaultInfinity: true }),
  fc.integer(),
  fc.constantFrom(0, -0, 0.1, 1234, 1e21),
);

type Kind = "amount" | "word";

/** How one file is written: everything a reader has to find out for itself. */
const manner = fc.record({
  separator: fc.constantFrom(...SEPARATORS),
  end: fc.constantFrom("\n", "\r\n", "\r"),
  encoding: fc.constantFrom<"utf-8" | "utf-8 mark" | "utf-16le" | "utf-16be">("utf-8", "utf-8 mark", "utf-16le", "utf-16be"),
  comma: fc.boolean(),
  lastEnd: fc.boolean(),
  /** Free choices while writing, used in turn. */
  dice: fc.array(fc.nat(99), { minLength: 16, maxLength: 64 }),
  /** Whether rows may be short, long or blank. */
  ragged: fc.boolean(),
});

export const written: fc.Arbitrary<Written> = fc
  .tuple(
    fc.array(fc.constantFrom<Kind>("amount", "word"), { minLength: 2, maxLength: 5 }),
    fc.integer({ min: 1, max: 12 }),
    manner,
  )
  .chain(([kinds, rows, how]) =>
    fc
      .tuple(
        ...kinds.map((kind) =>
          fc.array(fc.option<number | string>(kind === "amount" ? amount : word, { freq: 6 }), {
            minLength: rows,
            maxLength: rows,
          }),
        ),
      )
      .map((cells) => write(cells, how)),
  );

function write(cells: (number | string | null)[][], how: typeof manner extends fc.Arbitrary<infer T> ? T : never): Written {
  let turn = 0;
  const roll = (sides: number) => how.dice[turn++ % how.dice.length] % sides;
  const comma = how.comma && how.separator === ";";
  const quote = (text: string) => `"${text.replaceAll('"', '""')}"`;
  const cellText = (cell: number | string | null): string => {
    const text = cell === null ? MARKS[roll(MARKS.length)] : typeof cell === "number" ? amountText(cell, comma) : cell;
    const must = text.includes(how.separator) || text.includes("\n") || text.startsWith('"');
    const pad = () => " ".repeat(Math.max(0, roll(8) - 5));
    return pad() + (must || roll(4) === 0 ? quote(text) : text) + pad();
  };
  const names = cells.map((_, c) => `name ${c}`);
  const out: string[] = [names.map((name) => (roll(3) === 0 ? quote(name) : name)).join(how.separator)];
  const kept: number[] = [];
  const written: Omit<Written, "bytes" | "columns"> = { lines: [], short: [], long: [], blank: [] };
  let line = 2;
  cells[0].forEach((_, r) => {
    const row = cells.map((column) => column[r]);
    const fate = how.ragged && r > 0 ? roll(8) : 7;
    if (fate === 0) {
      out.push(" ".repeat(roll(3)));
      written.blank.push(line++);
    }
    let texts = row.map(cellText);
    if (fate === 1) {
      texts = [...texts, "1"];
      written.long.push(line);
    } else {
      if (fate === 2) {
        texts = ["1", ...texts.slice(1, -1)];
        cells[0][r] = 1;
        cells[cells.length - 1][r] = null;
        written.short.push(line);
      }
      kept.push(r);
      written.lines.push(line);
    }
    out.push(texts.join(how.separator));
    line += 1 + texts.join("").split("\n").length - 1;
  });
  const text = out.join("\n").replaceAll("\n", how.end) + (how.lastEnd ? how.end : "");
  return {
    ...written,
    bytes: encode(text, how.encoding),
    columns: names.map((name, c) => ({ name, cells: kept.map((r) => cells[c][r]) })),
  };
}

function amountText(value: number, comma: boolean): string {
  const text = Object.is(value, -0) ? "-0" : String(value);
  return comma ? text.replace(".", ",") : text;
}

export function encode(text: string, encoding: "utf-8" | "utf-8 mark" | "utf-16le" | "utf-16be"): Uint8Array {
  if (encoding === "utf-8") return Buffer.from(text);
  const marked = `\ufeff${text}`;
  if (encoding === "utf-8 mark") return Buffer.from(marked);
  const bytes = Buffer.from(marked, "utf16le");
  return encoding === "utf-16le" ? bytes : bytes.swap16();
}
