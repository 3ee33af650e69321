import { escapeFormula, escapePlain } from "./escape";
import type { Presentation } from "./presentation";

/** The tables as tab-separated text for a spreadsheet: a column naming the contrast first where there are several. */
export function toTabSeparated({ blocks }: Presentation): string {
  const several = blocks.length > 1;
  const words = (cell: string) => escapeFormula(escapePlain(cell));
  const [first] = blocks;
  if (!first) return "";
  const { heads } = first;
  const head = [
    ...(several ? ["contrast"] : []),
    heads.held,
    heads.rows,
    heads.difference,
    heads.shift,
    heads.word,
    "reported",
  ].map(words);
  const rows = blocks.flatMap((block) =>
    block.rows.map((row) => [
      ...(several ? [words(block.contrast)] : []),
      words(row.held),
      row.rows,
      escapePlain(row.difference),
      escapePlain(row.shift),
      row.word,
      row.reported ? "reported" : "",
    ]),
  );
  return `${[head, ...rows].map((cells) => cells.join("\t")).join("\n")}\n`;
}
