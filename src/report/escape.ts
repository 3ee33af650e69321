/**
 * Text that shows as itself inside a table cell or a paragraph: what Markdown or HTML would act on becomes a character reference, which no
 * renderer reads as markup. Line breaks become spaces. An underscore inside a word is left alone, as every renderer leaves it.
 */
export function escapeMarkdown(text: string): string {
  return text
    .replace(/[\r\n\u2028\u2029]+/g, " ")

    .replace(/[\u0000-\u0008\u000b-\u001f\u007f]/g, "")
    .replace(/[&<>|`*[\]\\~$#^{}]|!(?=\[)/g, reference)
    .replace(/(?<![\p{L}\p{N}])_|_(?![\p{L}\p{N}])/gu, reference)
    .replace(/--/g, "-&#45;")
    .replace(/:(?=[a-z0-9_+-]+:)/gi, reference)
    .replace(/\b(https?|ftp|mailto|www)([:.])/gi, (_, scheme: string, c: string) => scheme + reference(c))
    .replace(/(\S)@(?=\S)/g, (_, before: string) => before + reference("@"));
}

/** The same for text that starts a paragraph or a list item, where a leading mark would make a heading, list or quote. */
export function escapeParagraph(text: string): string {
  return escapeMarkdown(text)
    .replace(/^(\s*)([=+\-])/, (_, space: string, c: string) => space + reference(c))
    .replace(/^(\s*\d+)([.)])(?=\s|$)/, (_, digits: string, c: string) => digits + reference(c));
}

const NAMED: Record<string, string> = { "<": "&lt;", ">": "&gt;", "&": "&amp;" };

function reference(c: string): string {
  return NAMED[c] ?? `&#${c.codePointAt(0)};`;
}

/** Text for a terminal or a tab-separated cell: no line breaks, tabs or control characters. */
export function escapePlain(text: string): string {
  return text.replace(/[\u0000-\u001f\u007f-\u009f\u2028\u2029]+/g, " ");
}

/** A cell of words that a spreadsheet would run as a formula gets an apostrophe before it. Not for our own figures, which start with +. */
export function escapeFormula(text: string): string {
  return /^\s*[=@+-]/.test(text) ? `'${text}` : text;
}

/** Text inside an XML element or a quoted attribute. What XML cannot hold at all (control characters, halves of a character) becomes a space. */
export function escapeXml(text: string): string {
  return text
    .replace(
      /[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]|[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/g,
      " ",
    )
    .replace(/[&<>"']/g, (c) => NAMED[c] ?? `&#${c.codePointAt(0)};`);
}
