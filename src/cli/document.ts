import { statSync } from "node:fs";
import { Refusal } from "./refusal";
import { readBytes } from "./read";
import { say } from "./sentences";
import { sayProblem } from "../report/wording/problem";
import { writeFile } from "./write";

/** A Markdown document as text; writing it puts the same bytes back where the text is the same. */
export interface Document {
  readonly path: string;
  readonly text: string;
}

/** @throws Refusal for a path that is no Markdown document's */
export function documentPath(path: string): string {
  if (!/\.(md|markdown|qmd|rmd)$/i.test(path)) throw new Refusal(say.notDocument(path));
  return path;
}

/** @throws Refusal where there is no such document, or it is no UTF-8 */
export function readDocument(path: string): Document {
  const read = readBytes(documentPath(path), path);
  if (!read.ok) throw new Refusal(sayProblem(read.problem));
  try {
    // a byte-order mark stays part of the text, so that it is written again
    return { path, text: new TextDecoder("utf-8", { fatal: true, ignoreBOM: true }).decode(read.bytes) };
  } catch {
    throw new Refusal(say.notUtf8(path));
  }
}

/** Writes a document whole or not at all. @throws Refusal where it is read-only, has changed since it was read, or cannot be written */
export function writeDocument({ path, text: before }: Document, text: string): void {
  // replacing a file by rename needs no right to write it: the person's wish is read from its mode
  if ((statSync(path).mode & 0o222) === 0) throw new Refusal(say.notWritten(path, say.readOnly));
  if (readDocument(path).text !== before) throw new Refusal(say.changedMeanwhile(path));
  writeFile(path, text, []);
}
