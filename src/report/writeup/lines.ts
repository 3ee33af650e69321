/** One line of a Markdown document. Offsets are UTF-16 code units into the text. */
export interface Line {
  /** 1-based. */
  readonly number: number;
  readonly start: number;
  /** After the last character, before the line end. */
  readonly end: number;
  readonly text: string;
  /** "\n", "\r\n", "\r", or "" at the end of the text. */
  readonly ending: string;
  /** Part of a fenced code block, its fences too. */
  readonly code: boolean;
}

interface Fence {
  readonly mark: string;
  readonly length: number;
  /** A line that is indented less ends the list item the fence stands in, and the fence with it. */
  readonly indent: number;
  readonly quoted: boolean;
}

/** The lines of a Markdown text, and which of them are fenced code (CommonMark 0.31, 4.5), also in lists and quotations. */
export function linesOf(text: string): Line[] {
  const lines: Line[] = [];
  let fence: Fence | null = null;
  let start = 0;
  for (const match of text.matchAll(/([^\r\n]*)(\r\n|\n|\r|$)/g)) {
    if (match.index !== start || (match[0] === "" && start !== text.length)) continue;
    const [whole, raw, ending] = match;
    const line = start === 0 ? raw.replace(/^\uFEFF/, "") : raw;
    if (fence && endsContainer(fence, line)) fence = null;
    const inside: boolean = fence !== null;
    if (fence) {
      if (closes(fence, line)) fence = null;
    } else fence = opened(line);
    lines.push({
      number: lines.length + 1,
      start: start + raw.length - line.length,
      end: start + raw.length,
      text: line,
      ending,
      code: inside || fence !== null,
    });
    start += whole.length;
    if (ending === "") break;
  }
  return lines;
}

const QUOTE = /^(?: {0,3}> ?)+/;

function opened(line: string): Fence | null {
  const quoted = QUOTE.test(line);
  const plain = line.replace(QUOTE, "");
  const match = /^((?:\s*(?:[-*+]|\d{1,9}[.)])(?=\s))*)(\s*)(`{3,}|~{3,})(.*)$/.exec(plain);
  if (!match) return null;
  const [, items, blanks, mark, rest] = match;
  if (mark[0] === "`" && rest.includes("`")) return null; // a code span
  const column = items.length + blanks.length;
  // without its item on the same line, a deep fence stands in a list or is indented code: both end where the text is at the margin
  const indent = items !== "" ? column : column >= 4 ? 2 : 0;
  return { mark: mark[0], length: mark.length, indent, quoted };
}

function endsContainer({ indent, quoted }: Fence, line: string): boolean {
  if (quoted) return !QUOTE.test(line);
  return line.trim() !== "" && line.length - line.trimStart().length < indent;
}

function closes({ mark, length, quoted }: Fence, line: string): boolean {
  const plain = (quoted ? line.replace(QUOTE, "") : line).trim();
  return plain.length >= length && [...plain].every((c) => c === mark);
}
