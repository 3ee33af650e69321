import { escapePlain } from "./escape";
import type { ContrastBlock, Presentation } from "./presentation";

/** Columns of a terminal that sentences are broken at. */
const WIDTH = 100;

/** The comparison for a terminal: facts, sentences, aligned tables, notes. */
export function toText(presentation: Presentation): string {
  const parts = [presentation.facts.join(" · "), presentation.readout.map((s) => s.text).join("\n")];
  if (presentation.joint) parts.push(presentation.joint);
  for (const block of presentation.blocks) {
    parts.push(presentation.blocks.length > 1 ? `${block.contrast}\n${table(block)}` : table(block));
    if (block.strip) parts.push(`${block.rows.length} of ${block.strip.items.length} sets are shown.`);
  }
  if (presentation.notes.length > 0) parts.push(presentation.notes.map((note) => `- ${note.text}`).join("\n"));
  return `${parts
    .map((part) =>
      part
        .split("\n")
        .map((line) => wrap(escapePlain(line)))
        .join("\n"),
    )
    .join("\n\n")}\n`;
}

function table({ heads, rows }: ContrastBlock): string {
  const lines = [
    [heads.held, heads.rows, heads.difference, heads.shift, heads.word],
    ...rows.map((row) => [
      row.held,
      row.rows,
      row.difference,
      row.shift,
      `${row.word}${row.reported ? "  < reported" : ""}${row.place ? `  < ${row.place}` : ""}`,
    ]),
  ].map((line) => line.map(escapePlain));
  const widths = lines[0].map((_, c) => Math.max(...lines.map((line) => width(line[c]))));
  const pad = (cell: string, c: number) => {
    const gap = " ".repeat(widths[c] - width(cell));
    return c === 0 || c === 4 ? cell + gap : gap + cell;
  };
  // Non-breaking blanks keep the columns aligned through `wrap`, which only breaks sentences.
  return lines.map((line) => `${TABLE}${line.map(pad).join("   ").trimEnd()}`).join("\n");
}

/** Marks a table's line inside toText; taken off again by `wrap`. */
const TABLE = "\u2060";

function width(text: string): number {
  return [...text].length;
}

function wrap(line: string): string {
  if (line.startsWith(TABLE)) return line.slice(TABLE.length);
  const indent = line.startsWith("- ") ? "  " : "";
  const lines: string[] = [];
  let now = "";
  for (const part of line.split(" ")) {
    if (now !== "" && width(now) + 1 + width(part) > WIDTH) {
      lines.push(now);
      now = indent + part;
    } else now = now === "" ? part : `${now} ${part}`;
  }
  return [...lines, now].join("\n");
}
