// The page in a plain browser with a stand-in for the editor: the bundle, a strict policy, a theme, and a record of what it sends.
import { build } from "esbuild";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { chromium } from "playwright-core";
import { THEMES } from "./themes.mjs";

const root = path.resolve(import.meta.dirname, "../..");
const ORIGIN = "http://page.test";
const POLICY = `default-src 'none'; img-src ${ORIGIN} data:; style-src ${ORIGIN}; font-src ${ORIGIN}; script-src 'nonce-n0'`;

export async function openBrowser() {
  const out = fs.mkdtempSync(path.join(os.tmpdir(), "slantwise-page-"));
  await build({
    entryPoints: { panel: path.join(root, "webview/main.ts") },
    bundle: true,
    format: "iife",
    target: "es2022",
    outdir: out,
    logLevel: "warning",
  });
  const browser = await chromium.launch({ executablePath: process.env.CHROMIUM ?? "/usr/bin/chromium", args: ["--no-sandbox"] });
  const files = Object.fromEntries(
    ["panel.js", "panel.css"].map((name) => [name, fs.readFileSync(path.join(out, name), "utf8")]),
  );
  fs.rmSync(out, { recursive: true });
  return {
    close: () => browser.close(),
    open: (options) => openPage(browser, files, options),
  };
}

/** A state with a figure is one in which a person has opened the section and its tables. */
const OPENED = { open: ["slopes", "plot lines", "plot difference", "plot levels", "plot added"] };

async function openPage(browser, files, options = {}) {
  const { state, theme = "dark", width = 1000, height = 900, kept = state?.slopes ? OPENED : null } = options;
  const context = await browser.newContext({ viewport: { width, height }, bypassCSP: false });
  const page = await context.newPage();
  const faults = [];
  page.on("pageerror", (error) => faults.push(error.message));
  page.on("console", (message) => message.type() === "error" && faults.push(message.text()));
  const { classes, colours } = THEMES[theme];
  const variables = Object.entries({ ...colours, "font-size": "13px", "font-family": "system-ui, sans-serif" });
  await page.route(`${ORIGIN}/**`, (route) => {
    const name = new URL(route.request().url()).pathname.slice(1);
    if (name === "") {
      const html = `<!DOCTYPE html><html lang="en"><head><meta charset="utf-8"><meta http-equiv="Content-Security-Policy" content="${POLICY}"><link rel="stylesheet" href="/theme.css"><link rel="stylesheet" href="/panel.css"><title>Comparison</title></head><body class="${classes}" data-status="reading"><main id="panel"></main><script nonce="n0" src="/panel.js"></script></body></html>`;
      return route.fulfill({ contentType: "text/html", body: html });
    }
    if (name === "theme.css")
      return route.fulfill({
        contentType: "text/css",
        body: `:root{${variables.map(([key, value]) => `--vscode-${key}:${value}`).join(";")}}`,
      });
    return files[name]
      ? route.fulfill({ contentType: name.endsWith("js") ? "text/javascript" : "text/css", body: files[name] })
      : route.fulfill({ status: 204 });
  });
  await page.addInitScript((before) => {
    let kept = before;
    window.sent = [];
    window.kept = () => kept;
    window.acquireVsCodeApi = () => ({
      postMessage: (message) => window.sent.push(message),
      getState: () => kept,
      setState: (next) => (kept = next),
    });
  }, kept);
  await page.goto(`${ORIGIN}/`);
  const show = async (next) => {
    await page.evaluate((data) => window.postMessage(data, "*"), { v: 1, type: "state", state: next });
    await page.waitForFunction((kind) => document.body.dataset.status === kind, next.status.kind);
    await page.evaluate(() => new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done))));
  };
  if (state) await show(state);
  return {
    page,
    faults,
    show,
    say: (message) => page.evaluate((data) => window.postMessage(data, "*"), { v: 1, ...message }),
    sent: async () => (await page.evaluate(() => window.sent)).slice(1),
    close: () => context.close(),
  };
}

/** What sticks out of the page, and which cells, heads and controls lie over each other. */
export function misplaced(page) {
  return page.evaluate(() => {
    const wide = document.documentElement.scrollWidth > document.documentElement.clientWidth ? ["the page scrolls sideways"] : [];
    const seen = (element) =>
      element.checkVisibility({ opacityProperty: false }) &&
      !element.closest(".unseen") &&
      getComputedStyle(element).clipPath === "none";
    const pieces = [
      ...document.querySelectorAll(
        "h2, h3, p.sentence, select, input, button, .estimate, .between, [data-cell], td.axis-cell, .place, .strip-plot, .strip-name, .fact, figcaption, .key-item, .axis-name, .plot, .plot-said, .twin, summary",
      ),
    ].filter(seen);
    const boxes = pieces
      .map((element) => ({ element, box: element.getBoundingClientRect() }))
      .filter(({ box }) => box.width > 0 && box.height > 0);
    const name = (element) =>
      `${element.tagName} ${element.className?.baseVal ?? element.className} «${(element.textContent ?? "").slice(0, 30)}»`;
    const out = boxes
      .filter(({ box }) => box.right > innerWidth + 0.5 || box.left < -0.5)
      .map(({ element }) => `cut off: ${name(element)}`);
    const over = [];
    boxes.forEach((a, i) => {
      for (const b of boxes.slice(i + 1)) {
        if (a.element.contains(b.element) || b.element.contains(a.element)) continue;
        // text that wraps has a box a line
        const meet = [...a.element.getClientRects()].some((one) =>
          [...b.element.getClientRects()].some(
            (two) =>
              Math.min(one.right, two.right) - Math.max(one.left, two.left) > 1.5 &&
              Math.min(one.bottom, two.bottom) - Math.max(one.top, two.top) > 4,
          ),
        );
        if (meet) over.push(`${name(a.element)} over ${name(b.element)}`);
      }
    });
    return [...wide, ...out, ...over];
  });
}
