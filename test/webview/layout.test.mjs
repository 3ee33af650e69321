import assert from "node:assert/strict";
import { after, before, test } from "node:test";
import { misplaced, openBrowser } from "./page.mjs";
import { STATES } from "./states.mjs";

let browser;
before(async () => (browser = await openBrowser()));
after(() => browser.close());

for (const [name, state] of Object.entries(STATES)) {
  test(`${name}: nothing is cut off or lies over something else at 360, 600 and 1000 px, and the policy is kept`, async () => {
    const { page, faults, close } = await browser.open({ state });
    for (const width of [360, 600, 1000]) {
      await page.setViewportSize({ width, height: 900 });
      await page.waitForTimeout(60);
      assert.deepEqual(await misplaced(page), [], `${width} px`);
    }
    assert.deepEqual(faults, []);
    await close();
  });
}

test("at 200 % zoom nothing is cut off", async () => {
  const { page, close } = await browser.open({ state: STATES["two groups"], width: 800 });
  await page.setViewportSize({ width: 400, height: 450 });
  await page.evaluate(() => document.documentElement.style.setProperty("--vscode-font-size", "26px"));
  await page.waitForTimeout(60);
  assert.deepEqual(await misplaced(page), []);
  await close();
});

test("names are text, whatever they hold", async () => {
  const { page, close } = await browser.open({ state: STATES["hostile names"] });
  assert.equal(await page.locator("img").count(), 0);
  assert.equal(await page.evaluate(() => document.body.dataset.hacked), undefined);
  assert.match(await page.locator('[data-set="1"] [data-cell="held"]').innerText(), /<img src=x/);
  await close();
});
