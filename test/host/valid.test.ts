import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { isPageMessage } from "../../src/host/valid";

describe("messages from the page", () => {
  test("every message of the protocol is understood", () => {
    const bodies = [
      { type: "ready" },
      { type: "readAgain" },
      { type: "openLine", line: 3 },
      { type: "openLine", line: 3, inPlan: true },
      { type: "copy", id: 4, as: "markdown" },
      { type: "copy", id: 4, as: "table" },
      { type: "filter", filter: null },
      { type: "slopes", choice: null },
      { type: "saveFigure", id: 1, figure: { as: "svg", name: "kwh along wind", data: "<svg xmlns='…'></svg>" } },
      { type: "saveFigure", id: 2, figure: { as: "png", name: "", data: "iVBORw0KGgoAAAA=" } },
      { type: "slopes", choice: { set: null, modifier: null, contrast: null } },
      { type: "slopes", choice: { set: 3, modifier: "floor_m2", contrast: 0 } },
      { type: "filter", filter: { holds: ["a"], omits: [] } },
      ...[
        { key: "outcome", column: "a" },
        { key: "exposure", column: "a" },
        { key: "reference", level: "none" },
        { key: "covariates", columns: ["a", "b"] },
        { key: "margin", value: null },
        { key: "margin", value: 0.5 },
        { key: "average", over: "all rows" },
        { key: "average", over: null },
        { key: "per", value: 10 },
        { key: "sets", sets: "every" },
        { key: "report", columns: [] },
      ].map((change) => ({ type: "choose", change })),
    ];
    expect(bodies.filter((body) => !isPageMessage({ v: 1, ...body }))).toEqual([]);
  });
  test("another version, an unknown type or a wrong value is refused", () => {
    const wrong: unknown[] = [
      null,
      "ready",
      { type: "ready" },
      { v: 2, type: "ready" },
      { v: 1, type: "toString" },
      { v: 1, type: "openLine", line: 0 },
      { v: 1, type: "openLine", line: 1.5 },
      { v: 1, type: "copy", id: 1, as: "html" },
      { v: 1, type: "choose", change: { key: "margin", value: NaN } },
      { v: 1, type: "choose", change: { key: "margin", value: -1 } },
      { v: 1, type: "choose", change: { key: "average", over: 3 } },
      { v: 1, type: "choose", change: { key: "constructor" } },
      { v: 1, type: "choose", change: { key: "covariates", columns: [1] } },
      { v: 1, type: "filter", filter: { holds: "a", omits: [] } },
      { v: 1, type: "saveFigure", id: 1 },
      { v: 1, type: "saveFigure", id: 1, figure: { as: "svg", name: "a", data: "<script>" } },
      { v: 1, type: "saveFigure", id: 1, figure: { as: "exe", name: "a", data: "<svg ></svg>" } },
      { v: 1, type: "saveFigure", id: 1, figure: { as: "png", name: "a", data: "<svg ></svg>" } },
      { v: 1, type: "saveFigure", id: 1, figure: { as: "png", name: "a", data: "iVBORw0KGgo\n" } },
      { v: 1, type: "saveFigure", id: 1, figure: { as: "svg", name: 7, data: "<svg ></svg>" } },
      { v: 1, type: "saveFigure", id: 1, figure: { as: "svg", name: "a", data: "<svg " + "x".repeat(8_000_000) } },
      { v: 1, type: "slopes" },
      { v: 1, type: "slopes", choice: { set: -1, modifier: null, contrast: null } },
      { v: 1, type: "slopes", choice: { set: 0, modifier: 7, contrast: null } },
      { v: 1, type: "slopes", choice: { set: 0, modifier: null } },
    ];
    expect(wrong.filter(isPageMessage)).toEqual([]);
  });
  test("nothing a page can send makes the check throw", () => {
    fc.assert(
      fc.property(
        fc.anything(),
        fc.constantFrom("choose", "copy", "filter", "openLine", "slopes", "saveFigure"),
        (value, type) => {
          const message = {
            v: 1,
            type,
            change: value,
            filter: value,
            line: value,
            id: value,
            as: value,
            choice: value,
            figure: value,
          };
          expect(typeof isPageMessage(value)).toBe("boolean");
          expect(typeof isPageMessage(message)).toBe("boolean");
        },
      ),
    );
  });
});
