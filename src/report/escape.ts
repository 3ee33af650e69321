/**
 * Text that shows as itself in Markdown: everything Markdown or HTML would act on becomes a character reference, which no renderer reads
 * as markup. Line breaks become spaces.
 */
export function escapeMarkdown(text: string): string {
  return (
    text
      .replace(/[\r\n\u2028\u2029]+/g, " ")
      // eslint-disable-next-line no-control-regex
      .replace(/[\u0000-\u0008\u000b-\u001f\u007f]/g, "")
      .replace(/[&<>|`*_[\]\\~$#^{}!]/g, reference)
      .replace(/^(\s*)([=+\-@])/, (_, space: string, c: string) => space + reference(c))
      .replace(/^(\s*\d+)([.)])(?=\s|$)/, (_, digits: string, c: string) => digits + reference(c))
      .replace(/--/g, "-&#45;")
      .replace(/:(?=[a-z0-9+-]+:)/gi, reference)
      .replace(/\b(https?|ftp|mailto|www)([:.])/gi, (_, scheme: string, c: string) => scheme + reference(c))
      .replace(/(\S)@(?=\S)/g, (_, before: string) => before + reference("@"))
  );
}

function reference(c: string): string {
  return `&#${c.codePointAt(0)};`;
}

/** Text for a terminal or a tab-separated cell: no line breaks, tabs or control characters. */
export function escapePlain(text: string): string {
  // eslint-disable-next-line no-control-regex
  return text.replace(/[\u0000-\u001f\u007f-\u009f\u2028\u2029]+/g, " ");
}

/** A words cell that a spreadsheet would run as a formula gets an apostrophe before it; numbers of ours start with + or − and stay. */
export function escapeFormula(text: string): string {
  return /^[=@+\-\t\r]/.test(text) && !/^[+-][\d.]/.test(text) ? `'${text}` : text;
}
