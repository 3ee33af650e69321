import assert from "node:assert/strict";
import { after, before, test } from "node:test";
import { openBrowser } from "./page.mjs";
import { STATES } from "./states.mjs";

let browser;
before(async () => (browser = await openBrowser()));
after(() => browser.close());

const SHOWN = Object.entries(STATES).filter(([, state]) => state.slopes?.plots.length);
const kept = { open: ["slopes"] };
const save = (page, kind, as) => page.locator(`[data-plot=${kind}] [data-save=${as}]`);

test("every plot is sent as an SVG that a browser reads, with title and summary, as text whatever its names hold", async () => {
  for (const [name, { slopes }] of SHOWN) {
    const { page, sent, faults, close } = await browser.open({ state: STATES[name], kept });
    for (const { kind } of slopes.plots) await save(page, kind, "svg").click();
    const messages = await sent();
    assert.deepEqual(
      messages.map(({ type, id, figure }) => [type, id, figure.as, figure.name]),
      slopes.plots.map(({ title }, i) => ["saveFigure", i + 1, "svg", title]),
      name,
    );
    for (const [i, { figure }] of messages.entries()) {
      const read = await page.evaluate((text) => {
        const picture = new DOMParser().parseFromString(text, "image/svg+xml");
        const tags = [...new Set([...picture.querySelectorAll("*")].map((element) => element.tagName))];
        const said = (tag) => picture.querySelector(tag)?.textContent;
        return {
          tags: tags.sort(),
          title: said("title"),
          desc: said("desc"),
          error: picture.querySelector("parsererror") !== null,
        };
      }, figure.data);
      const { title, summary } = slopes.plots[i];
      assert.deepEqual({ title: read.title, desc: read.desc, error: read.error }, { title, desc: summary, error: false }, name);
      assert.deepEqual(
        read.tags.filter((tag) => !["svg", "title", "desc", "rect", "g", "path", "text"].includes(tag)),
        [],
        name,
      );
    }
    assert.deepEqual(faults, []);
    await close();
  }
});

test("as a PNG it is that picture at twice its size, black on white in any theme", async () => {
  for (const theme of ["dark", "hc"]) {
    const { page, sent, faults, close } = await browser.open({ state: STATES["slopes along a number"], theme, kept });
    await save(page, "difference", "svg").click();
    await save(page, "difference", "png").click();
    await page.waitForFunction(() => window.sent.filter(({ type }) => type === "saveFigure").length === 2);
    const [vector, pixels] = await sent();
    assert.equal(pixels.figure.as, "png");
    const size = /width="(\d+)" height="(\d+)"/.exec(vector.figure.data).slice(1).map(Number);
    const seen = await page.evaluate(async (data) => {
      const image = new Image();
      image.src = `data:image/png;base64,${data}`;
      await image.decode();
      const canvas = Object.assign(document.createElement("canvas"), { width: image.width, height: image.height });
      const pen = canvas.getContext("2d");
      pen.drawImage(image, 0, 0);
      const { data: all } = pen.getImageData(0, 0, image.width, image.height);
      let white = 0;
      let dark = 0;
      for (let i = 0; i < all.length; i += 4) {
        if (all[i] + all[i + 1] + all[i + 2] === 3 * 255) white++;
        if (all[i] + all[i + 1] + all[i + 2] < 3 * 100) dark++;
      }
      return { size: [image.width, image.height], white: (4 * white) / all.length, dark };
    }, pixels.figure.data);
    assert.deepEqual(
      seen.size,
      size.map((side) => 2 * side),
    );
    assert.ok(seen.white > 0.7 && seen.dark > 500, JSON.stringify(seen));
    assert.deepEqual(faults, []);
    await close();
  }
});

test("the answer stands beside the buttons that asked, a failure too, and a dialog that was left says nothing", async () => {
  const { page, say, close } = await browser.open({ state: STATES["slopes along a number"], kept });
  const said = (kind) => page.locator(`[data-plot=${kind}] [role=status]`).textContent();
  await save(page, "lines", "svg").click();
  await save(page, "difference", "svg").click();
  await say({ type: "saved", id: 2, ok: true, text: "Saved as difference.svg." });
  await page.getByText("Saved as difference.svg.").waitFor();
  assert.equal(await said("difference"), "Saved as difference.svg.");
  assert.equal(await said("lines"), "");
  await say({ type: "saved", id: 1, ok: false, text: "kwh.svg could not be written." });
  await page.locator(".failed", { hasText: "kwh.svg could not be written." }).waitFor();
  await save(page, "lines", "svg").click();
  await say({ type: "saved", id: 3, ok: true, text: "" });
  await page.waitForTimeout(50);
  assert.equal(await said("lines"), "");
  await close();
});
