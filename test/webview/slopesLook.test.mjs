import assert from "node:assert/strict";
import { after, before, test } from "node:test";
import { openBrowser } from "./page.mjs";
import { STATES } from "./states.mjs";

let browser;
before(async () => (browser = await openBrowser()));
after(() => browser.close());

const ALONG = STATES["slopes along a number"];
const kept = { open: ["slopes"] };

/** Painted pixels of a canvas, by colour; those that let the ground through only where asked. */
const painted = (page, kind, least = 255) =>
  page.locator(`[data-plot=${kind}] canvas`).evaluate((canvas, least) => {
    const { data } = canvas.getContext("2d").getImageData(0, 0, canvas.width, canvas.height);
    const colours = {};
    for (let i = 0; i < data.length; i += 4) {
      if (data[i + 3] < least) continue;
      const colour = [data[i], data[i + 1], data[i + 2]].join(" ");
      colours[colour] = (colours[colour] ?? 0) + 1;
    }
    return colours;
  }, least);

test("what is drawn follows the theme, at once and without a message", async () => {
  const { page, close } = await browser.open({ state: ALONG, theme: "dark", kept });
  const before = await painted(page, "difference");
  assert.ok(before["55 148 255"] > 200, "the theme's blue");
  await page.evaluate(() => {
    document.documentElement.style.setProperty("--vscode-charts-blue", "#00aa11");
    document.body.className = "vscode-light";
  });
  await page.waitForTimeout(50);
  const after = await painted(page, "difference");
  assert.ok(after["0 170 17"] > 200, "the new theme's");
  assert.equal(after["55 148 255"], undefined);
  await close();
});

test("in high contrast and in forced colours one colour is enough", async () => {
  const { page, close } = await browser.open({ state: ALONG, theme: "hc", kept });
  const grey = (colours) => Object.keys(colours).every((colour) => new Set(colour.split(" ")).size === 1);
  assert.ok(grey(await painted(page, "difference")));
  assert.ok(grey(await painted(page, "lines")));
  await close();
  const forced = await browser.open({ state: ALONG, theme: "light", kept });
  await forced.page.emulateMedia({ forcedColors: "active" });
  await forced.page.waitForTimeout(50);
  assert.ok(grey(await painted(forced.page, "difference")));
  await forced.close();
});

test("a plot that stays is drawn over in place, with the same canvas", async () => {
  const { page, show, close } = await browser.open({ state: ALONG, kept });
  const canvas = await page.locator("[data-plot=lines] canvas").elementHandle();
  const before = await painted(page, "lines", 1);
  const [lines, difference] = ALONG.slopes.plots;
  const fewer = {
    ...lines,
    points: lines.points.map((points) => ({ ...points, x: points.x.slice(0, 9), y: points.y.slice(0, 9) })),
  };
  await show({ ...ALONG, slopes: { ...ALONG.slopes, plots: [fewer, difference] } });
  assert.equal(await canvas.evaluate((element) => element.isConnected), true);
  const sum = (colours) => Object.values(colours).reduce((all, count) => all + count, 0);
  assert.ok(sum(await painted(page, "lines", 1)) < sum(before));
  await close();
});

test("names of groups stand beside their lines and strips, and no two lie over each other", async () => {
  for (const name of [
    "slopes along a number",
    "slopes of six groups",
    "slopes of groups that share little",
    "slopes by long levels",
  ]) {
    for (const width of [360, 600, 1000]) {
      const { page, close } = await browser.open({ state: STATES[name], width, kept });
      const found = await page.locator("figure").evaluateAll((figures) =>
        figures.map((figure) => {
          const { left, right, top, bottom } = figure.querySelector(".plot").getBoundingClientRect();
          const boxes = [...figure.querySelectorAll(".plot-name")].map((label) => label.getBoundingClientRect());
          const meet = (a, b) =>
            Math.min(a.right, b.right) - Math.max(a.left, b.left) > 1 &&
            Math.min(a.bottom, b.bottom) - Math.max(a.top, b.top) > 3;
          return {
            names: boxes.length,
            over: boxes.some((a, i) => boxes.slice(i + 1).some((b) => meet(a, b))),
            out: boxes.some((a) => a.left < left - 1 || a.right > right + 1 || a.top < top - 1 || a.bottom > bottom + 2),
          };
        }),
      );
      for (const { names, over, out } of found)
        assert.deepEqual({ names: names > 0, over, out }, { names: true, over: false, out: false }, `${name}, ${width} px`);
      await close();
    }
  }
});

test("plots of an axis have it at the same place, to the pixel", async () => {
  for (const name of ["slopes along a number", "slopes of three groups", "slopes of six groups", "slopes along a logarithm"]) {
    for (const width of [360, 600, 1000]) {
      const { page, close } = await browser.open({ state: STATES[name], width, kept });
      const areas = await page.locator(".plot-area").evaluateAll((all) =>
        all.map((area) => {
          const { left, right } = area.getBoundingClientRect();
          return [left, right];
        }),
      );
      assert.equal(areas.length, 2);
      assert.deepEqual(areas[0], areas[1], `${name}, ${width} px`);
      assert.ok(areas[0][1] - areas[0][0] > width * 0.55);
      await close();
    }
  }
});
