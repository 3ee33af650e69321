import type { Finding } from "../../engine/findings";
import type { Column, Table } from "../../engine/table";
import type { Typed } from "../column";
import { nameColumns } from "../headers";
import type { MissingTest } from "../missing";
import { finishNumbers, finishWords } from "./finish";
import { COMMA, LF, textIn } from "./line";
import { lookAt } from "./look";
import type { Look } from "./look";
import type { ReaderMemory } from "./memory";
import { Scanner } from "./scan";

/** Columns read from plain bytes: what the general reader would have made of them, cell for cell. */
export type FastTable = Omit<Table, "source">;

/** Wider files are the general reader's to judge. */
const WIDEST = 20_000;

/**
 * Reads a plain file straight from its bytes: UTF-8, separators , ; tab |, quotes only around a whole cell without a quote or line end inside, LF
 * or CRLF, one decimal mark. Null for anything else: the general reader then takes the file. It is also the judge: tests hold the two equal cell
 * for cell.
 * @param keep arrays to write the columns into (see readTable)
 */
export function readFast(given: Uint8Array, missing: MissingTest, keep?: ReaderMemory): FastTable | null {
  // One class of array only, whatever was handed in: the loops are compiled for it.
  const bytes = new Uint8Array(given.buffer, given.byteOffset, given.byteLength);
  const look = lookAt(bytes);
  if (!look || look.numeric.length > WIDEST) return null;
  const header: string[] = [];
  for (let k = 0; k < look.header.length; k += 2) {
    const text = textIn(bytes, look.header[k], look.header[k + 1]);
    if (text === null) return null;
    header.push(text.trim());
  }
  const { names, findings } = nameColumns(header);
  let outcome = readColumns(bytes, look, names, missing, keep);
  // Columns of words wrongly guessed to be numbers are read again as words, which can hold anything.
  if (outcome !== null && "wrong" in outcome) outcome = readColumns(bytes, withWords(look, outcome.wrong), names, missing, keep);
  return outcome === null || "wrong" in outcome ? null : { ...outcome, findings: [...findings, ...outcome.findings] };
}

function withWords(look: Look, columns: ReadonlySet<number>): Look {
  return { ...look, numeric: look.numeric.map((numeric, c) => (columns.has(c) ? 0 : numeric)) };
}

/** The table, the columns that are no numbers after all, or null where the file is not plain. */
function readColumns(
  bytes: Uint8Array,
  look: Look,
  names: readonly string[],
  missing: MissingTest,
  keep: ReaderMemory | undefined,
): FastTable | { readonly wrong: ReadonlySet<number> } | null {
  const scanner = new Scanner(look, missing, keep);
  const whole = scanAll(scanner, bytes, look.start);
  if (keep) Object.assign(keep, { numbers: scanner.numbers, codes: scanner.codes, lines: scanner.lines });
  const { rows, short, long, blank, wrong } = scanner;
  if (!whole || rows === 0) return null;
  const lines = scanner.lines.subarray(0, rows);
  const findings: Finding[] = [];
  if (short.length > 0) findings.push({ code: "short-rows", lines: short });
  if (long.length > 0) findings.push({ code: "long-rows", lines: long });
  if (blank.length > 0) findings.push({ code: "blank-lines", lines: blank });
  const columns: Column[] = [];
  let { marked } = scanner;
  const add = (typed: Typed) => {
    columns.push(typed.column);
    findings.push(...typed.findings);
  };
  for (let c = 0; c < names.length; c++) {
    if (look.numeric[c]) {
      const typed = wrong.has(c)
        ? null
        : finishNumbers(names[c], scanner.numbers[c].subarray(0, rows), scanner.odd[c], lines, look.decimals);
      if (!typed) wrong.add(c);
      else add(typed);
    } else if (wrong.size === 0) {
      const typed = finishWords(
        names[c],
        scanner.codes[c].subarray(0, rows),
        scanner.words[c].texts(),
        lines,
        missing.isMissing,
        look.decimals,
      );
      if (!typed) return null;
      add(typed);
      marked ||= typed.marked === true;
    }
  }
  if (wrong.size > 0) return { wrong };
  if (marked && look.decimals.mark === COMMA) findings.push({ code: "decimal-comma" });
  return { rows, columns, lines, findings };
}

/** Every line from `start` on. The last one, where it does not end in a line feed, is read from a copy that does. */
function scanAll(scanner: Scanner, bytes: Uint8Array, start: number): boolean {
  const last = bytes.lastIndexOf(LF) + 1;
  if (start < last && !scanner.scan(bytes, start, last)) return false;
  if (last === bytes.length) return true;
  const tail = new Uint8Array(bytes.length - last + 1);
  tail.set(bytes.subarray(last));
  tail[tail.length - 1] = LF;
  return scanner.scan(tail, 0, tail.length);
}
