import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { nearestName } from "../../src/plan/nearest";

const names = ["flat_id", "block", "retrofit", "floor_m2", "tenure", "kwh"];

describe("the nearest name", () => {
  test("forgives case, spaces and joining marks", () => {
    expect(nearestName("Floor M2", names)).toBe("floor_m2");
    expect(nearestName("KWH", names)).toBe("kwh");
    expect(nearestName("flat-id", names)).toBe("flat_id");
  });
  test("forgives one edit for every three characters: a letter more, less, other, or two swapped", () => {
    expect(nearestName("kwhh", names)).toBe("kwh");
    expect(nearestName("tenur", names)).toBe("tenure");
    expect(nearestName("blokc", names)).toBe("block");
    expect(nearestName("retorfti", names)).toBe("retrofit");
    expect(nearestName("rotrufot", names)).toBe(null);
  });
  test("takes the beginning of a name where only one begins so", () => {
    expect(nearestName("floor", names)).toBe("floor_m2");
    expect(nearestName("fl", names)).toBe(null);
    expect(nearestName("floor", ["floor_m2", "floor_no"])).toBe(null);
  });
  test("prefers fewer edits, then the earlier name", () => {
    expect(nearestName("dose2", ["dose1", "dose3"])).toBe("dose1");
    expect(nearestName("dosis", ["doses", "dosi"])).toBe("doses");
  });
  test("offers nothing for a name like none, or for nothing", () => {
    expect(nearestName("income", names)).toBe(null);
    expect(nearestName("x", ["y"])).toBe(null);
    expect(nearestName("", names)).toBe(null);
    expect(nearestName("kwh", [])).toBe(null);
  });
  test("is always one of the names, and the name itself where it is among them", () => {
    const some = fc.array(fc.string({ maxLength: 8 }), { maxLength: 6 });
    fc.assert(
      fc.property(fc.string({ maxLength: 8 }), some, (typed, list) => {
        const found = nearestName(typed, list);
        if (found !== null) expect(list).toContain(found);
        const letters = typed.replace(/[\s_.-]/g, "");
        if (letters.length > 0) expect(nearestName(typed, [typed])).toBe(typed);
      }),
      { seed: 3 },
    );
  });
});
