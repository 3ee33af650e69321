/** A place in a text, both counts from 1; characters are UTF-16 units, as editors count them. */
export interface Position {
  readonly line: number;
  readonly character: number;
}

/** Turns offsets of a text into positions. CR, LF and CRLF end a line. */
export function positions(text: string): (offset: number) => Position {
  const starts = [0];
  for (const end of text.matchAll(/\r\n|\r|\n/g)) starts.push(end.index + end[0].length);
  return (offset) => {
    let low = 0;
    let high = starts.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if (starts[middle] <= offset) low = middle;
      else high = middle - 1;
    }
    return { line: low + 1, character: offset - starts[low] + 1 };
  };
}
