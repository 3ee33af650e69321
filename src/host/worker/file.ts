import { closeSync, fstatSync, openSync, readSync } from "node:fs";
import type { Problem } from "../../engine/findings";
import type { Stamp } from "./messages";
import { sameStamp, stampOf } from "./stamp";

/** A file larger than this is refused: its columns would not fit in memory beside the editor. */
export const SIZE_LIMIT = 1_000_000_000;

export type FileRead =
  | { readonly kind: "bytes"; readonly bytes: Uint8Array; readonly stamp: Stamp }
  | { readonly kind: "gone" }
  | { readonly kind: "torn" }
  | { readonly kind: "problem"; readonly problem: Problem };

/** Reads a file again and again into one buffer, which only grows: fresh pages are what makes a large read slow. */
export class KeptFile {
  private buffer = new Uint8Array(0);

  /** The bytes are valid until the next `read`. `torn` means the file changed under the reader. */
  read(path: string, file: string): FileRead {
    let handle: number;
    try {
      handle = openSync(path, "r");
    } catch (error) {
      return missing(error) ? { kind: "gone" } : { kind: "problem", problem: unreadable(file, error) };
    }
    try {
      const before = fstatSync(handle);
      if (!before.isFile()) return { kind: "problem", problem: { code: "file-unreadable", file, detail: "it is not a file" } };
      if (before.size > SIZE_LIMIT) {
        return { kind: "problem", problem: { code: "too-large", file, bytes: before.size, limit: SIZE_LIMIT } };
      }
      if (this.buffer.length < before.size) this.buffer = new Uint8Array(Math.ceil(before.size * 1.25) + 4096);
      let at = 0;
      while (at < before.size) {
        const got = readSync(handle, this.buffer, at, before.size - at, at);
        if (got === 0) return { kind: "torn" };
        at += got;
      }
      const stamp = stampOf(before);
      if (!sameStamp(stamp, stampOf(fstatSync(handle)))) return { kind: "torn" };
      return { kind: "bytes", bytes: this.buffer.subarray(0, at), stamp };
    } catch (error) {
      return { kind: "problem", problem: unreadable(file, error) };
    } finally {
      closeSync(handle);
    }
  }
}

function missing(error: unknown): boolean {
  const code = (error as NodeJS.ErrnoException).code;
  return code === "ENOENT" || code === "ENOTDIR";
}

function unreadable(file: string, error: unknown): Problem {
  const code = (error as NodeJS.ErrnoException).code;
  const detail =
    code === "EACCES" || code === "EPERM"
      ? "permission denied"
      : code === "EBUSY"
        ? "another program holds it"
        : (code ?? "reading failed");
  return { code: "file-unreadable", file, detail };
}
