import { printParseErrorCode } from "jsonc-parser";
import type { ParseError } from "jsonc-parser";

/** What is wrong with a text that is no JSON, by the parser's code. Comments and a comma after the last item are allowed. */
const WORDS: Readonly<Record<string, string>> = {
  InvalidSymbol: "a word here is not in quotes",
  InvalidNumberFormat: "a number is not written as JSON numbers are",
  PropertyNameExpected: "a key in double quotes is expected here",
  ValueExpected: "a value is expected here",
  ColonExpected: "a colon is expected here",
  CommaExpected: "a comma is expected here",
  CloseBraceExpected: "a closing brace } is missing",
  CloseBracketExpected: "a closing bracket ] is missing",
  EndOfFileExpected: "there is more after the plan's closing brace",
  InvalidCommentToken: "a comment begins with // or /*",
  UnexpectedEndOfComment: "a comment is not closed",
  UnexpectedEndOfString: "a closing quote is missing",
  UnexpectedEndOfNumber: "a number breaks off",
  InvalidUnicode: "a \\u escape is not four hexadecimal digits",
  InvalidEscapeCharacter: "a backslash in quotes is followed by a character that cannot follow it; a backslash itself is \\\\",
  InvalidCharacter: "a character here may not stand in a JSON text",
};

export function sayError({ error }: ParseError): string {
  return WORDS[printParseErrorCode(error)] ?? "it is not JSON";
}
