/** The separators a file may use. */
export const SEPARATORS = [",", ";", "\t", "|"] as const;
export type Separator = (typeof SEPARATORS)[number];

/** Lines looked at. */
const LOOK = 50;

/**
 * The separator that splits the first lines into the most cells alike: the one with the largest number of cells in the header among those
 * that most lines agree with; the comma where none splits anything. Quoted text does not count.
 */
export function findSeparator(text: string): Separator {
  let best: Separator = ",";
  let bestScore = 0;
  const lines = firstLines(text);
  for (const separator of SEPARATORS) {
    const counts = lines.map((line) => line.filter((c) => c === separator).length);
    if (counts.length === 0 || counts[0] === 0) continue;
    const alike = counts.filter((c) => c === counts[0]).length / counts.length;
    const score = alike * (1 + Math.min(counts[0], 20) / 1000);
    if (score > bestScore) [best, bestScore] = [separator, score];
  }
  return best;
}

/** The unquoted characters of the first lines, blank ones left out. */
function firstLines(text: string): string[][] {
  const lines: string[][] = [[]];
  let quoted = false;
  for (let i = 0; i < text.length && lines.length <= LOOK; i++) {
    const c = text[i];
    if (c === '"') quoted = !quoted;
    else if (!quoted && (c === "\n" || c === "\r")) {
      if (lines[lines.length - 1].length > 0) lines.push([]);
    } else if (!quoted) lines[lines.length - 1].push(c);
    else lines[lines.length - 1].push("");
  }
  return lines.filter((line) => line.length > 0);
}
