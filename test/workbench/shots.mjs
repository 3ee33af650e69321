// Pictures of the panel in a real workbench, for people to look at: node test/workbench/shots.mjs [FOLDER]
// Every sample in the light, dark and high-contrast themes at three widths of the panel; one of them is README's picture.
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { layWorkbench } from "./cache.mjs";
import { connectHost } from "./host.mjs";
import { startServer } from "./server.mjs";
import { openWorkbench } from "./workbench.mjs";

const root = path.join(import.meta.dirname, "../..");
const out = path.resolve(process.argv[2] ?? path.join(root, ".shots"));
const THEMES = { light: "Default Light Modern", dark: "Default Dark Modern", hc: "Default High Contrast" };
/** Widths of the panel, from widths of the window with the side bar closed and two editors side by side. */
const WIDTHS = { 360: 770, 600: 1250, 1000: 2050 };
const SAMPLES = ["heating", "seals", "valves", "glazing"];
/** Heights of the window: of a panel as it opens, and with its plots. */
const [PLAIN, TALL] = [1250, 2600];

fs.mkdirSync(out, { recursive: true });
const folder = fs.mkdtempSync(path.join(os.tmpdir(), "slantwise-shots-"));
fs.cpSync(path.join(root, "samples"), folder, { recursive: true });
const server = await startServer({ workbench: layWorkbench(), bridge: true });
const wb = await openWorkbench({ server, folder, extension: root, width: 1600, height: 1000 });
try {
  const host = await connectHost(server);
  const page = wb.webview("slantwise.slantwise");
  await wb.quickOpen("clean.mjs");
  await wb.explorerMenu("heating.slantwise.json", "Open Comparison");
  await page.locator('body[data-status="ready"] [data-set]').first().waitFor({ timeout: 60_000 });
  await theme("light");
  await host.run((vscode) => vscode.commands.executeCommand("notifications.clearAll"));
  await wb.screenshot(path.join(out, "readme.png"));
  await host.run((vscode) => vscode.commands.executeCommand("workbench.action.closeSidebar"));
  for (const sample of SAMPLES) {
    await host.run(
      (vscode, file) => vscode.commands.executeCommand("slantwise.open", vscode.Uri.file(file)),
      path.join(folder, `${sample}.slantwise.json`),
    );
    await page.locator(`body[data-status="ready"] .facts:has-text("${sample}.csv")`).first().waitFor({ timeout: 60_000 });
    await everywhere(sample, PLAIN);
    await page.locator('[data-focus="slopes"]').click();
    await page.locator("[data-section=slopes] canvas").first().waitFor({ timeout: 30_000 });
    await everywhere(`${sample}-slopes`, TALL);
    await page.locator('[data-focus="slopes"]').click();
  }

  async function everywhere(what, height) {
    for (const [width, window] of Object.entries(WIDTHS)) {
      await wb.page.setViewportSize({ width: window, height });
      for (const name of Object.keys(THEMES)) {
        await theme(name);
        await wb.page.waitForTimeout(400); // the workbench lays itself out
        await wb.screenshot(path.join(out, `${what}-${width}-${name}.png`));
      }
    }
  }

  async function theme(name) {
    await host.run(
      (vscode, value) =>
        vscode.workspace.getConfiguration().update("workbench.colorTheme", value, vscode.ConfigurationTarget.Global),
      THEMES[name],
    );
    await page.locator(`body.vscode-${{ light: "light", dark: "dark", hc: "high-contrast" }[name]}`).waitFor();
  }
} finally {
  await wb.close();
  await server.stop();
  fs.rmSync(folder, { recursive: true, force: true });
}
console.log(`pictures in ${out}`);
