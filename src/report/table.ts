import { escapeFormula, escapePlain } from "./escape";
import type { Presentation } from "./presentation";

/** The tables as tab-separated text for a spreadsheet: a column naming the contrast first where there are several. */
export function toTabSeparated({ blocks }: Presentation): string {
  const several = blocks.length > 1;
  const line = (cells: readonly string[]) => cells.map((cell) => escapeFormula(escapePlain(cell))).join("\t");
  const [first] = blocks;
  if (!first) return "";
  const { heads } = first;
  const head = [...(several ? ["contrast"] : []), heads.held, heads.rows, heads.difference, heads.shift, heads.word, "reported"];
  const rows = blocks.flatMap((block) =>
    block.rows.map((row) => [
      ...(several ? [block.contrast] : []),
      row.held,
      row.rows,
      row.difference,
      row.shift,
      row.word,
      row.reported ? "reported" : "",
    ]),
  );
  return `${[head, ...rows].map(line).join("\n")}\n`;
}
