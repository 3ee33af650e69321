// Opens the workbench in Debian's Chromium and gives tests what they need of it.
import { chromium } from "playwright-core";
import fs from "node:fs";
import path from "node:path";

const FLAGS = [
  "--no-sandbox",
  "--disable-gpu",
  "--disable-quic",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
];

export async function openWorkbench({
  server,
  folder,
  workspace,
  extension,
  tests,
  width = 1400,
  height = 900,
  browser: given,
  permissions = ["clipboard-read", "clipboard-write"],
  colorScheme,
  reducedMotion,
  forcedColors,
  query = {},
  onTestLine,
}) {
  const browser = given ?? (await chromium.launch({ executablePath: process.env.CHROMIUM ?? "/usr/bin/chromium", args: FLAGS }));
  const origin = `http://${server.authority}`;
  const context = await browser.newContext({ viewport: { width, height }, colorScheme, reducedMotion, forcedColors });
  if (permissions.length) await context.grantPermissions(permissions, { origin });
  const page = await context.newPage();

  // Console of the window; the extension host's own console comes through here as well.
  const consoleLines = [];
  page.on("console", (m) => consoleLines.push(`[${m.type()}] ${m.text()}`));
  page.on("pageerror", (e) => consoleLines.push("[pageerror] " + e.message));

  // The workbench calls these when an extension test run ends (exit) and for each log line (log).
  let finish;
  const ended = new Promise((r) => {
    finish = r;
  });
  const testLines = [];
  await page.exposeFunction("codeAutomationExit", (code, logs) => finish({ code, logs }));
  await page.exposeFunction("codeAutomationLog", (type, args) => {
    testLines.push({ type, args });
    onTestLine?.(type, args);
  });

  // Extensions in development and tests: written into the page's own configuration, as VS Code's embedder API has it
  // (developmentOptions). The `payload` query does the same up to 1.117, for one extension only, but in 1.139 only together with
  // --enable-smoke-test-driver, which also silences notification toasts (1.139) or refuses dialogs (1.100).
  const remote = (p) => ({ scheme: "vscode-remote", authority: server.authority, path: path.resolve(p) });
  const dev = [extension ?? []].flat().map(remote);
  // (Not by intercepting the document: Chromium then takes it for a public page and blocks its WebSocket to loopback.)
  await page.addInitScript(
    ({ dev, tests }) => {
      if (window.top !== window) return;
      new MutationObserver((_, self) => {
        const el = document.getElementById("vscode-workbench-web-configuration");
        if (!el) return;
        self.disconnect();
        const c = JSON.parse(el.dataset.settings);
        c.developmentOptions = {
          ...c.developmentOptions,
          ...(dev.length ? { extensions: dev } : {}),
          ...(tests ? { extensionTestsPath: tests } : {}),
        };
        delete c.productConfiguration.extensionsGallery; // or the page asks open-vsx.org at every start
        delete c.productConfiguration.serviceWorker; // served by code-server's own front end, which is not running
        el.dataset.settings = JSON.stringify(c);
      }).observe(document, { childList: true, subtree: true });
    },
    { dev, tests: tests && remote(tests) },
  );
  const q = new URLSearchParams({
    ...(folder ? { folder: path.resolve(folder) } : workspace ? { workspace: path.resolve(workspace) } : { ew: "true" }),
    ...query,
  });
  const t0 = Date.now();
  await page.goto(`${origin}/?${q}`);
  await page.locator(".monaco-workbench").waitFor({ timeout: 60_000 });
  const wb = {
    browser,
    context,
    page,
    consoleLines,
    testLines,
    ended,
    startedMs: Date.now() - t0,

    /** explorer row by file name (rows are virtual: only what is scrolled into view exists) */
    row: (name) =>
      page
        .locator(".explorer-folders-view [role=treeitem]")
        .filter({
          has: page.locator(`.label-name`, { hasText: new RegExp("^" + name.replace(/[.*+?^${}()|[\]\\]/g, "\\$&") + "$") }),
        })
        .first(),

    /** right click in the explorer, then the menu entry with that exact label; tries again until our extension has registered it */
    async explorerMenu(name, entry, timeout = 30_000) {
      const menu = page.locator(".context-view .monaco-menu");
      const item = menu
        .locator("[role=menuitem]")
        .filter({ has: page.locator(`.action-label:text-is("${entry}")`) })
        .first();
      const end = Date.now() + timeout;
      for (;;) {
        await wb.row(name).click({ button: "right" });
        await menu.locator("[role=menuitem]").first().waitFor({ timeout: 10_000 });
        if (await item.count()) break;
        const seen = await menu.locator(".action-label").allTextContents();
        await page.keyboard.press("Escape");
        await menu.waitFor({ state: "detached", timeout: 5000 });
        if (Date.now() > end) throw new Error(`no «${entry}» in the menu of ${name}: ${seen.join(" | ")}`);
        await page.waitForTimeout(300);
      }
      await item.hover();
      await page.waitForTimeout(150); // a menu ignores a mouse-up in the first ~100 ms after it opened
      await item.click();
      await menu.waitFor({ state: "detached", timeout: 5000 });
    },
    /** right click on an editor's tab, then the entry */
    async tabMenu(name, entry) {
      await page.locator(".tab").filter({ hasText: name }).first().click({ button: "right" });
      const menu = page.locator(".context-view .monaco-menu");
      const item = menu
        .locator("[role=menuitem]")
        .filter({ has: page.locator(`.action-label:text-is("${entry}")`) })
        .first();
      await item.hover();
      await page.waitForTimeout(150);
      await item.click();
      await menu.waitFor({ state: "detached", timeout: 5000 });
    },
    /** double click on the explorer's row: the file's own editor, to stay */
    async openRow(name) {
      await wb.row(name).dblclick();
      await page
        .locator(".tab.active")
        .filter({ has: page.locator(`.label-name:text-is("${name}")`) })
        .first()
        .waitFor();
    },
    async menuLabels(name) {
      await wb.row(name).click({ button: "right" });
      await page.locator(".context-view .monaco-menu [role=menuitem]").first().waitFor();
      const l = await page.locator(".context-view .monaco-menu .action-label").allTextContents();
      await page.keyboard.press("Escape");
      return l.map((s) => s.trim()).filter(Boolean);
    },

    /** quick input, opened by a key; again if the key went to a webview that was just closed */
    async quick(key, text) {
      const box = page.locator(".quick-input-widget input[type=text]").first();
      for (let i = 0; ; i++) {
        await page.keyboard.press(key);
        try {
          await box.waitFor({ state: "visible", timeout: 3000 });
          break;
        } catch (e) {
          if (i === 4) throw e;
          await page
            .locator(".part.titlebar")
            .first()
            .click({ position: { x: 5, y: 5 } })
            .catch(() => {});
        }
      }
      await box.fill(text);
      return page.locator(".quick-input-list [role=option]");
    },
    async command(title) {
      // through the command palette, as a person would
      const rows = await wb.quick("F1", ">" + title);
      await rows.filter({ hasText: title }).first().click();
    },
    async quickOpen(name) {
      const rows = await wb.quick("Control+p", name);
      await rows.filter({ hasText: name }).first().click();
      await page.locator(".tab.active").filter({ hasText: name }).waitFor();
    },

    /** the document of our webview, two frames deep; of those on screen, the nth */
    webview(extensionId, nth = 0) {
      return page
        .locator(`iframe.webview[src*="extensionId=${extensionId}"]`)
        .locator("visible=true")
        .nth(nth)
        .contentFrame()
        .locator("iframe#active-frame")
        .contentFrame();
    },
    notifications: () => page.locator(".notifications-toasts .notification-list-item-message").allTextContents(),
    readClipboard: () => page.evaluate(() => navigator.clipboard.readText()),
    screenshot: (file) => page.screenshot({ path: file, animations: "disabled" }),
    async close() {
      await context.close();
      if (!given) await browser.close();
    },
  };
  return wb;
}
