const known = new WeakMap<Float64Array, Float64Array>();

/** A modifier's values in ascending order, sorted once for a design's column. Not to be changed. */
export function sortedValues(values: Float64Array): Float64Array {
  let sorted = known.get(values);
  if (!sorted) known.set(values, (sorted = Float64Array.from(values).sort()));
  return sorted;
}

/** How many of ascending values lie below a bound; with `included`, those equal to it too. */
export function countBelow(sorted: Float64Array, bound: number, included = false): number {
  let [low, high] = [0, sorted.length];
  while (low < high) {
    const middle = (low + high) >>> 1;
    if (sorted[middle] < bound || (included && sorted[middle] === bound)) low = middle + 1;
    else high = middle;
  }
  return low;
}
