import { describe, expect, test } from "vitest";
import { settlesGuess } from "../../src/host/choose";

describe("a choice in the panel", () => {
  test("only columns settle a guess", () => {
    expect(settlesGuess({ key: "margin", value: 1 })).toBe(false);
    expect(settlesGuess({ key: "reference", level: "none" })).toBe(false);
    expect(settlesGuess({ key: "sets", sets: "every" })).toBe(false);
    expect(settlesGuess({ key: "covariates", columns: [] })).toBe(true);
    expect(settlesGuess({ key: "outcome", column: "kwh" })).toBe(true);
    expect(settlesGuess({ key: "exposure", column: "retrofit" })).toBe(true);
  });
});
