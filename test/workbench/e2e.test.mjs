// The whole path in a real workbench: MODE=dev (this folder) or MODE=vsix VSIX=file; WORKBENCH=folder of the laid workbench.
import assert from "node:assert";
import { execFileSync } from "node:child_process";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import test from "node:test";
import { layWorkbench } from "./cache.mjs";
import { connectHost } from "./host.mjs";
import { cellsOf, readPanel, rowsOfJson, rowsOfMarkdown, agree } from "./panel.mjs";
import { startServer } from "./server.mjs";
import { slopesSection } from "./slopes.mjs";
import { openWorkbench } from "./workbench.mjs";

const root = path.join(import.meta.dirname, "../..");
const mode = process.env.MODE ?? "dev";
const ID = "slantwise.slantwise";
const cli = (...args) =>
  execFileSync(process.execPath, [path.join(root, "dist/cli.js"), "compare", ...args], { encoding: "utf8" });
const wait = (ms) => new Promise((done) => setTimeout(done, ms));

/** A CSV with a group difference that a covariate explains in part; `shift` moves one group. */
function csv(rows, shift) {
  let state = 7;
  const next = () => (state = (state * 16807) % 2147483647) / 2147483647;
  const lines = ["flat,retrofit,floor_m2,kwh"];
  for (let i = 0; i < rows; i++) {
    const full = i % 2;
    const floor = 40 + 30 * full + Math.round(next() * 400) / 10;
    lines.push(`F${i},${full ? "full" : "none"},${floor},${Math.round(1000 + 40 * floor - shift * full + 300 * next())}`);
  }
  return lines.join("\n") + "\n";
}

test(`a comparison in a real workbench (${mode})`, async (t) => {
  const home = fs.mkdtempSync(path.join(os.tmpdir(), "slantwise-e2e-"));
  const folder = path.join(home, "workspace");
  const outside = path.join(home, "outside");
  fs.mkdirSync(folder);
  fs.mkdirSync(outside);
  const file = path.join(folder, "flats.csv");
  const far = path.join(outside, "far.csv");
  fs.writeFileSync(file, csv(200, 500));
  fs.writeFileSync(path.join(folder, "notes.md"), "# Notes\n");
  fs.writeFileSync(far, csv(120, 900));
  fs.writeFileSync(
    path.join(folder, "hostile.csv"),
    '"<img src=x onerror=""document.body.dataset.hit=1"">",arm,"a|b`c\nd",=cmd()\n' +
      Array.from(
        { length: 60 },
        (_, i) => `${50 + ((i * 37) % 23)},${i % 2 ? "<b>x</b>" : "y"},${(i * 13) % 17},${(i * 29) % 41}`,
      ).join("\n") +
      "\n",
  );

  const server = await startServer({
    workbench: process.env.WORKBENCH ?? layWorkbench(),
    bridge: true,
    vsix: mode === "vsix" ? [process.env.VSIX] : [],
  });
  const wb = await openWorkbench({ server, folder, extension: mode === "dev" ? root : undefined });
  t.after(async () => {
    await wb.close();
    await server.stop();
    fs.rmSync(home, { recursive: true, force: true });
  });
  const host = await connectHost(server);
  const page = () => wb.webview(ID);
  const ready = (of = page()) =>
    of.locator('body[data-status="ready"] [data-section="shifts"] [data-set]').first().waitFor({ timeout: 20_000 });

  /** The page's figures agree with what the command line prints for the same bytes. */
  async function matches(csvFile, ...options) {
    const markdown = rowsOfMarkdown(cli(csvFile, "--as", "markdown", ...options));
    const json = rowsOfJson(JSON.parse(cli(csvFile, "--as", "json", ...options)));
    await agree(() => readPanel(page()), markdown, json);
  }

  await t.test("right-click on a CSV opens the panel with the command line's figures", async () => {
    await wb.openRow("notes.md");
    await wb.explorerMenu("flats.csv", "Open Comparison");
    await ready();
    await matches(file);
    assert.equal(await page().locator('[data-section="question"]').count(), 1);
    assert.ok((await page().locator('[data-section="readout"]').innerText()).trim().length > 20);
    assert.equal(await page().locator('[aria-live="polite"]').count(), 1);
  });
  await t.test("the command is not offered for other files", async () => {
    assert.ok(!(await wb.menuLabels("notes.md")).includes("Open Comparison"));
  });
  await t.test("opening it again shows the panel that is there", async () => {
    await wb.explorerMenu("flats.csv", "Open Comparison");
    const tabs = await host.run((vscode) =>
      vscode.window.tabGroups.all
        .flatMap((group) => group.tabs)
        .filter((tab) => tab.label.startsWith("Comparison"))
        .map((tab) => tab.label),
    );
    assert.deepEqual(tabs, ["Comparison: flats.csv"]);
  });

  await t.test("the tab's context menu and the palette open it as well, over the other panel", async () => {
    fs.writeFileSync(path.join(folder, "second.TSV"), csv(80, 300).replaceAll(",", "\t"));
    await wb.openRow("second.TSV");
    await wb.tabMenu("second.TSV", "Open Comparison");
    await page().locator("body").getByText("second.TSV").first().waitFor();
    await ready();
    await matches(path.join(folder, "second.TSV"));
    await wb.openRow("flats.csv");
    await wb.command("Slantwise: Open Comparison");
    await page().locator("body").getByText("flats.csv").first().waitFor();
    await ready();
    await matches(file);
    const columns = await host.run((vscode) => vscode.window.tabGroups.all.length);
    assert.equal(columns, 2);
  });

  await t.test("a save in place changes the figures", async () => {
    fs.writeFileSync(file, csv(200, 800));
    await matches(file);
  });
  await t.test("a save by rename changes the figures", async () => {
    fs.writeFileSync(path.join(folder, ".flats.tmp"), csv(200, 100));
    fs.renameSync(path.join(folder, ".flats.tmp"), file);
    await matches(file);
  });
  await t.test("a file deleted and written again changes the figures, and is never called missing", async () => {
    const watch = statusesOf(page());
    fs.rmSync(file);
    await wait(400);
    fs.writeFileSync(file, csv(210, 300));
    await matches(file);
    assert.deepEqual(
      (await watch()).filter((status) => status === "missing" || status === "unusable"),
      [],
    );
  });
  await t.test("a file written slowly in pieces shows the old figures until it is whole", async () => {
    const before = await readPanel(page());
    const watch = statusesOf(page());
    const whole = csv(220, 1200);
    fs.writeFileSync(file, "");
    const seen = [];
    for (let at = 0; at < whole.length; at += Math.ceil(whole.length / 5)) {
      fs.appendFileSync(file, whole.slice(at, at + Math.ceil(whole.length / 5)));
      await wait(300);
      if (at + Math.ceil(whole.length / 5) < whole.length) seen.push(await readPanel(page()));
    }
    assert.deepEqual(
      seen,
      seen.map(() => before),
    );
    await matches(file);
    assert.deepEqual(
      (await watch()).filter((status) => status === "missing" || status === "unusable"),
      [],
    );
  });
  await t.test("an unusable file is named with its reason, the old figures stay, and the next save clears it", async () => {
    const before = await readPanel(page());
    fs.writeFileSync(file, 'flat,retrofit\n"F1,full\n');
    await page().locator('body[data-status="unusable"]').waitFor({ timeout: 20_000 });
    assert.match(await page().locator("body").innerText(), /flats\.csv/);
    assert.deepEqual(await readPanel(page()), before);
    fs.rmSync(file);
    await page().locator('body[data-status="missing"]').waitFor({ timeout: 20_000 });
    fs.writeFileSync(file, csv(200, 600));
    await ready();
    await matches(file);
  });

  await t.test("Copy as Markdown from the panel is the command line's Markdown", async () => {
    await page().locator('[data-copy="markdown"]').first().click();
    const expected = cli(file, "--as", "markdown").trimEnd();
    await until(
      async () => (await wb.readClipboard()).trimEnd() === expected,
      async () => assert.equal(await wb.readClipboard(), expected),
    );
  });
  await t.test("Copy as Table from the palette is tab-separated, one line a set", async () => {
    await wb.command("Slantwise: Copy as Table");
    await until(
      async () => (await wb.readClipboard()).includes("\t"),
      async () => assert.match(await wb.readClipboard(), /\t/),
    );
    const lines = (await wb.readClipboard()).trimEnd().split("\n");
    const rows = (await readPanel(page())).length;
    assert.ok(lines.filter((line) => line.includes("\t")).length >= rows + 1);
  });

  await t.test("the panel and the question chosen in it survive a reload of the window", async () => {
    const margin = async (of) =>
      of.run((vscode) => {
        const [state] = vscode.extensions
          .getExtension("slantwise.slantwise")
          .exports.states()
          .filter(({ file: name }) => name === "flats.csv");
        return state?.question?.plan.margin ?? null;
      });
    const field = page()
      .locator('[data-section="question"] input[inputmode], [data-section="question"] input[type="number"]')
      .last();
    await field.fill("123");
    await field.press("Enter");
    await until(
      async () => (await margin(host)) === 123,
      async () => assert.equal(await margin(host), 123),
    );
    await ready();
    await wait(1500); // a page's own state is written a moment after it was set
    await wb.page.reload();
    await wb.page.locator(".monaco-workbench").waitFor({ timeout: 60_000 });
    await ready();
    const renewed = await connectHost(server);
    await until(
      async () => (await margin(renewed).catch(() => null)) === 123,
      async () => assert.equal(await margin(renewed), 123),
    );
    await matches(file, "--margin", "123");
    fs.writeFileSync(file, csv(200, 150));
    await matches(file, "--margin", "123");
  });

  await t.test("a CSV outside the workspace folder is followed as well", async () => {
    const again = await connectHost(server);
    await again.run((vscode, at) => vscode.commands.executeCommand("slantwise.open", vscode.Uri.file(at)), far);
    await page().locator("body").getByText("far.csv").first().waitFor();
    await ready();
    await matches(far);
    fs.writeFileSync(far, csv(120, 20));
    await matches(far);
    fs.writeFileSync(far + ".tmp", csv(130, 2000));
    fs.renameSync(far + ".tmp", far);
    await matches(far);
  });

  await t.test("a header or cell that looks like markup, a table or a command shows as text", async () => {
    await wb.explorerMenu("hostile.csv", "Open Comparison");
    await page().locator("body").getByText("hostile.csv").first().waitFor();
    await ready();
    assert.equal(await page().locator("img").count(), 0);
    assert.equal(await page().locator("body").getAttribute("data-hit"), null);
    const text = await page().locator("body").innerText();
    const html = await page()
      .locator("body")
      .evaluate((body) => body.textContent + [...body.querySelectorAll("option")].map((o) => o.label).join());
    assert.ok(html.includes("<img src=x onerror="), text);
    assert.ok(!(await cellsOf(page())).some((cell) => /undefined|NaN|Infinity|\bnull\b/.test(cell)));
  });
  await slopesSection(t, {
    root,
    folder,
    page,
    say: cli,
    open: async (target) => {
      await wb.explorerMenu(path.basename(target), "Open Comparison");
      await page().locator("body").getByText("glazing.csv").first().waitFor();
      await ready();
    },
  });
  await t.test("the page and the extension raised no error", () => {
    const ours = wb.consoleLines.filter(
      (line) => /slantwise|Content Security Policy|Refused to/i.test(line) && /\[(error|pageerror)\]/.test(line),
    );
    assert.deepEqual(ours, []);
  });
});

/** Collects the statuses a page goes through from now on. */
function statusesOf(page) {
  const begun = page.locator("body").evaluate((body) => {
    const seen = [body.dataset.status];
    new MutationObserver(() => seen.push(body.dataset.status)).observe(body, {
      attributes: true,
      attributeFilter: ["data-status"],
    });
    window["statuses"] = seen;
  });
  return async () => {
    await begun;
    return page.locator("body").evaluate(() => window["statuses"]);
  };
}

async function until(holds, complain) {
  const end = Date.now() + 15_000;
  while (!(await holds())) {
    if (Date.now() > end) return complain();
    await wait(100);
  }
}
