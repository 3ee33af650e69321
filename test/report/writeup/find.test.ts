import { describe, expect, test } from "vitest";
import { findMarkers } from "../../../src/report/writeup/find";
import type { Found } from "../../../src/report/writeup/find";
import { linesOf } from "../../../src/report/writeup/lines";
import { block, flats, plan, sourceOf } from "./written";

const BLOCK = block(sourceOf(flats(), plan));
const VALUE = "<!-- slantwise:value plan=p.slantwise.json of=estimate -->−212<!-- /slantwise:value -->";
const BEGIN = BLOCK.split("\n")[0];
const END = "<!-- slantwise:end -->";
const said = (text: string): string[] =>
  findMarkers(text).map((found) => `${found.line} ${found.kind === "broken" ? found.reason.code : found.kind}`);

describe("blocks", () => {
  test("are found with their offsets and lines, whatever the line ends", () => {
    for (const ending of ["\n", "\r\n", "\r"]) {
      const text = `# Title\n\n${BLOCK}\n\nAfter.\n${BLOCK}`.replaceAll("\n", ending);
      const found = findMarkers(text);
      expect(found.map(({ kind, line }) => `${line} ${kind}`)).toEqual(["3 block", `${5 + BLOCK.split("\n").length} block`]);
      for (const { start, end } of found) expect(text.slice(start, end)).toBe(BLOCK.replaceAll("\n", ending));
      expect(found[0]).toMatchObject({ ending, indent: "" });
    }
  });
  test("a byte-order mark before the first is no part of it", () => {
    expect(findMarkers(`\uFEFF${BLOCK}\n`)[0]).toMatchObject({ kind: "block", line: 1, start: 1 });
  });
  test("without a closing marker is reported, and the next block is still found", () => {
    expect(said(`${BEGIN}\n\nLost.\n\n${BLOCK}\n`)).toEqual(["1 block-open", "5 block"]);
    expect(said(`a\n${BEGIN}\n`)).toEqual(["2 block-open"]);
    expect(said(`a\n\n${END}\n`)).toEqual(["3 block-end-alone"]);
  });
  test("a marker shares its line with nothing", () => {
    expect(said(`${BEGIN} and text\n`)).toEqual(["1 not-alone"]);
    expect(said(`${BEGIN}\n${END} and text\n`)).toEqual(["1 block-open", "2 not-alone"]);
  });
  test("a marker that is damaged, or another format's, is reported as such", () => {
    const fault = (begin: string): unknown => {
      const [found] = findMarkers(`${begin}\n\n${END}`);
      return found.kind === "broken" && found.reason.code === "marker" ? found.reason.fault : found;
    };
    expect(fault(BEGIN.replace("format=1", "format=2"))).toEqual({ code: "format", found: "2" });
    expect(fault(BEGIN.replace(/ data-sha=\S+/, ""))).toEqual({ code: "lacks", key: "data-sha" });
    expect(fault(BEGIN.replace(/data-sha=./, "data-sha="))).toEqual({ code: "bad", key: "data-sha" });
    expect(fault(BEGIN.replace(/printed=\S+/, "printed={}"))).toEqual({ code: "bad", key: "printed" });
    expect(fault(BEGIN.replace("plan-changes=0", "plan-changes=-1"))).toEqual({ code: "bad", key: "plan-changes" });
    expect(fault(BEGIN.replace("plan=", "plans="))).toEqual({ code: "unknown", key: "plans" });
    expect(fault("<!-- slantwise:begin -->")).toEqual({ code: "lacks", key: "format" });
    expect(fault("<!-- slantwise:begin format -->")).toEqual({ code: "not-pairs" });
  });
  test("what stands inside a block is not looked through for inline numbers", () => {
    const [begin, ...rest] = BLOCK.split("\n");
    expect(said([VALUE, "", begin, VALUE, ...rest, "", VALUE].join("\n"))).toEqual([
      "1 value",
      "3 block",
      `${6 + rest.length} value`,
    ]);
  });
});

describe("code is no document of ours", () => {
  const fenced: Record<string, string> = {
    backticks: `\`\`\`md\n${BLOCK}\n\`\`\`\n`,
    tildes: `~~~~\n${BLOCK}\n~~~\n${VALUE}\n~~~~\n`,
    "in a list": `- \`\`\`\n  ${BLOCK.replaceAll("\n", "\n  ")}\n  \`\`\`\n`,
    "in a list, below its first line": `1. a\n\n   \`\`\`\n   ${VALUE}\n   \`\`\`\n`,
    "in a quotation": `> \`\`\`\n> ${VALUE}\n> \`\`\`\n`,
    "without an end": `\`\`\`\n${BLOCK}\n`,
    "a chunk that is run": `\`\`\`{r, echo=FALSE}\n# ${VALUE}\n\`\`\`\n`,
    "a span": `Write \`${VALUE}\`, or \`\`a \` ${VALUE}\`\`, so.\n`,
    "a span over two lines": `Write \`a\n${VALUE} b\` so.\n`,
    escaped: `Write \\${VALUE.replace("<!-- /", "\\<!-- /")} so.\n`,
  };
  for (const [name, text] of Object.entries(fenced))
    test(name, () => {
      expect(said(text)).toEqual([]);
    });
  test("what follows it is ours again", () => {
    expect(said(`\`\`\`\n${BLOCK}\n\`\`\`\n${BLOCK}\n`)).toHaveLength(1);
    expect(said(`- \`\`\`\n  code\n\n${BLOCK}\n`)).toHaveLength(1); // the list item ends, and its fence with it
    expect(said(`> \`\`\`\n> code\n\n${BLOCK}\n`)).toHaveLength(1);
    expect(said(`A lone \` here. ${VALUE}\n`)).toEqual(["1 value"]);
    expect(said(`An inline \`\`\`x\`\`\` span.\n${VALUE}\n`)).toEqual(["2 value"]);
  });
});

describe("inline numbers", () => {
  test("are found in paragraphs, quotations, lists and tables, broken over lines too", () => {
    const text = `One ${VALUE} two ${VALUE}.\n\n> ${VALUE}\n\n- ${VALUE}\n\n| a |\n| - |\n| ${VALUE} |\n\n${VALUE.replace("−212", "no\nsingle")}\n`;
    expect(said(text)).toEqual(["1 value", "1 value", "3 value", "5 value", "9 value", "11 value"]);
    const values = findMarkers(text) as Extract<Found, { kind: "value" }>[];
    expect(values.map((value) => value.text)).toEqual(["−212", "−212", "−212", "−212", "−212", "no\nsingle"]);
    for (const { start, end } of values) expect(text.slice(start, end)).toMatch(/^<!--.*-->$/s);
  });
  test("without a closing marker in the paragraph are reported", () => {
    const [open, close] = VALUE.split("−212");
    expect(said(`${open}−212\n\n${close}\n`)).toEqual(["1 value-open", "3 value-end-alone"]);
    expect(said(`${open} ${VALUE}\n`)).toEqual(["1 value-open", "1 value"]);
  });
  test("ask for what there is", () => {
    const fault = (pairs: string): unknown => {
      const [found] = findMarkers(`<!-- slantwise:value ${pairs} -->1<!-- /slantwise:value -->`);
      return found.kind === "broken" && found.reason.code === "marker" ? found.reason.fault : found.kind;
    };
    expect(fault("plan=p of=low digits=2 set= contrast=a%20b")).toBe("value");
    expect(fault("of=low")).toEqual({ code: "lacks", key: "plan" });
    expect(fault("plan=p of=mean")).toEqual({ code: "bad", key: "of" });
    expect(fault("plan=p of=low digits=few")).toEqual({ code: "bad", key: "digits" });
    expect(fault("plan=p of=rows digits=2")).toEqual({ code: "bad", key: "digits" });
    expect(fault("plan=p of=low set=100%")).toEqual({ code: "bad", key: "set" });
    expect(fault("plan=p of=low constrast=a")).toEqual({ code: "unknown", key: "constrast" });
  });
});

test("the lines are the text, in order and whole", () => {
  for (const text of ["", "a", "a\n", "a\r\nb\rc\n\n", "\uFEFFa\n\uFEFFb"]) {
    const lines = linesOf(text);
    expect(lines.map((line) => text.slice(line.start, line.end) + line.ending).join("")).toBe(text.replace(/^\uFEFF/, ""));
  }
});
