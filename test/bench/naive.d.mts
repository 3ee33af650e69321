export function naiveRefit(
  y: Float64Array,
  columns: readonly Float64Array[],
): { readonly estimate: number; readonly standardError: number };
