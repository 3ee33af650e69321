import { statSync } from "node:fs";
import { sayProblem } from "../report/wording/problem";
import { markdownCells, withTexts } from "./notebook";
import { readBytes } from "./read";
import { Refusal } from "./refusal";
import { say } from "./sentences";
import { writeFile } from "./write";

/** A Markdown document, or the Markdown cells of a notebook. */
export interface Document {
  readonly path: string;
  /** The file's text; with a byte-order mark where it has one. */
  readonly file: string;
  readonly parts: readonly Part[];
  /** The file with other texts in its parts, in their order; all else byte for byte. */
  readonly withParts: (texts: readonly string[]) => string;
}

/** A text of Markdown in a document. */
export interface Part {
  /** Where it is, for people: "report.md", "report.ipynb, cell 3". */
  readonly shown: string;
  readonly text: string;
}

/** @throws Refusal for a path that is no document's */
export function documentPath(path: string): string {
  if (!/\.(md|markdown|qmd|rmd|ipynb)$/i.test(path)) throw new Refusal(say.notDocument(path));
  return path;
}

/** @throws Refusal where there is no such document, or it cannot be read as one */
export function readDocument(path: string): Document {
  const file = textOf(documentPath(path));
  if (!/\.ipynb$/i.test(path)) return { path, file, parts: [{ shown: path, text: file }], withParts: ([text]) => text };
  const cells = markdownCells(file);
  if (!cells) throw new Refusal(say.notNotebook(path));
  return {
    path,
    file,
    parts: cells.map(({ number, text }) => ({ shown: `${path}, cell ${number}`, text })),
    withParts: (texts) =>
      withTexts(
        file,
        cells.map((cell, i) => ({ cell, text: texts[i] })).filter(({ cell, text }) => text !== cell.text),
      ),
  };
}

/** Writes a document whole or not at all. @throws Refusal where it is read-only, has changed since it was read, or cannot be written */
export function writeDocument({ path, file }: Document, text: string): void {
  // replacing a file by rename needs no right to write it: the person's wish is read from its mode
  if ((statSync(path).mode & 0o222) === 0) throw new Refusal(say.notWritten(path, say.readOnly));
  if (textOf(path) !== file) throw new Refusal(say.changedMeanwhile(path));
  writeFile(path, text, []);
}

function textOf(path: string): string {
  const read = readBytes(path, path);
  if (!read.ok) throw new Refusal(sayProblem(read.problem));
  try {
    // a byte-order mark stays part of the text, so that it is written again
    return new TextDecoder("utf-8", { fatal: true, ignoreBOM: true }).decode(read.bytes);
  } catch {
    throw new Refusal(say.notUtf8(path));
  }
}
