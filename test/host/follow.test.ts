import { appendFileSync, mkdtempSync, renameSync, rmSync, utimesSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { setTimeout as wait } from "node:timers/promises";
import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import { Follow } from "../../src/host/follow";
import type { Stamp } from "../../src/host/worker/messages";

let folder: string;
let file: string;
let follow: Follow;
let settled: (Stamp | null)[];
let stirred: number;
let likely: number[];
let net: NodeJS.Timeout;

function begin(): void {
  follow = new Follow(file, {
    stirring: () => void stirred++,
    likely: (stamp) => void likely.push(stamp.size),
    settled: (stamp) => void settled.push(stamp),
  });
  net = setInterval(() => follow.poke(), 50);
  follow.poke();
}

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "follow-"));
  file = join(folder, "data.csv");
  settled = [];
  stirred = 0;
  likely = [];
});
afterEach(() => {
  clearInterval(net);
  follow.dispose();
  rmSync(folder, { recursive: true });
});

const sizes = () => settled.map((stamp) => stamp?.size ?? null);
const until = (expected: (number | null)[]) =>
  vi.waitFor(() => expect(sizes()).toEqual(expected), { timeout: 10_000, interval: 20 });

describe("following a file", () => {
  test("an old file is settled at the first look, an absent one is absent at once", async () => {
    begin();
    await until([null]);
    clearInterval(net);
    follow.dispose();
    writeFileSync(file, "a\n1\n");
    utimesSync(file, 1, 1);
    settled = [];
    begin();
    await until([4]);
  });

  test("a save in place and a save by rename settle once each", async () => {
    writeFileSync(file, "a\n1\n");
    begin();
    await until([4]);
    follow.accept(settled[0]!);
    writeFileSync(file, "a\n1\n2\n");
    await until([4, 6]);
    writeFileSync(file + ".tmp", "a\n1\n2\n3\n");
    renameSync(file + ".tmp", file);
    await until([4, 6, 8]);
    expect(stirred).toBeGreaterThanOrEqual(3);
    expect(likely).toContain(8);
  });

  test("a file deleted and written again never counts as missing", async () => {
    writeFileSync(file, "a\n1\n");
    begin();
    await until([4]);
    rmSync(file);
    await wait(400);
    writeFileSync(file, "a\n1\n2\n");
    await until([4, 6]);
  });

  test("a deleted file is missing after the grace, and settles again when it is back", async () => {
    writeFileSync(file, "a\n1\n");
    begin();
    await until([4]);
    rmSync(file);
    await until([4, null]);
    writeFileSync(file, "a\n1\n2\n");
    await until([4, null, 6]);
  });

  test("a file written slowly in pieces settles only when it is whole", async () => {
    const whole = "a,b\n" + "1,2\n".repeat(100);
    writeFileSync(file, whole);
    begin();
    await until([whole.length]);
    follow.accept(settled[0]!);
    writeFileSync(file, whole.slice(0, 80));
    for (let at = 80; at < whole.length; at += 81) {
      await wait(350);
      appendFileSync(file, whole.slice(at, at + 81));
    }
    await until([whole.length, whole.length]);
    await wait(300);
    expect(sizes()).toEqual([whole.length, whole.length]);
    expect(likely.filter((size) => size < whole.length)).toEqual([]);
  });

  test("a file in doubt stands still once more before it settles anew", async () => {
    writeFileSync(file, "a\n1\n");
    begin();
    await until([4]);
    follow.afresh();
    expect(follow.stands(settled[0])).toBe(false);
    await until([4, 4]);
    expect(follow.stands(settled[0])).toBe(true);
  });
});
