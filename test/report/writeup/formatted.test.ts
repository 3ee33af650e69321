import fc from "fast-check";
import { format } from "prettier";
import { describe, expect, test } from "vitest";
import type { Plan } from "../../../src/engine/plan";
import { findMarkers } from "../../../src/report/writeup/find";
import { normalText } from "../../../src/report/writeup/normal";
import { openData, sample } from "../outputs";
import { block, crossed, flats, hostile, plan, reviewed, sourceOf, states } from "./written";

/** Names that would end a comment, a cell, a table, a quotation or a block, if they were let. */
const HOSTILE = [
  "-->",
  "a--b",
  "--",
  '"quo\'te"',
  "new\nline",
  "a|b",
  "`c`",
  "<!-- slantwise:end -->",
  "```",
  "*x* _y_",
  "$z^2$",
  "# h",
  "1. i",
  "- j",
  "\\",
];

const swiss: Plan = {
  outcome: { column: "Fertility" },
  exposure: { column: "Education", per: 10 },
  covariates: [{ column: "Catholic" }, { column: "Examination" }],
};
const iris: Plan = {
  outcome: { column: "Sepal.Width" },
  exposure: { column: "Species", reference: "setosa" },
  covariates: [{ column: "Petal.Length" }],
};
const CASES: Record<string, ReturnType<typeof sourceOf>> = {
  flats: sourceOf(flats(), plan),
  crossed: sourceOf(crossed, plan),
  ...Object.fromEntries(
    ["heating", "glazing", "seals", "valves"].map((name) => {
      const { table, plan: own } = sample(name);
      return [name, sourceOf(table, own)];
    }),
  ),
  "an amount": sourceOf(openData("swiss", swiss).table, swiss),
  "several groups": sourceOf(openData("iris", iris).table, iris),
};

describe("a formatter does not make a block look edited", () => {
  for (const [name, source] of Object.entries(CASES))
    test(name, async () => {
      const text = `# Title\n\nBefore.\n${block(source)}\nAfter.\n`;
      expect(states(reviewed(text, source))).toEqual(["fresh"]);
      for (const options of [
        {},
        { proseWrap: "always", printWidth: 60 },
        { proseWrap: "never" },
        { endOfLine: "crlf" },
      ] as const) {
        const formatted = await format(text, { parser: "markdown", ...options });
        expect(formatted).not.toBe(text);
        expect(states(reviewed(formatted, source)), JSON.stringify(options)).toEqual(["fresh"]);
      }
    });
});

describe("no name gets out of its block", () => {
  for (const name of HOSTILE)
    test(JSON.stringify(name), async () => {
      const { source, path } = hostile(name);
      const text = `Before.\n\n${block(source, path)}\n\nAfter.\n`;
      const marker = text.split("\n")[2];
      expect(marker.match(/--/g)).toEqual(["--", "--"]); // those of the comment itself
      expect(text.match(/<!--/g)).toHaveLength(2);
      for (const written of [text, await format(text, { parser: "markdown" })]) {
        expect(findMarkers(written)).toMatchObject([{ kind: "block", marker: { plan: path } }]);
        expect(states(reviewed(written, source))).toEqual(["fresh"]);
      }
    });
});

describe("text that is compared", () => {
  const TABLE = "| a | b |\n| :--- | ---: |\n| 1 | 2 |";
  test("has no padding, rule lengths, line ends or breaks of a paragraph", () => {
    const same = [
      `One two.\n\n${TABLE}\n\n- three`,
      `One\r\ntwo.  \r\n\r\n\r\n|  a  | b |\r\n|:-|-:|\r\n| 1|2 |\r\n\r\n* three\r\n`,
      `\nOne   two.\n${TABLE}\n- three\n\n`,
    ];
    expect(new Set(same.map(normalText)).size).toBe(1);
  });
  test("keeps every word, cell, alignment and end of a paragraph", () => {
    const [first, ...others] = [
      `One.\n\nTwo.\n\n${TABLE}`,
      `One.\nTwo.\n\n${TABLE}`,
      `One.\n\nTwo\n\n${TABLE}`,
      `One.\n\nTwo.\n\n${TABLE.replace("---:", "---")}`,
      `One.\n\nTwo.\n\n${TABLE.replace("| 2", "| 3")}`,
      `One.\n\nTwo.\n\n${TABLE.replace("| 1 | 2 |", "| 12 | |")}`,
    ].map(normalText);
    for (const other of others) expect(other).not.toBe(first);
  });
  test("is the same when it is taken again", () => {
    const line = fc.oneof(fc.string(), fc.constantFrom("", "| a |b|", "- x", "|:--|", "* y", " ", "a\r\nb"));
    fc.assert(
      fc.property(fc.array(line), (lines) => {
        const once = normalText(lines.join("\n"));
        expect(normalText(once)).toBe(once);
      }),
    );
  });
});
