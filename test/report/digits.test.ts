import { describe, expect, it } from "vitest";
import { count, decimalsFor, exactly, fixed, percent, pValue, significant } from "../../src/report/digits";

describe("digits follow the standard error's second significant digit", () => {
  it("in decimals, tens or hundreds", () => {
    expect(decimalsFor([23.6], 1)).toBe(0);
    expect(decimalsFor([2.36], 1)).toBe(1);
    expect(decimalsFor([0.0236], 1)).toBe(3);
    expect(decimalsFor([236], 1)).toBe(-1);
    expect(decimalsFor([0.0996], 1)).toBe(2); // rounds to 0.10
    expect(fixed(1234.5, -1)).toBe("1,230");
  });
  it("a column takes the smallest error's place; zero errors and missing ones ask for nothing", () => {
    expect(decimalsFor([23.6, 1.9, null, 0], 1)).toBe(1);
    expect(decimalsFor([0, null], 212.34)).toBe(1);
    expect(decimalsFor([], 0)).toBe(3);
  });
});

describe("numbers as people read them", () => {
  it("sign, thousands, minus", () => {
    expect(fixed(340.2, 0, true)).toBe("+340");
    expect(fixed(-1340.26, 1)).toBe("−1,340.3");
    expect(fixed(-0.2, 0, true)).toBe("0");
    expect(fixed(-0, 2)).toBe("0.00");
    expect(count(1204)).toBe("1,204");
  });
  it("very large and very small ones as powers of ten", () => {
    expect(fixed(3.21e12, -10)).toBe("3.21 × 10^12");
    expect(significant(-4.5e-7)).toBe("−4.50 × 10^−7");
    expect(exactly(1e12)).toBe("1 × 10^12");
  });
  it("values of covariates without trailing zeros", () => {
    expect(significant(1.699)).toBe("1.7");
    expect(significant(60)).toBe("60");
    expect(significant(1234.567)).toBe("1,235");
    expect(exactly(0.1)).toBe("0.1");
  });
  it("p values and shares", () => {
    expect(pValue(0.0123)).toBe("p = 0.012");
    expect(pValue(1e-30)).toBe("p < 0.001");
    expect(percent(0)).toBe("0 %");
    expect(percent(0.0004)).toBe("< 0.1 %");
    expect(percent(0.244)).toBe("24 %");
    expect(percent(0.9961)).toBe("99.6 %");
    expect(percent(0.9996)).toBe("> 99.9 %");
    expect(percent(0.00996)).toBe("1 %");
    expect(percent(1)).toBe("100 %");
    expect(pValue(0.9996)).toBe("p > 0.999");
    expect(pValue(1)).toBe("p = 1.000");
  });
});
