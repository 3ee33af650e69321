import assert from "node:assert/strict";
import { after, before, test } from "node:test";
import { openBrowser } from "./page.mjs";
import { panel, STATES } from "./states.mjs";

let browser;
before(async () => (browser = await openBrowser()));
after(() => browser.close());

const ASKED = { set: null, modifier: null, contrast: null };
const slopes = (choice) => ({ v: 1, type: "slopes", choice: choice && { ...ASKED, ...choice } });
const ALONG = STATES["slopes along a number"];
const closed = (state) => ({ ...state, slopes: null });

test("closed it says the finding and asks for nothing; opened and closed it asks once each", async () => {
  const { page, sent, show, close } = await browser.open({ state: closed(ALONG) });
  const section = page.locator("[data-section=slopes]");
  assert.equal(await section.locator("summary").first().innerText(), "slopes differ in mean wind for the reported set");
  assert.equal(await section.locator("figure").count(), 0);
  await section.locator("summary").first().click();
  await page.getByText("The slopes are being drawn…").waitFor();
  await show(ALONG);
  assert.equal(await section.locator("figure").count(), 2);
  await show(ALONG);
  await section.locator("summary").first().click();
  assert.equal(await section.locator("figure").first().isVisible(), false);
  await show(closed(ALONG));
  assert.deepEqual(await sent(), [slopes({}), slopes(null)]);
  await close();
});

test("each list is one message; what was chosen before stays chosen", async () => {
  const { page, sent, close } = await browser.open({ state: ALONG });
  const { sets, modifiers } = ALONG.slopes;
  await page.locator("[data-role=slopes-modifier]").selectOption(modifiers[1].name);
  await page.locator("[data-role=slopes-set]").selectOption(sets[2].label);
  assert.deepEqual(await sent(), [
    slopes({ modifier: modifiers[1].name }),
    slopes({ set: sets[2].index, modifier: modifiers[1].name }),
  ]);
  assert.deepEqual((await page.evaluate(() => window.kept())).slopes, {
    set: sets[2].label,
    modifier: modifiers[1].name,
    contrast: null,
  });
  await close();
});

test("the contrast can be chosen where there are several, and nowhere else", async () => {
  const three = await browser.open({ state: STATES["slopes of three groups"] });
  const { contrasts } = STATES["slopes of three groups"].slopes;
  await three.page.locator("[data-role=slopes-contrast]").selectOption(contrasts[0]);
  assert.deepEqual(await three.sent(), [slopes({ contrast: 0 })]);
  await three.close();
  const two = await browser.open({ state: ALONG });
  assert.equal(await two.page.locator("[data-role=slopes-contrast]").count(), 0);
  await two.close();
});

test("a page that comes back asks for what was open, in the words a person chose by", async () => {
  const { sets } = ALONG.slopes;
  const kept = { open: ["slopes"], slopes: { ...ASKED, set: sets[1].label } };
  const { sent, show, close } = await browser.open({ state: closed(ALONG), kept });
  assert.deepEqual(await sent(), [slopes({})]);
  await show(ALONG);
  assert.deepEqual((await sent()).slice(1), [slopes({ set: sets[1].index })]);
  // the plan changes: the same columns are another set now
  const moved = { ...ALONG.slopes, set: 0, sets: sets.map(({ index, label }) => ({ index: (index + 1) % sets.length, label })) };
  await show({ ...ALONG, slopes: moved });
  assert.deepEqual((await sent()).slice(2), [slopes({ set: (sets[1].index + 1) % sets.length })]);
  // and then gone: back to the reported one
  await show({ ...ALONG, slopes: { ...moved, sets: moved.sets.filter(({ label }) => label !== sets[1].label) } });
  assert.deepEqual((await sent()).slice(3), [slopes({})]);
  await close();
});

test("a page that was hidden with the section open asks for nothing it is given already", async () => {
  const { sent, page, close } = await browser.open({ state: ALONG, kept: { open: ["slopes"] } });
  assert.equal(await page.locator("figure").count(), 2);
  assert.deepEqual(await sent(), []);
  await close();
});

test("a page that forgot that the section was open closes it at the host too", async () => {
  const { sent, close } = await browser.open({ state: ALONG, kept: { open: [] } });
  assert.deepEqual(await sent(), [slopes(null)]);
  await close();
});

test("every sentence, title and cell stands on the page as the host said it", async () => {
  for (const [name, { slopes: section }] of Object.entries(STATES).filter(([, state]) => state.slopes)) {
    const { page, faults, close } = await browser.open({ state: STATES[name] });
    const texts = (selector) => page.locator(selector).evaluateAll((all) => all.map((element) => element.textContent));
    assert.deepEqual(await texts(".sentences p"), section.sentences, name);
    assert.deepEqual(
      await texts("figcaption"),
      section.plots.map(({ title }) => title),
      name,
    );
    const cells = section.plots.flatMap(({ twin }) => [...twin.head, ...twin.rows.flat()]);
    assert.deepEqual(await texts(".twin th, .twin td"), cells, name);
    assert.equal(await page.locator("img").count(), 0);
    assert.equal(await page.evaluate(() => document.body.dataset.hacked), undefined);
    assert.deepEqual(faults, []);
    await close();
  }
});

test("while a new result is on its way the old figures stay, marked busy, and say so when it takes long", async () => {
  const { page, show, close } = await browser.open({ state: ALONG });
  const first = await page.locator("figure").first().elementHandle();
  await page.locator("[data-plot=difference] details summary").focus();
  await show(closed(ALONG));
  assert.equal(await page.locator(".slopes").getAttribute("aria-busy"), "true");
  assert.equal(await page.locator("figure").count(), 2);
  await page.getByText("The slopes are being drawn…").waitFor();
  await show(ALONG);
  assert.equal(await page.locator(".slopes").getAttribute("aria-busy"), "false");
  assert.equal(await first.evaluate((element) => element.isConnected), true);
  assert.equal(await page.evaluate(() => document.activeElement.dataset.focus), "plot difference");
  await close();
});

test("where there is nothing to say of slopes there is no section", async () => {
  const { page, close } = await browser.open({ state: panel({}, { slopesSummary: "" }) });
  assert.equal(await page.locator("[data-section=slopes]").isVisible(), false);
  await close();
});

test("by keyboard a plot is read stop by stop, in the host's words, and other keys are left alone", async () => {
  for (const [name, kind] of [
    ["slopes along a number", "difference"],
    ["slopes by a category", "levels"],
    ["slopes of one line", "added"],
  ]) {
    const state = STATES[name];
    const { page, close } = await browser.open({ state });
    const { stops } = state.slopes.plots.find((plot) => plot.kind === kind);
    const plot = page.locator(`[data-plot=${kind}] .plot`);
    const said = page.locator(`[data-plot=${kind}] [aria-live=polite]`);
    const reads = async (key) => {
      await page.keyboard.press(key);
      return said.textContent();
    };
    await plot.focus();
    assert.match(await said.textContent(), /arrow keys/);
    assert.equal(await reads("ArrowRight"), stops[0].text);
    assert.equal(await reads("ArrowRight"), stops[1].text);
    assert.equal(await reads("End"), stops.at(-1).text);
    assert.equal(await reads("ArrowRight"), stops.at(-1).text);
    assert.equal(await reads("ArrowLeft"), stops.at(-2).text);
    assert.equal(await reads("Home"), stops[0].text);
    assert.equal(await reads("a"), stops[0].text);
    assert.equal(await reads("Control+End"), stops[0].text);
    assert.ok((await page.locator(`[data-plot=${kind}] .plot-ring`).count()) > 0);
    await page.keyboard.press("Tab");
    assert.equal(await plot.evaluate((element) => element === document.activeElement), false);
    await close();
  }
});

test("under the pointer a plot says the nearest stop, marks it on the curve, and goes back to where a person stood", async () => {
  const { page, close } = await browser.open({ state: ALONG, kept: { open: ["slopes"] } });
  const { stops, x, y } = ALONG.slopes.plots[1];
  const plot = page.locator("[data-plot=difference] .plot");
  const said = page.locator("[data-plot=difference] [aria-live=polite]");
  await plot.focus();
  await page.keyboard.press("End");
  await plot.scrollIntoViewIfNeeded();
  const area = await page.locator("[data-plot=difference] .plot-area").boundingBox();
  const stop = stops[Math.floor(stops.length / 3)];
  const left = area.x + ((stop.x - x.from) / (x.to - x.from)) * area.width;
  const before = await page.locator("[data-plot=difference]").boundingBox();
  await page.mouse.move(left, area.y + 40);
  assert.equal(await said.textContent(), stop.text);
  const ring = await page.locator("[data-plot=difference] .plot-ring").boundingBox();
  const top = area.y + ((y.to - stop.y) / (y.to - y.from)) * area.height;
  assert.ok(Math.abs(ring.x + ring.width / 2 - left) < 1.5 && Math.abs(ring.y + ring.height / 2 - top) < 1.5);
  assert.deepEqual(await page.locator("[data-plot=difference]").boundingBox(), before, "nothing moves");
  await page.mouse.move(2, 2);
  assert.equal(await said.textContent(), stops.at(-1).text);
  await close();
});

test("a new result leaves the focus on the plot, the place read and the scroll where they were", async () => {
  const { page, show, close } = await browser.open({ state: ALONG });
  const [lines, difference] = ALONG.slopes.plots;
  const plot = page.locator("[data-plot=difference] .plot");
  await plot.focus();
  await page.keyboard.press("End");
  const scroll = await page.evaluate(() => window.scrollY);
  assert.ok(scroll > 0);
  const stops = difference.stops.slice(0, -2).map((stop) => ({ ...stop, text: `${stop.text} Again.` }));
  await show({ ...ALONG, slopes: { ...ALONG.slopes, plots: [lines, { ...difference, stops }] } });
  assert.equal(await plot.evaluate((element) => element === document.activeElement), true);
  assert.equal(await page.locator("[data-plot=difference] [aria-live=polite]").textContent(), stops.at(-1).text);
  assert.equal(await page.evaluate(() => window.scrollY), scroll);
  await close();
});
