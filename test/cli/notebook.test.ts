import { describe, expect, test } from "vitest";
import { markdownCells, withTexts } from "../../src/cli/notebook";

const cell = (type: string, source: unknown) => ({ cell_type: type, metadata: {}, source });
const notebook = (cells: unknown[], more = {}) => ({ cells, metadata: { big: 1 }, nbformat: 4, nbformat_minor: 5, ...more });
const texts = (file: string) => markdownCells(file)?.map(({ number, text }) => [number, text]);

describe("a notebook", () => {
  const cells = [
    cell("markdown", ["# A\n", "b"]),
    cell("code", ["# no\n"]),
    cell("markdown", "one string\nc"),
    cell("markdown", []),
  ];
  test("has Markdown cells, in lists of lines or as one string", () => {
    const expected = [
      [1, "# A\nb"],
      [3, "one string\nc"],
      [4, ""],
    ];
    for (const indent of [0, 1, 4]) expect(texts(JSON.stringify(notebook(cells), null, indent))).toEqual(expected);
    expect(texts(`\uFEFF${JSON.stringify(notebook(cells))}`)).toEqual(expected);
  });
  test("of another format, or no notebook at all, has none", () => {
    for (const file of ["", "[]", "{}", '{"cells": [', JSON.stringify(notebook(cells, { nbformat: 3 }))])
      expect(markdownCells(file), file).toBeNull();
  });
  test("is written as its own program would, and byte for byte where nothing is changed", () => {
    for (const indent of [0, 1, 4]) {
      const odd = JSON.stringify(notebook(cells), null, indent).replace('"big":', '"precise": 1.0, "big":');
      const [first, second, third] = markdownCells(odd)!;
      expect(withTexts(odd, [])).toBe(odd);
      const changed = withTexts(odd, [
        { cell: first, text: "x\n\ny “−”\n" },
        { cell: second, text: "z" },
      ]);
      const expected = [cell("markdown", ["x\n", "\n", "y “−”\n"]), cells[1], cell("markdown", "z"), cells[3]];
      const own = JSON.stringify(notebook(expected), null, indent).replace('"big":', '"precise": 1.0, "big":');
      // one line without blanks is no program's layout: only what it says is compared
      if (indent === 0) expect(JSON.parse(changed)).toEqual(JSON.parse(own));
      else expect(changed).toBe(own);
      expect(texts(withTexts(odd, [{ cell: third, text: "p\nq" }]))?.[2]).toEqual([4, "p\nq"]);
    }
  });
});
