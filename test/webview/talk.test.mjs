import assert from "node:assert/strict";
import { after, before, test } from "node:test";
import { openBrowser } from "./page.mjs";
import { panel, STATES } from "./states.mjs";

let browser;
before(async () => (browser = await openBrowser()));
after(() => browser.close());

/** Opens a state, acts, and gives what the page has sent since. */
async function sends(state, act) {
  const open = await browser.open({ state });
  await act(open.page, open);
  const sent = await open.sent();
  await open.close();
  return sent;
}
const choose = (change) => ({ v: 1, type: "choose", change });

test("a page that loads asks for the state, once", async () => {
  const { page, close } = await browser.open();
  assert.deepEqual(await page.evaluate(() => window.sent), [{ v: 1, type: "ready" }]);
  await close();
});

test("every choice in the sentence is one message of the protocol", async () => {
  const sent = await sends(STATES["two groups"], async (page) => {
    await page.locator("[data-role=exposure]").selectOption("block");
    await page.locator("[data-role=reference]").selectOption("full");
    await page.locator("[data-role=outcome]").selectOption("built");
    await page.locator("[data-role=sets]").selectOption("every");
    await page.locator('[data-covariate="tenure"] button').click();
    await page.locator('[data-set="1"]').hover();
    await page.locator('[data-set="1"] button').click();
  });
  assert.deepEqual(sent, [
    choose({ key: "exposure", column: "block" }),
    choose({ key: "reference", level: "full" }),
    choose({ key: "outcome", column: "built" }),
    choose({ key: "sets", sets: "every" }),
    choose({ key: "covariates", columns: ["floor_m2"] }),
    choose({ key: "report", columns: ["floor_m2"] }),
  ]);
});

test("a question in no file can be saved as a plan, and a plan's own name opens it; why a choice is not in it is said", async () => {
  const sent = await sends(STATES["two groups"], (page) =>
    page.getByRole("button", { name: "Save the question as a plan" }).click(),
  );
  assert.deepEqual(sent, [{ v: 1, type: "savePlan" }]);
  const kept = panel({ keptIn: { plan: "heating.slantwise.json", note: "heating.slantwise.json is read-only." } });
  const opened = await sends(kept, async (page) => {
    assert.equal(await page.locator(".plan [role=status]").innerText(), "heating.slantwise.json is read-only.");
    assert.equal(await page.getByRole("button", { name: "Save the question as a plan" }).count(), 0);
    await page.getByRole("button", { name: "heating.slantwise.json" }).click();
  });
  assert.deepEqual(opened, [{ v: 1, type: "openLine", line: 1, inPlan: true }]);
});

test("a margin is sent on Enter or when the field is left, once, and only if it is a number above zero or nothing", async () => {
  const sent = await sends(STATES["two groups"], async (page) => {
    const margin = page.locator("[data-role=margin]");
    await margin.fill("200");
    await margin.press("Enter");
    await margin.press("Tab");
    await margin.fill("-3");
    await margin.press("Tab");
    assert.equal(await margin.getAttribute("aria-invalid"), "true");
    await margin.fill("");
    await margin.press("Tab");
  });
  assert.deepEqual(sent, [choose({ key: "margin", value: 200 }), choose({ key: "margin", value: null })]);
});

test("an average over stated rows can be asked for where slopes differ, and only there", async () => {
  const sent = await sends(STATES.varies, async (page) => {
    const over = page.locator("[data-role=average]");
    assert.deepEqual(await over.locator("option").allInnerTexts(), ["no rows", "all rows", "full", "none", "part"]);
    await over.selectOption("all rows");
    await over.selectOption({ label: "no rows" });
  });
  assert.deepEqual(sent, [choose({ key: "average", over: "all rows" }), choose({ key: "average", over: null })]);
  const open = await browser.open({ state: STATES["two groups"] });
  assert.equal(await open.page.locator("[data-role=average]").count(), 0);
  await open.close();
});

test("a covariate is found and added by keyboard alone, among 60 columns, and the focus comes back", async () => {
  const sent = await sends(STATES["60 columns"], async (page) => {
    await page.locator(".add").focus();
    await page.keyboard.press("Enter");
    await page.keyboard.type("reading_42");
    await page.keyboard.press("Enter");
    assert.equal(await page.evaluate(() => document.activeElement.dataset.focus), "add");
  });
  assert.deepEqual(sent, [choose({ key: "covariates", columns: ["floor_m2", "tenure", "reading_42"] })]);
});

test("a column that cannot be held fixed is listed with the reason and not taken", async () => {
  const sent = await sends(STATES["two groups"], async (page) => {
    await page.locator(".add").click();
    const option = page.locator("[role=option]", { hasText: "flat_id" });
    assert.match(await option.innerText(), /differs in nearly every row/);
    await option.click({ force: true });
  });
  assert.deepEqual(sent, []);
});

test("two covariates taken off at once are both off", async () => {
  const sent = await sends(STATES["two groups"], async (page) => {
    await page.locator('[data-covariate="tenure"] button').click();
    await page.locator('[data-covariate="floor_m2"] button').click();
  });
  assert.deepEqual(sent.at(-1), choose({ key: "covariates", columns: [] }));
});

test("a long list is walked by keyboard, said exactly, and filtered by the host", async () => {
  const sent = await sends(STATES["256 sets"], async (page) => {
    await page.locator("[role=slider]").focus();
    await page.keyboard.press("End");
    assert.match(await page.locator("[role=slider]").getAttribute("aria-valuetext"), /^256 of 256: .*-298 exactly$/);
    await page.locator(".filter summary").click();
    await page.locator('[data-filter="covariate_1"]').selectOption("holds");
  });
  assert.deepEqual(sent, [{ v: 1, type: "filter", filter: { holds: ["covariate_1"], omits: [] } }]);
});

test("a copy is answered beside its button", async () => {
  const sent = await sends(STATES["two groups"], async (page, { say }) => {
    await page.locator("[data-copy=markdown]").click();
    await say({ type: "copied", id: 1, ok: true, text: "Copied as Markdown." });
    await page.getByText("Copied as Markdown.").waitFor();
    await page.locator("[data-copy=table]").click();
  });
  assert.deepEqual(
    sent,
    [1, 2].map((id) => ({ v: 1, type: "copy", id, as: id === 1 ? "markdown" : "table" })),
  );
});

test("a file that cannot be used is opened at its line, or read again", async () => {
  const sent = await sends(STATES.unusable, async (page) => {
    await page.getByText("Open line 214").click();
    await page.getByText("Read Again").click();
    await page.getByText("line 17", { exact: true }).click();
  });
  assert.deepEqual(sent, [
    { v: 1, type: "openLine", line: 214 },
    { v: 1, type: "readAgain" },
    { v: 1, type: "openLine", line: 17 },
  ]);
});

test("only a re-run is announced, and a refresh leaves focus and typing alone", async () => {
  const { page, show, close } = await browser.open({ state: panel() });
  const live = page.locator("[aria-live=polite]");
  assert.equal(await live.count(), 1);
  assert.equal(await live.textContent(), "");
  await page.locator("[data-role=margin]").fill("17");
  await show(panel({ reading: { number: 8, at: new Date().toISOString() } }, { summary: "Now 100 lower." }));
  assert.equal(await live.textContent(), "Now 100 lower.");
  assert.equal(await page.locator("[data-role=margin]").inputValue(), "17");
  assert.equal(await page.evaluate(() => document.activeElement.dataset.role), "margin");
  await close();
});

test("the page keeps its target, and Tab goes through it and out again", async () => {
  const { page, close } = await browser.open({ state: panel() });
  assert.equal((await page.evaluate(() => window.kept())).target, "file:///heating.csv");
  const seen = [];
  for (let i = 0; i < 40; i++) {
    await page.keyboard.press("Tab");
    seen.push(await page.evaluate(() => document.activeElement.dataset?.focus ?? document.activeElement.tagName));
    if (seen.at(-1) === "BODY") break;
  }
  assert.ok(seen.includes("exposure") && seen.includes("margin") && seen.includes("copy-table"), seen.join(" "));
  assert.ok(seen.indexOf("exposure") < seen.indexOf("margin"));
  assert.equal(new Set(seen.filter((name) => name !== "BODY")).size >= 10, true);
  await close();
});
