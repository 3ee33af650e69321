import type { Comparison } from "../engine/comparison";
import { escapeMarkdown, escapeParagraph } from "./escape";
import type { ContrastBlock, Presentation } from "./presentation";

export interface MarkdownOptions {
  /** Date as it is printed, YYYY-MM-DD. */
  readonly date: string;
}

/** The comparison as a person would paste it in a report: the sentences, one table a contrast, and where it came from. */
export function toMarkdown(presentation: Presentation, comparison: Comparison, { date }: MarkdownOptions): string {
  const several = presentation.blocks.length > 1;
  const paragraphs = [escapeParagraph(presentation.readout.map((s) => s.text).join(" "))];
  if (presentation.joint) paragraphs.push(escapeParagraph(presentation.joint));
  for (const block of presentation.blocks) {
    if (several) paragraphs.push(`**${escapeMarkdown(block.contrast)}**`);
    paragraphs.push(table(block));
    if (block.strip) paragraphs.push(escapeParagraph(`${block.rows.length} of ${comparison.sets.length} sets are shown.`));
  }
  const important = presentation.notes.filter((note) => note.important);
  if (important.length > 0) paragraphs.push(important.map((note) => `- ${escapeParagraph(note.text)}`).join("\n"));
  paragraphs.push(escapeParagraph(`${presentation.rows} ${[...presentation.provenance, date].join("; ")}.`));
  return `${paragraphs.join("\n\n")}\n`;
}

function table({ heads, rows }: ContrastBlock): string {
  const cells = rows.map((row) => [
    `${row.held}${row.reported ? " (reported)" : ""}${row.place ? ` (${row.place})` : ""}`,
    row.rows,
    row.difference,
    row.shift,
    row.word,
  ]);
  const line = (row: readonly string[]) => `| ${row.map(escapeMarkdown).join(" | ")} |`;
  const head = [heads.held, heads.rows, heads.difference, heads.shift, heads.word];
  return [line(head), "| :--- | ---: | ---: | ---: | :--- |", ...cells.map(line)].join("\n");
}
