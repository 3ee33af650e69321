import { posix } from "node:path";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { resolveData } from "../../src/plan/resolve";

const at = (data: string, roots: string[], plan = "/w/plans/p.slantwise.json") => {
  const resolved = resolveData(plan, data, roots);
  return resolved.ok ? resolved.path : resolved.problem.code;
};

describe("the data a plan names", () => {
  test("lies relative to the plan's folder, inside one of the roots", () => {
    expect(at("a.csv", ["/w/plans"])).toBe("/w/plans/a.csv");
    expect(at("./deep//a.csv", ["/w/plans/"])).toBe("/w/plans/deep/a.csv");
    expect(at("../data/a.csv", ["/w/plans", "/w"])).toBe("/w/data/a.csv");
    expect(at("..data/a.csv", ["/w/plans"])).toBe("/w/plans/..data/a.csv");
    expect(at("a.csv", ["/"])).toBe("/w/plans/a.csv");
  });
  test("is refused outside of them, with the path as the plan has it", () => {
    expect(at("../a.csv", ["/w/plans"])).toBe("outside-folder");
    expect(at("../../etc/a.csv", ["/w"])).toBe("outside-folder");
    expect(at("../../../../etc/a.csv", ["/"])).toBe("outside-folder");
    expect(at("../plans2/a.csv", ["/w/plans"])).toBe("outside-folder");
    expect(at("a.csv", [])).toBe("outside-folder");
    expect(at(".", ["/w/plans"])).toBe("outside-folder");
    expect(at("/w/plans/a.csv", ["/w/plans"])).toBe("outside-folder");
    expect(resolveData("/w/p.slantwise.json", "../a.csv", ["/w"])).toEqual({
      ok: false,
      problem: { code: "outside-folder", path: "../a.csv", file: "p.slantwise.json" },
    });
  });
  test("on Windows both slashes part, and case does not tell folders apart", () => {
    const plan = "C:\\Work\\plans\\p.slantwise.json";
    expect(at("..\\data/a.csv", ["c:\\work"], plan)).toBe("C:\\Work\\data\\a.csv");
    expect(at("..\\..\\a.csv", ["c:\\work"], plan)).toBe("outside-folder");
    expect(at("D:\\a.csv", ["c:\\work"], plan)).toBe("outside-folder");
    expect(at("a.csv", ["\\\\host\\share"], "\\\\host\\share\\p.slantwise.json")).toBe("\\\\host\\share\\a.csv");
    expect(at("..\\other\\a.csv", ["\\\\host\\share"], "\\\\host\\share\\p.slantwise.json")).toBe("outside-folder");
  });
  test("agrees with the file system's own rules wherever it says yes, and says no only outside", () => {
    const part = fc.constantFrom("a", "b", "..", ".", "", "...", "w", "plans");
    fc.assert(
      fc.property(fc.array(part, { minLength: 1, maxLength: 8 }), fc.constantFrom("/w", "/w/plans", "/"), (parts, root) => {
        const data = parts.join("/");
        const path = posix.join("/w/plans", data).replace(/(.)\/$/, "$1");
        const inside = path !== root && path.startsWith(root === "/" ? "/" : root + "/");
        const above = parts.filter((name) => name === "..").length > 1;
        if (at(data, [root]) !== "outside-folder") expect([at(data, [root]), inside]).toEqual([path, true]);
        else expect(inside && !above && data !== "" && !data.startsWith("/")).toBe(false);
      }),
      { seed: 17, numRuns: 500 },
    );
  });
});
