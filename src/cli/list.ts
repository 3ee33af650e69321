/** The items of a comma-separated list; `\,` is a comma inside an item and `\\` a backslash. Items are trimmed; an empty text has none. */
export function splitList(text: string): string[] {
  if (text.trim() === "") return [];
  const items = [""];
  for (const [piece] of text.matchAll(/\\[\\,]|[\s\S]/gu)) {
    if (piece === ",") items.push("");
    else items[items.length - 1] += piece.length === 2 && piece[0] === "\\" ? piece[1] : piece;
  }
  return items.map((item) => item.trim());
}
