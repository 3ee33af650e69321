/** The separators a file may use. */
export const SEPARATORS = [",", ";", "\t", "|"] as const;
export type Separator = (typeof SEPARATORS)[number];

/** Line ends looked at. */
export const SEPARATOR_LINES = 50;

/**
 * The separator of a file, or null where none of them stands in its header: one column. Among those that do, the one for which most of the
 * first lines have as many cells as the header; of several such, the one with the most cells. Quoted text does not count.
 * @param text with line feeds; its first `SEPARATOR_LINES` line ends outside quotes are enough
 */
export function findSeparator(text: string): Separator | null {
  const lines = countSeparators(text);
  let best: Separator | null = null;
  let bestScore = 0;
  SEPARATORS.forEach((separator, s) => {
    const header = lines.length > 0 ? lines[0][s] : 0;
    if (header === 0) return;
    const alike = lines.reduce((sum, counts) => sum + (counts[s] === header ? 1 : 0), 0) / lines.length;
    const score = alike + Math.min(header, 20) / 1000;
    if (score > bestScore) [best, bestScore] = [separator, score];
  });
  return best;
}

/** For each of the first lines that are not blank how often each separator stands in it outside quotes. */
function countSeparators(text: string): number[][] {
  const lines: number[][] = [];
  let counts = SEPARATORS.map(() => 0);
  let atCellStart = true; // only blanks since the last separator or line end: a quote here opens a quoted cell
  let blank = true;
  let ends = 0;
  const endLine = () => {
    if (!blank) lines.push(counts);
    counts = SEPARATORS.map(() => 0);
    atCellStart = blank = true;
  };
  for (let i = 0; i < text.length && ends < SEPARATOR_LINES; i++) {
    const c = text[i];
    if (c === "\n") {
      endLine();
      ends++;
      continue;
    }
    const s = (SEPARATORS as readonly string[]).indexOf(c);
    if (s >= 0) {
      counts[s]++;
      atCellStart = true;
      blank = false;
    } else if (c === '"' && atCellStart) {
      i = closingQuote(text, i);
      if (i < 0) break;
      atCellStart = blank = false;
    } else if (c !== " ") atCellStart = blank = false;
  }
  endLine();
  return lines;
}

/** Where the quote opened at `open` closes: at the first quote that is not doubled; −1 where it never does. */
export function closingQuote(text: string, open: number): number {
  for (let at = text.indexOf('"', open + 1); at >= 0; at = text.indexOf('"', at + 2)) {
    if (text[at + 1] !== '"') return at;
  }
  return -1;
}
