import fc from "fast-check";
import { describe, expect, it, test } from "vitest";
import { escapeXml } from "../../../src/report/escape";
import type { Plot } from "../../../src/report/slopes/presentation";
import { endLabels } from "../../../src/report/slopes/picture/labels";
import { frameOf, placer } from "../../../src/report/slopes/picture/place";
import { figureSvg } from "../../../src/report/slopes/picture/svg";
import { guessWidth, wrapped } from "../../../src/report/slopes/picture/text";
import { CASES, sectionOf } from "./cases";

const plots = Object.entries(CASES).flatMap(([name, wanted]) =>
  sectionOf(wanted).plots.map((plot): [string, Plot] => [`${name}, ${plot.kind}`, plot]),
);
/** The texts that stand in an SVG, a line each, as a reader sees them. */
const textsOf = (svg: string) =>
  [...svg.matchAll(/<(?:text|title|desc)[^>]*>([^<]*)</g)].map(([, text]) =>
    text.replace(/&(?:#(\d+)|(lt|gt|amp));/g, (_, code: string | undefined, name: "lt" | "gt" | "amp") =>
      code === undefined ? { lt: "<", gt: ">", amp: "&" }[name] : String.fromCodePoint(Number(code)),
    ),
  );

describe("a plot as an SVG file", () => {
  for (const [name, plot] of plots) {
    const svg = figureSvg(plot);
    it(`${name}: is whole and says what the plot says`, () => {
      expect(svg).not.toMatch(/NaN|Infinity|undefined|null/);
      // every element is closed, in order
      const open: string[] = [];
      for (const [, slash, tag, own] of svg.matchAll(/<(\/?)(\w+)[^>]*?(\/?)>/g)) {
        if (slash) expect(open.pop()).toBe(tag);
        else if (!own) open.push(tag);
      }
      expect(open).toEqual([]);
      const texts = textsOf(svg);
      const all = texts.join("\u0000").replaceAll(/[\s\u0000]/g, "");
      const said = [
        plot.title,
        plot.summary,
        plot.x.label,
        plot.y.label,
        ...plot.marks.map(({ label }) => label),
        ...plot.bands.map((band) => band.name),
        ...plot.intervals.map((mark) => mark.name),
        ...plot.points.map(({ note }) => note ?? ""),
        ...(plot.kind === "levels" ? [] : plot.y.ticks.map(({ text }) => text)),
      ];
      const wanted = plot.kind === "levels" ? said.filter((text) => text !== plot.x.label) : said;
      expect(wanted.filter((text) => !all.includes(text.replaceAll(/\s/g, "")))).toEqual([]);
    });
    it(`${name}: no letters stand outside the picture or over each other`, () => {
      const [, , wide, high] = /viewBox="(\S+) (\S+) (\S+) (\S+)"/.exec(svg)!.slice(1).map(Number);
      const boxes = [...svg.matchAll(/<text x="(\S+)" y="(\S+)" font-size="(\S+)"([^>]*)>([^<]*)</g)].map((found) => {
        const [x, y, size] = found.slice(1, 4).map(Number);
        // the guess is rather too wide; nine tenths of it still is no less than the letters
        const width = 0.9 * guessWidth(textsOf(`<text>${found[5]}<`)[0], size);
        const left = found[4].includes('"end"') ? x - width : found[4].includes('"middle"') ? x - width / 2 : x;
        return { text: found[5], left, right: left + width, top: y - 0.75 * size, bottom: y + 0.2 * size };
      });
      expect(boxes.filter((box) => box.left < 0 || box.right > wide || box.top < 0 || box.bottom > high)).toEqual([]);
      const over = boxes.flatMap((a, i) =>
        boxes
          .slice(i + 1)
          .filter((b) => a.left < b.right && b.left < a.right && a.top < b.bottom - 1 && b.top < a.bottom - 1)
          .map((b) => `${a.text} over ${b.text}`),
      );
      expect(over).toEqual([]);
    });
  }
  it("draws every row, in its group's shape, at its place", () => {
    const [, lines] = plots.find(([, plot]) => plot.kind === "lines")!;
    const rows = lines.points.reduce((sum, { x }) => sum + x.length, 0);
    const drawn = [...figureSvg(lines).matchAll(/stroke-opacity="0.55" d="([^"]*)"/g)].map(([, d]) => d.split("M").length - 1);
    expect(drawn).toEqual(lines.points.map(({ x }) => x.length));
    expect(drawn.reduce((a, b) => a + b)).toBe(rows);
  });
  it("holds hostile names as text", () => {
    const hostile = '</title><script>x</script><img src=x onerror="a">&amp;]]>\u0000\ud800';
    const [, plot] = plots[0];
    const svg = figureSvg({ ...plot, title: hostile, summary: hostile, groups: plot.groups.map(() => hostile) });
    expect(svg).not.toMatch(/<script|<img|\u0000/);
    expect(textsOf(svg)[0]).toBe(hostile.replace(/[\u0000\ud800]/g, " "));
    expect(Buffer.from(svg).toString()).toBe(svg);
  });
});

describe("places and letters", () => {
  test("a value lies between the ends as its share says, by logarithm where the axis is one", () => {
    const axis = { label: "", from: 1, to: 100, ticks: [], log: false };
    expect([1, 50.5, 100].map(placer(axis, 10, 20))).toEqual([10, 15, 20]);
    expect([1, 10, 100].map(placer({ ...axis, log: true }, 20, 10))).toEqual([20, 15, 10]);
    expect(placer({ ...axis, from: -1.7e308, to: 1.7e308 }, 0, 10)(0)).toBe(5);
  });
  test("whatever the text, its lines hold all of it and none is wider than a line of more than a letter may be", () => {
    fc.assert(
      fc.property(fc.string({ unit: "grapheme", maxLength: 120 }), fc.integer({ min: 20, max: 300 }), (text, width) => {
        const widthOf = (part: string) => guessWidth(part, 13);
        const lines = wrapped(text, width, widthOf);
        expect(lines.join("").replaceAll(/\s/g, "")).toBe(text.replaceAll(/\s/g, ""));
        for (const line of lines) expect([...line].length === 1 || widthOf(line) <= width).toBe(true);
      }),
    );
  });
  test("whatever the text, nothing of it is read as markup", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary", maxLength: 60 }), (text) => {
        expect(escapeXml(text)).toMatch(/^(?:[^<>&"'\ud800-\udfff]|[\ud800-\udbff][\udc00-\udfff]|&(?:lt|gt|amp|#34|#39);)*$/);
      }),
    );
  });
  test("names at the ends of lines lie a line apart, inside the plot, in the lines' order", () => {
    const area = { left: 0, top: 0, width: 400, height: 200 };
    const x = [0, 5, 10];
    const at = (ends: readonly number[]): Plot => {
      const axis = { label: "", from: 0, to: 10, ticks: [], log: false };
      const curves = ends.map((end, group) => ({ name: "", group, x, y: [5, 5, end], supported: true }));
      return { ...plots[0][1], kind: "lines", x: axis, y: axis, groups: ends.map((_, i) => `group ${i}`), curves };
    };
    fc.assert(
      fc.property(
        fc.array(
          fc.integer({ min: 0, max: 100 }).map((end) => end / 10),
          { minLength: 1, maxLength: 12 },
        ),
        (ends) => {
          const plot = at(ends);
          const labels = endLabels(plot, frameOf(plot.x, plot.y, area), (text) => 7 * text.length, 15);
          expect(labels.length).toBe(ends.length);
          labels.forEach(({ middle, right, group }, i) => {
            expect(middle).toBeGreaterThanOrEqual(7.5 - 1e-9);
            expect(middle).toBeLessThanOrEqual(192.5 + 1e-9);
            expect(right).toBeLessThanOrEqual(400);
            if (i === 0) return;
            expect(middle - labels[i - 1].middle).toBeGreaterThanOrEqual(15 - 1e-9);
            expect(ends[group]).toBeLessThanOrEqual(ends[labels[i - 1].group]);
          });
        },
      ),
    );
  });
});
