// The Slopes section in a real workbench: opened by a person, drawn, read by keyboard, redrawn after a save, closed.
import assert from "node:assert";
import fs from "node:fs";
import path from "node:path";

/**
 * @param t the test it is a part of
 * @param open opens the comparison of a file in the panel and waits for it
 * @param say what the command line prints of a plan
 */
export async function slopesSection(t, { root, folder, page, open, say }) {
  const sample = (name) => path.join(root, "samples", name);
  for (const name of ["glazing.csv", "glazing.slantwise.json"]) fs.copyFileSync(sample(name), path.join(folder, name));
  const csv = path.join(folder, "glazing.csv");
  const plan = path.join(folder, "glazing.slantwise.json");
  const section = () => page().locator("[data-section=slopes]");
  const sentences = () => section().locator(".sentence").allInnerTexts();
  /** The command line's sentences, its line breaks undone. */
  const said = () => say(plan).replaceAll(/\s+/g, " ");

  await t.test("Slopes are drawn when asked for, in the command line's words, and read stop by stop", async () => {
    await open(plan);
    assert.equal(await section().locator("canvas").count(), 0);
    await section().locator('[data-focus="slopes"]').click();
    await section().locator("canvas").nth(1).waitFor({ timeout: 30_000 });
    const words = said();
    const [headline, places] = await sentences();
    assert.ok(words.includes(headline), headline);
    assert.ok(words.includes(places), places);
    await section().locator("canvas").nth(1).press("ArrowRight");
    await section()
      .getByText(/^At mean wind .* higher|lower/)
      .first()
      .waitFor();
  });

  await t.test("a save redraws the slopes, and nobody has to open them again", async () => {
    const [, before] = await sentences();
    const [head, ...rows] = fs.readFileSync(csv, "utf8").trim().split("\n");
    fs.writeFileSync(csv, [head, ...rows.slice(40)].join("\n") + "\n");
    await page().locator("[data-section=slopes] .sentence").nth(1).filter({ hasNotText: before }).waitFor({ timeout: 20_000 });
    const [, after] = await sentences();
    assert.ok(said().includes(after), after);
    await section().locator('[data-focus="slopes"]').click();
    await section().locator("canvas").first().waitFor({ state: "detached" });
  });
}
