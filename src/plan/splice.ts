import { applyEdits, createScanner, findNodeAtLocation, parseTree } from "jsonc-parser";
import type { Edit, Node, SyntaxKind } from "jsonc-parser";
import { rankOf } from "./order";
import type { Path } from "./place";
import type { Step } from "./steps";
import { writeValue } from "./write";

// the package has these as a `const enum`, which a single file cannot take values from
const COMMA: SyntaxKind.CommaToken = 5;
const LINE_COMMENT: SyntaxKind.LineCommentTrivia = 12;
const BLOCK_COMMENT: SyntaxKind.BlockCommentTrivia = 13;
const LINE_BREAK: SyntaxKind.LineBreakTrivia = 14;
const TRIVIA: SyntaxKind.Trivia = 15;
const END: SyntaxKind.EOF = 17;

/**
 * A JSON text after one step, every character the step does not concern left as it was: formatting, order and comments stay. (The edits of
 * jsonc-parser's own `modify` take comments beside a removed entry with them, and hand those beside a last one to the new one.)
 * @param text JSON with comments, without errors
 */
export function splice(text: string, step: Step): string {
  const root = parseTree(text, [], { allowTrailingComma: true })!;
  const parent = findNodeAtLocation(root, step.path.slice(0, -1))!;
  const node = findNodeAtLocation(root, [...step.path]);
  if (step.kind === "remove") return applyEdits(text, removal(text, parent, entryOf(node!)));
  const depth = step.path.length;
  if (step.kind === "set" && node) {
    const { start } = lineOf(text, node.offset);
    const indent = indentAt(text, node.offset);
    const content = writeValue(step.value, { ...layoutOf(text), indent }, depth, node.offset - start - indent.length);
    return applyEdits(text, [{ offset: node.offset, length: node.length, content }]);
  }
  return applyEdits(text, [addition(text, parent, step.path, step.value)]);
}

/** A property with its key; an item by itself. */
const entryOf = (node: Node): Node => (node.parent?.type === "property" ? node.parent : node);

const endOf = ({ offset, length }: Node): number => offset + length;

function addition(text: string, parent: Node, path: Path, value: unknown): Edit {
  const key = path[path.length - 1];
  const entries = parent.children ?? [];
  const after = typeof key === "number" ? entries[key - 1] : siblingBefore(entries, key, path.length - 1);
  const layout = layoutOf(text);
  const lead = typeof key === "number" ? "" : `${JSON.stringify(key)}: `;
  const written = (indent: string) => lead + writeValue(value, { ...layout, indent }, path.length, lead.length);
  const indent = indentAt(text, parent.offset) + layout.step;
  if (entries.length === 0) return into(text, parent, indent, written, layout.end);
  if (after === undefined) {
    const { offset } = entries[0];
    const own = beginsLine(text, offset);
    const here = own ? indentAt(text, offset) : indent;
    return { offset, length: 0, content: written(here) + (own ? `,${layout.end}${here}` : ", ") };
  }
  const own = beginsLine(text, after.offset);
  const here = own ? indentAt(text, after.offset) : indent;
  const comma = commaAfter(text, endOf(after));
  const rest = restOfLine(text, comma === null ? endOf(after) : comma + 1);
  if (comma !== null) {
    if (rest.ends) return { offset: rest.offset, length: 0, content: `${layout.end}${here}${written(here)},` };
    return { offset: comma + 1, length: 0, content: ` ${written(here)},` };
  }
  // the comma goes to the entry, whatever comment follows it
  const between = text.slice(endOf(after), rest.offset);
  const broken = rest.ends && own;
  const content = broken ? `,${between}${layout.end}${here}${written(here)}` : `${between.trimEnd()}, ${written(here)}`;
  if (!broken && rest.ends) return { offset: endOf(after), length: 0, content: `, ${written(here)}` };
  return { offset: endOf(after), length: (broken ? between : between.trimEnd()).length, content };
}

/** The first entry of an empty list or object, behind the comments in it. */
function into(text: string, parent: Node, indent: string, written: (indent: string) => string, end: string): Edit {
  const inner = text.slice(parent.offset + 1, endOf(parent) - 1);
  if (inner.trim() === "") {
    const pad = parent.type === "object" ? " " : "";
    const broken = parent.parent === undefined || /[\r\n]/.test(written(indent));
    const outer = indentAt(text, parent.offset);
    const content = broken ? `${end}${indent}${written(indent)}${end}${outer}` : pad + written(indent) + pad;
    return { offset: parent.offset + 1, length: inner.length, content };
  }
  return { offset: parent.offset + 1 + inner.trimEnd().length, length: 0, content: end + indent + written(indent) };
}

/** The entry a new key is written behind: the last of those that come before it in the order of a plan, else the last. */
function siblingBefore(entries: readonly Node[], key: string, depth: number): Node {
  const before = entries.filter(({ children }) => rankOf(String(children![0].value), depth) < rankOf(key, depth));
  return before[before.length - 1] ?? entries[entries.length - 1];
}

/** Edits that take an entry out with the comma that parted it from the others; comments around it stay. */
function removal(text: string, parent: Node, entry: Node): Edit[] {
  const entries = parent.children!;
  const before = entries[entries.indexOf(entry) - 1] as Node | undefined;
  const comma = commaAfter(text, endOf(entry));
  const own = comma ?? (before ? commaAfter(text, endOf(before)) : null);
  const [from, to] = comma === endOf(entry) ? [entry.offset, comma + 1] : [entry.offset, endOf(entry)];
  const apart = own !== null && own !== endOf(entry) ? [{ offset: own, length: 1, content: "" }] : [];
  if (entries.length === 1 && apart.length === 0) {
    const [left, right] = [parent.offset + 1, endOf(parent) - 1];
    if ((text.slice(left, from) + text.slice(to, right)).trim() === "")
      return [{ offset: left, length: right - left, content: "" }];
  }
  const { start } = lineOf(text, from);
  const rest = restOfLine(text, to);
  const alone = text.slice(start, from).trim() === "";
  if (alone && rest.ends && text.slice(to, rest.offset).trim() === "") {
    // the lines it stood on go as well; the first line of a text has none before it
    const back = start === 0 ? 0 : text.startsWith("\r\n", start - 2) ? 2 : 1;
    return [...apart, { offset: start - back, length: rest.offset - start + back, content: "" }];
  }
  if (comma === null && before && text.slice(endOf(before), from).trim() === ",")
    return [{ offset: endOf(before), length: to - endOf(before), content: "" }];
  const blank = alone || (comma !== null && !rest.ends) ? /^[ \t]*/.exec(text.slice(to))![0].length : 0;
  return [...apart, { offset: from, length: to - from + blank, content: "" }];
}

/** Offset of the comma behind an entry, past comments; null where the list or object ends instead. */
function commaAfter(text: string, offset: number): number | null {
  const scanner = createScanner(text, true);
  scanner.setPosition(offset);
  return scanner.scan() === COMMA ? scanner.getTokenOffset() : null;
}

/** How far comments go on after an offset on its line, and whether the line ends behind them. */
function restOfLine(text: string, offset: number): { readonly offset: number; readonly ends: boolean } {
  const scanner = createScanner(text, false);
  scanner.setPosition(offset);
  let at = offset;
  for (;;) {
    const kind = scanner.scan();
    if (kind === TRIVIA) continue;
    if (kind === LINE_BREAK || kind === END) return { offset: at, ends: true };
    const comment = kind === LINE_COMMENT || kind === BLOCK_COMMENT;
    if (!comment) return { offset: at, ends: false };
    at = scanner.getTokenOffset() + scanner.getTokenLength();
  }
}

function lineOf(text: string, offset: number): { readonly start: number } {
  return { start: Math.max(text.lastIndexOf("\n", offset - 1), text.lastIndexOf("\r", offset - 1)) + 1 };
}

const indentAt = (text: string, offset: number): string => /^[ \t]*/.exec(text.slice(lineOf(text, offset).start))![0];

const beginsLine = (text: string, offset: number): boolean => text.slice(lineOf(text, offset).start, offset).trim() === "";

/** The line end and the step of indentation a text uses; two spaces where it shows none. */
function layoutOf(text: string): { readonly end: string; readonly step: string } {
  return { end: /\r\n|\n|\r/.exec(text)?.[0] ?? "\n", step: /[\r\n]([ \t]+)\S/.exec(text)?.[1] ?? "  " };
}
