import { closeSync, fstatSync, openSync, readFileSync } from "node:fs";
import type { Problem } from "../engine/findings";

/** A file larger than this is refused before it is read: its columns would not fit in memory. */
export const SIZE_LIMIT = 1_000_000_000;

export type FileRead = { readonly ok: true; readonly bytes: Uint8Array } | { readonly ok: false; readonly problem: Problem };

/** The bytes of a file. @param file its name in sentences */
export function readBytes(path: string, file: string): FileRead {
  const fail = (problem: Problem): FileRead => ({ ok: false, problem: { ...problem, file } });
  let handle: number | null = null;
  try {
    handle = openSync(path, "r");
    const status = fstatSync(handle);
    if (status.isDirectory()) return fail({ code: "file-unreadable", detail: "it is a folder" });
    if (status.size > SIZE_LIMIT) return fail({ code: "too-large", bytes: status.size, limit: SIZE_LIMIT });
    return { ok: true, bytes: readFileSync(handle) };
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    if (code === "ENOENT" || code === "ENOTDIR") return fail({ code: "file-missing" });
    return fail({ code: "file-unreadable", detail: reasonOf(error) });
  } finally {
    if (handle !== null) closeSync(handle);
  }
}

/** Why the file system refused, in words. */
export function reasonOf(error: unknown): string {
  const { code } = error as NodeJS.ErrnoException;
  const known: Readonly<Record<string, string>> = {
    EACCES: "permission denied",
    EPERM: "permission denied",
    EBUSY: "another program holds it",
    EISDIR: "it is a folder",
    ENOENT: "its folder does not exist",
    ENOTDIR: "its folder does not exist",
    ENOSPC: "the disk is full",
    EROFS: "the disk is read-only",
    ENAMETOOLONG: "its name is too long",
    ELOOP: "its links lead in a circle",
  };
  return known[code ?? ""] ?? code ?? "the file system refused";
}
