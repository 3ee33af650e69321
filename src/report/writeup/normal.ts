/**
 * A block's text as it is compared: what a formatter changes without changing what is said is taken out. Line ends, blanks at line ends and
 * between words, where a paragraph is broken, the mark of a list, a table's padding and the dashes of its rule.
 */
export function normalText(text: string): string {
  const parts: string[] = [];
  let open = false; // the last part is a paragraph or an item that the next line may continue
  for (const raw of text.split(/\r\n|\n|\r/)) {
    const line = raw.replace(/[ \t]+/g, " ").trim();
    if (line === "") open = false;
    else if (line.startsWith("|")) {
      parts.push(tableRow(line));
      open = false;
    } else if (/^[-*+] /.test(line)) {
      parts.push(`- ${line.slice(2)}`);
      open = true;
    } else if (open) parts[parts.length - 1] += ` ${line}`;
    else {
      parts.push(line);
      open = true;
    }
  }
  return parts.join("\n\n");
}

/** Cells without padding. Our own cells hold no bar: it is written as a character reference. */
function tableRow(line: string): string {
  const cells = line
    .replace(/^\||\|$/g, "")
    .split("|")
    .map((cell) => cell.trim());
  const rule = cells.every((cell) => /^:?-+:?$/.test(cell));
  return `|${(rule ? cells.map((cell) => cell.replace(/-+/, "-")) : cells).join("|")}|`;
}
