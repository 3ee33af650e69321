import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { fileNameOf } from "../../src/host/fileName";

describe("a figure's file name", () => {
  test("is what it shows, without what file systems refuse", () => {
    expect(fileNameOf("Difference in kwh, new − old, along mean wind")).toBe("Difference in kwh, new − old, along mean wind");
    expect(fileNameOf("../../etc/passwd")).toBe("etc passwd");
    expect(fileNameOf('a/b\\c: <d> "e"|f?*\n\u0000g')).toBe("a b c d e f g");
    expect(fileNameOf("温度 × 🏠")).toBe("温度 × 🏠");
    expect(fileNameOf(" . .. ")).toBe("figure");
    expect(fileNameOf("aux")).toBe("figure");
    expect(fileNameOf("con.2")).toBe("figure");
    expect(fileNameOf("aux heating")).toBe("aux heating");
  });
  test("whatever it shows: neither empty nor long, no folder, no end that is dropped", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary", maxLength: 300 }), (name) => {
        const file = fileNameOf(name);
        expect(file).toMatch(/^[^<>:"/\\|?*\u0000-\u001f]+$/);
        expect(file).not.toMatch(/^[\s.]|[\s.]$/);
        expect(Buffer.byteLength(file)).toBeLessThanOrEqual(120);
        expect(Buffer.from(file).toString()).toBe(file);
      }),
    );
  });
});
