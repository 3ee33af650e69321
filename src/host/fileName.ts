import { words } from "./words";

/** Bytes a file's name may have in most file systems, less room for an ending. */
const LONGEST = 120;

/** A file's name made of what a figure shows, without ending: nothing in it that some file system refuses or takes for a folder. */
export function fileNameOf(name: string): string {
  const plain = name
    .normalize("NFC")
    .replace(/[\p{Cc}\p{Cs}\u2028\u2029<>:"/\\|?*]+/gu, " ")
    .replace(/\s+/g, " ")
    .replace(/^[\s.]+/, "");
  let short = "";
  for (const letter of plain) {
    if (Buffer.byteLength(short + letter) > LONGEST) break;
    short += letter;
  }
  short = short.replace(/[\s.]+$/, "");
  // names of devices on Windows
  return short === "" || /^(con|prn|aux|nul|com\d|lpt\d)(\.|$)/i.test(short) ? words.figure : short;
}
