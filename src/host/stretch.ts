/**
 * The one stretch in which two texts differ: where it begins and ends in the first, and what stands there in the second. Never parts the two
 * halves of a character or of a line end, which an editor would move together.
 */
export function stretchOf(
  before: string,
  after: string,
): { readonly from: number; readonly to: number; readonly content: string } {
  const least = Math.min(before.length, after.length);
  let head = 0;
  while (head < least && before[head] === after[head]) head++;
  while (head > 0 && FIRST_HALF.test(before[head - 1])) head--;
  let tail = 0;
  while (tail < least - head && before[before.length - 1 - tail] === after[after.length - 1 - tail]) tail++;
  while (tail > 0 && SECOND_HALF.test(before[before.length - tail])) tail--;
  return { from: head, to: before.length - tail, content: after.slice(head, after.length - tail) };
}

const FIRST_HALF = /[\r\uD800-\uDBFF]/;
const SECOND_HALF = /[\n\uDC00-\uDFFF]/;
