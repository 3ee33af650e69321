import { findNodeAtLocation, parseTree } from "jsonc-parser";
import type { Node, ParseError } from "jsonc-parser";

/** A Markdown cell of a notebook, and where its source stands in the file. */
export interface Cell {
  /** 1-based, among all cells. */
  readonly number: number;
  readonly text: string;
  readonly source: Node;
}

/** The Markdown cells of a notebook's file (nbformat 4); null where it is none. */
export function markdownCells(file: string): Cell[] | null {
  const errors: ParseError[] = [];
  const root = parseTree(file.replace(/^\uFEFF/, " "), errors);
  const cells = root && errors.length === 0 ? findNodeAtLocation(root, ["cells"]) : undefined;
  if (!root || cells?.type !== "array" || findNodeAtLocation(root, ["nbformat"])?.value !== 4) return null;
  return (cells.children ?? []).flatMap((cell, i) => {
    const source = cell.type === "object" ? findNodeAtLocation(cell, ["source"]) : undefined;
    if (!source || findNodeAtLocation(cell, ["cell_type"])?.value !== "markdown") return [];
    const text = sourceText(source);
    return text === null ? [] : [{ number: i + 1, text, source }];
  });
}

/** The file with other texts in some of its cells; everything else (outputs, layout) stays byte for byte. */
export function withTexts(file: string, changes: readonly { readonly cell: Cell; readonly text: string }[]): string {
  let out = "";
  let from = 0;
  for (const { cell, text } of changes) {
    const { offset, length } = cell.source;
    out += file.slice(from, offset) + sourceJson(file, cell.source, text);
    from = offset + length;
  }
  return out + file.slice(from);
}

/** A string, or a list of strings that are joined as they are. */
function sourceText(source: Node): string | null {
  if (source.type === "string") return source.value as string;
  const lines = source.children ?? [];
  return source.type === "array" && lines.every((line) => line.type === "string")
    ? lines.map((l) => l.value as string).join("")
    : null;
}

/** The text in the form the cell had it: one string, or a list of lines laid out as its first line was. */
function sourceJson(file: string, source: Node, text: string): string {
  if (source.type === "string") return JSON.stringify(text);
  const lines = (text.match(/[^\n]*\n|[^\n]+$/g) ?? []).map((line) => JSON.stringify(line));
  const first = source.children?.[0];
  const lead = first ? file.slice(source.offset + 1, first.offset) : "";
  const last = source.children?.at(-1);
  const trail = last ? file.slice(last.offset + last.length, source.offset + source.length - 1) : "";
  return `[${lead}${lines.join(`,${lead === "" ? " " : lead}`)}${trail}]`;
}
