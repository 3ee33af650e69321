/** p values adjusted by Holm (1979); nulls stay null and do not count. */
export function holm(ps: readonly (number | null)[]): (number | null)[] {
  const known = ps.map((p, i) => ({ p, i })).filter((x): x is { p: number; i: number } => x.p !== null);
  known.sort((a, b) => a.p - b.p);
  const out: (number | null)[] = ps.map(() => null);
  let highest = 0;
  known.forEach(({ p, i }, rank) => {
    highest = Math.max(highest, Math.min(1, p * (known.length - rank)));
    out[i] = highest;
  });
  return out;
}
