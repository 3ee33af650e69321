import type { Problem } from "../engine/findings";
import { closingQuote } from "./separator";

/**
 * Makes sure that every quoted cell is whole before the text is split: a quote that never closes, or that something other than a separator follows,
 * would make the splitter swallow rows. Blanks before an opening quote are taken off, so that `a, "b, c"` has two cells.
 * A quote inside an unquoted cell (`5" pipe`) is an ordinary character.
 * @param text with line feeds; @param separator null for one column
 */
export function checkQuotes(
  text: string,
  separator: string | null,
): { ok: true; text: string } | { ok: false; problem: Problem } {
  const parts: string[] = [];
  let kept = 0; // text before this is in `parts`
  let at = 0; // where to look for the next quote
  for (;;) {
    const open = text.indexOf('"', at);
    if (open < 0) break;
    const from = blanksBefore(text, open, at, separator);
    if (from > 0 && text[from - 1] !== "\n" && text[from - 1] !== separator) {
      at = open + 1;
      continue;
    }
    const close = closingQuote(text, open);
    if (close < 0) return { ok: false, problem: { code: "open-quote", line: lineAt(text, open) } };
    let next = close + 1;
    while (isBlank(text[next], separator)) next++;
    if (next < text.length && text[next] !== "\n" && text[next] !== separator) {
      return { ok: false, problem: { code: "stray-quote", line: lineAt(text, open) } };
    }
    if (from < open || next > close + 1) {
      parts.push(text.slice(kept, from), text.slice(open, close + 1));
      kept = next;
    }
    at = next;
  }
  return { ok: true, text: parts.length === 0 ? text : parts.join("") + text.slice(kept) };
}

/** Start of the run of blanks that ends at `end`, not before `least`. */
function blanksBefore(text: string, end: number, least: number, separator: string | null): number {
  let from = end;
  while (from > least && isBlank(text[from - 1], separator)) from--;
  return from;
}

const isBlank = (c: string | undefined, separator: string | null): boolean => (c === " " || c === "\t") && c !== separator;

function lineAt(text: string, end: number): number {
  let line = 1;
  for (let i = text.indexOf("\n"); i >= 0 && i < end; i = text.indexOf("\n", i + 1)) line++;
  return line;
}
