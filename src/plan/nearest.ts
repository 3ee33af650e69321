/**
 * The name most like a misspelt one, or null where none is near enough. Case, spaces, `_`, `-` and `.` are ignored; then the fewest edits
 * (insert, delete, replace, swap two neighbours) decide, at most one edit for every three characters typed and never fewer than one
 * allowed; a single character must match. Ties go to the earlier name. Failing that, the only name that begins with what was typed
 * (three characters or more).
 */
export function nearestName(typed: string, names: readonly string[]): string | null {
  const wanted = fold(typed);
  if (wanted === "") return null;
  const limit = Math.min(Math.max(1, Math.floor(wanted.length / 3)), wanted.length - 1);
  let best: string | null = null;
  let fewest = limit + 1;
  for (const name of names) {
    const edits = editsBetween(wanted, fold(name), fewest);
    if (edits < fewest) [best, fewest] = [name, edits];
  }
  if (best !== null || wanted.length < 3) return best;
  const longer = names.filter((name) => fold(name).startsWith(wanted));
  return longer.length === 1 ? longer[0] : null;
}

const fold = (name: string): string =>
  name
    .normalize("NFC")
    .toLowerCase()
    .replace(/[\s_.-]/g, "");

/** Optimal string alignment distance; any figure at or above `enough` may come back as `enough`. */
function editsBetween(a: string, b: string, enough: number): number {
  if (Math.abs(a.length - b.length) >= enough) return enough;
  let twoUp: number[] = [];
  let up = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const same = a[i - 1] === b[j - 1];
      row[j] = Math.min(up[j] + 1, row[j - 1] + 1, up[j - 1] + (same ? 0 : 1));
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) row[j] = Math.min(row[j], twoUp[j - 2] + 1);
    }
    if (Math.min(...row) >= enough) return enough;
    [twoUp, up] = [up, row];
  }
  return up[b.length];
}
