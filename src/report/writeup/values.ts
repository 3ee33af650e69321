import type { Found, FoundBroken } from "./find";
import type { Line } from "./lines";
import { readValueMarker } from "./marker";

const VALUE = /^<!--\s*slantwise:value(?:\s([\s\S]*?))?\s*-->$/;
const END = /^<!--\s*\/slantwise:value\s*-->$/;

/** Inline numbers of one paragraph, which may be broken over lines. Code spans and escaped characters are passed over. */
export function findValues(text: string, paragraph: readonly Line[]): Found[] {
  const from = paragraph[0].start;
  const to = paragraph[paragraph.length - 1].end;
  const lineAt = (offset: number) => paragraph.findLast((line) => line.start <= offset)!.number;
  const found: Found[] = [];
  let open: Comment | null = null;
  const broken = ({ start, end }: Comment, reason: FoundBroken["reason"]) =>
    found.push({ kind: "broken", start, end, line: lineAt(start), reason });
  for (const comment of commentsIn(text, from, to)) {
    if (VALUE.test(comment.text)) {
      if (open) broken(open, { code: "value-open" });
      open = comment;
    } else if (END.test(comment.text)) {
      if (!open) broken(comment, { code: "value-end-alone" });
      else {
        const place = { start: open.start, end: comment.end, line: lineAt(open.start) };
        const read = readValueMarker(VALUE.exec(open.text)![1] ?? "");
        found.push(
          read.ok
            ? { kind: "value", ...place, marker: read.marker, text: text.slice(open.end, comment.start) }
            : { kind: "broken", ...place, reason: { code: "marker", of: "value", fault: read.fault } },
        );
        open = null;
      }
    }
  }
  if (open) broken(open, { code: "value-open" });
  return found;
}

interface Comment {
  readonly start: number;
  readonly end: number;
  readonly text: string;
}

/** HTML comments between two offsets, where a code span has not taken them first (CommonMark 0.31, 6.1: the leftmost wins). */
function commentsIn(text: string, from: number, to: number): Comment[] {
  const comments: Comment[] = [];
  const part = text.slice(from, to);
  const special = /\\[\s\S]|`+|<!--/g;
  for (let match = special.exec(part); match; match = special.exec(part)) {
    const [token] = match;
    const start = match.index;
    if (token === "<!--") {
      const close = part.indexOf("-->", start + 4);
      if (close < 0) continue;
      comments.push({ start: from + start, end: from + close + 3, text: part.slice(start, close + 3) });
      special.lastIndex = close + 3;
    } else if (token[0] === "`") {
      const run = new RegExp(`(?<!\`)\`{${token.length}}(?!\`)`, "g");
      run.lastIndex = start + token.length;
      if (run.exec(part)) special.lastIndex = run.lastIndex;
    }
  }
  return comments;
}
