import assert from "node:assert/strict";
import fs from "node:fs";
import { createRequire } from "node:module";
import { after, before, test } from "node:test";
import { openBrowser } from "./page.mjs";
import { STATES } from "./states.mjs";
import { THEMES } from "./themes.mjs";

const axe = fs.readFileSync(createRequire(import.meta.url).resolve("axe-core/axe.min.js"), "utf8");
let browser;
before(async () => (browser = await openBrowser()));
after(() => browser.close());

for (const theme of Object.keys(THEMES)) {
  test(`axe finds no violation in ${theme}, in any state`, async () => {
    for (const [name, state] of Object.entries(STATES)) {
      for (const width of ["two groups", "slopes along a number"].includes(name) ? [1000, 360] : [1000]) {
        const { page, close } = await browser.open({ state, theme, width });
        const found = await page.evaluate(`${axe}; axe.run(document, { resultTypes: ["violations"] })`);
        const said = found.violations.flatMap(({ id, nodes }) => nodes.map((node) => `${id}: ${node.html.slice(0, 120)}`));
        assert.deepEqual(said, [], `${name}, ${width} px`);
        await close();
      }
    }
  });
}
