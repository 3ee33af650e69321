import { describe, expect, it } from "vitest";
import { holm } from "../../../src/engine/slopes/holm";

describe("Holm's adjustment", () => {
  it("agrees with R: p.adjust(c(0.01, 0.04, 0.03, 0.005, 0.9), 'holm')", () => {
    [0.04, 0.09, 0.09, 0.025, 0.9].forEach((p, i) => expect(holm([0.01, 0.04, 0.03, 0.005, 0.9])[i]).toBeCloseTo(p, 12));
  });
  it("leaves out what was not tested", () => expect(holm([null, 0.02, null])).toEqual([null, 0.02, null]));
});
