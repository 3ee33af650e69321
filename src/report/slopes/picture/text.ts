/** Widths of letters as parts of the type's size, for a common sans-serif face; measured where there is a page, guessed where there is none. */
const NARROW = /[\sil.,:;'|!()[\]{}fjtI]/;
const BROAD = /[A-Z%@mwMW+=<>−×÷#&]/;
const WIDE = /[\u1100-\u11ff\u2e80-\ua4cf\uac00-\ud7a3\uf900-\ufaff\ufe30-\ufe4f\uff00-\uff60\u{1f000}-\u{3ffff}]/u;

/** About how wide a text is, in px; rather too wide than too narrow. */
export function guessWidth(text: string, size: number): number {
  let parts = 0;
  for (const letter of text) parts += WIDE.test(letter) ? 1.05 : NARROW.test(letter) ? 0.36 : BROAD.test(letter) ? 0.82 : 0.6;
  return parts * size;
}

/** A text in lines no wider than `width` px, broken at spaces, after underscores and hyphens, and inside a word that is longer than a line. */
export function wrapped(text: string, width: number, widthOf: (text: string) => number): string[] {
  const lines: string[] = [];
  let line = "";
  for (const part of text.split(/(?<=[\s_-])/)) {
    if (line !== "" && widthOf((line + part).trimEnd()) > width) {
      lines.push(line.trimEnd());
      line = "";
    }
    line += part;
    while (widthOf(line.trimEnd()) > width && [...line].length > 1) {
      const letters = [...line];
      let fits = letters.length - 1;
      while (fits > 1 && widthOf(letters.slice(0, fits).join("")) > width) fits--;
      lines.push(letters.slice(0, fits).join(""));
      line = letters.slice(fits).join("");
    }
  }
  return line.trimEnd() === "" && lines.length > 0 ? lines : [...lines, line.trimEnd()];
}
