import { describe, expect, test } from "vitest";
import { GRACE_MS, LOOK_MS, quietNeeded } from "../../src/host/quiet";

const stamp = (size: number) => ({ size, mtimeMs: 1, ctimeMs: 1, ino: 1 });
const calm = { changes: 0, longestGap: 0 };

describe("how long a file must stand still", () => {
  test("a file saved at once, about as long as before, waits for one more look", () => {
    expect(quietNeeded({ stamp: stamp(1000), accepted: stamp(990), ...calm })).toBe(LOOK_MS);
    expect(quietNeeded({ stamp: stamp(1000), accepted: null, ...calm })).toBe(LOOK_MS);
  });
  test("a file that is gone or empty waits for the grace", () => {
    expect(quietNeeded({ stamp: null, accepted: stamp(1000), ...calm })).toBe(GRACE_MS);
    expect(quietNeeded({ stamp: stamp(0), accepted: null, ...calm })).toBe(GRACE_MS);
  });
  test("a file much shorter than the last one may be the first piece of the next", () => {
    expect(quietNeeded({ stamp: stamp(100), accepted: stamp(1000), ...calm })).toBeGreaterThan(4 * LOOK_MS);
  });
  test("a file that grew waits for a multiple of the longest pause between its pieces", () => {
    const need = quietNeeded({ stamp: stamp(1000), accepted: stamp(1000), changes: 3, longestGap: 500 });
    expect(need).toBeGreaterThanOrEqual(2 * 500);
    expect(quietNeeded({ stamp: stamp(1000), accepted: null, changes: 9, longestGap: 60_000 })).toBeLessThanOrEqual(3000);
  });
});
