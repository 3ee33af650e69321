import { expect, test } from "vitest";
import { failure } from "../../src/cli/failure";
import { Refusal } from "../../src/cli/refusal";

test("unusable input is its sentence and exit code 2", () => {
  expect(failure(new Refusal("There is no such column."))).toEqual({ text: "There is no such column.", exitCode: 2 });
});

test("what does not fit in memory is unusable input", () => {
  const tooLarge = () => {
    try {
      return new Float64Array(2 ** 53);
    } catch (error) {
      return failure(error);
    }
  };
  expect(tooLarge()).toMatchObject({ exitCode: 2, text: expect.stringContaining("memory") as string });
});

test("a fault of the program is neither 1 (stale) nor 2 (unusable), and keeps its trace", () => {
  for (const error of [new TypeError("x is not a function"), new RangeError("Maximum call stack size exceeded"), "odd"]) {
    const { text, exitCode } = failure(error);
    expect(exitCode).toBe(70);
    expect(text).toContain(error instanceof Error ? error.message : error);
  }
});
