/** Quantile of type 7 (Hyndman & Fan 1996). @param sorted ascending, at least one value @param p in [0, 1] */
export function quantile(sorted: Float64Array | readonly number[], p: number): number {
  const at = (sorted.length - 1) * p;
  const below = Math.floor(at);
  const above = Math.min(sorted.length - 1, below + 1);
  const share = at - below;
  return share === 0 ? sorted[below] : sorted[below] * (1 - share) + sorted[above] * share;
}
