import { appendFileSync, mkdtempSync, rmSync, truncateSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { KeptFile } from "../../src/host/worker/file";

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "file-"));
});
afterAll(() => rmSync(folder, { recursive: true }));

const text = (kept: KeptFile, path: string) => {
  const read = kept.read(path, "a.csv");
  return read.kind === "bytes" ? new TextDecoder().decode(read.bytes) : read.kind;
};

describe("reading a file into a kept buffer", () => {
  test("gives the bytes as they are, longer, shorter and empty, one read after another", () => {
    const path = join(folder, "a.csv");
    const kept = new KeptFile();
    writeFileSync(path, "a,b\n1,2\n");
    expect(text(kept, path)).toBe("a,b\n1,2\n");
    appendFileSync(path, "3,4\n".repeat(5000));
    expect(text(kept, path)).toBe("a,b\n1,2\n" + "3,4\n".repeat(5000));
    truncateSync(path, 4);
    expect(text(kept, path)).toBe("a,b\n");
    truncateSync(path, 0);
    expect(text(kept, path)).toBe("");
  });
  test("says that a file is gone, or is none", () => {
    expect(text(new KeptFile(), join(folder, "none.csv"))).toBe("gone");
    expect(new KeptFile().read(folder, "folder.csv")).toMatchObject({
      kind: "problem",
      problem: { code: "file-unreadable", file: "folder.csv" },
    });
  });
});
