// How the editor feels while a large file refreshes: the longest gap between two beats of the extension host's main thread, idle and
// during refreshes, and the time from a save to the refreshed panel. node test/bench/heartbeat.mjs [ROWS] [REPEATS]
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { layWorkbench } from "../workbench/cache.mjs";
import { connectHost } from "../workbench/host.mjs";
import { startServer } from "../workbench/server.mjs";
import { openWorkbench } from "../workbench/workbench.mjs";

const rows = Number(process.argv[2] ?? 100_000);
const repeats = Number(process.argv[3] ?? 10);
const root = path.join(import.meta.dirname, "../..");
const folder = fs.mkdtempSync(path.join(os.tmpdir(), "slantwise-beat-"));
const file = path.join(folder, "large.csv");
const wait = (ms) => new Promise((done) => setTimeout(done, ms));
const median = (values) => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)];

/** Twelve columns: an id, two groups, two categories, six amounts and the outcome. */
function csv(start) {
  let state = start;
  const next = () => (state = (state * 16807) % 2147483647) / 2147483647;
  const lines = ["id,arm,tenure,block,x1,x2,x3,x4,x5,x6,x7,y"];
  for (let i = 0; i < rows; i++) {
    const x = Array.from({ length: 7 }, () => next() * 100);
    const arm = next() < 0.3 + 0.004 * x[0] ? "full" : "none";
    const y = 50 + x[0] * 2 - x[1] + (arm === "full" ? -12 : 0) + 30 * next();
    const cells = [
      `R${i}`,
      arm,
      next() < 0.5 ? "owner" : "tenant",
      `B${Math.floor(next() * 12)}`,
      ...x.map((v) => v.toFixed(3)),
      y.toFixed(3),
    ];
    lines.push(cells.join(","));
  }
  return lines.join("\n") + "\n";
}

const texts = [csv(3), csv(5)];
fs.writeFileSync(file, texts[0]);
const server = await startServer({ workbench: layWorkbench(), bridge: true });
const wb = await openWorkbench({ server, folder, extension: root });
try {
  await wb.explorerMenu("large.csv", "Open Comparison");
  const page = wb.webview("slantwise.slantwise");
  await page.locator('body[data-status="ready"] [data-set]').first().waitFor({ timeout: 60_000 });
  const host = await connectHost(server);
  const beat = async (during) => {
    await host.run((_vscode, { state }) => {
      state.longest = 0;
      state.gaps = [];
      let last = performance.now();
      state.timer = setInterval(() => {
        const now = performance.now();
        state.gaps.push(now - last);
        last = now;
      }, 5);
    });
    const result = await during();
    const gaps = await host.run((_vscode, { state }) => {
      clearInterval(state.timer);
      return state.gaps;
    });
    const sorted = gaps.sort((a, b) => a - b);
    return { result, longest: sorted.at(-1), high: sorted[Math.floor(sorted.length * 0.99)] };
  };
  const say = (what, { longest, high }) =>
    console.log(`${what}: longest gap ${longest.toFixed(0)} ms, 99 % below ${high.toFixed(0)} ms`);

  await wait(3000);
  say("idle", await beat(() => wait(10_000)));
  const refreshed = await beat(async () => {
    const times = [];
    for (let i = 0; i < repeats; i++) {
      await page.locator("body").evaluate((body) => {
        const figures = () => [...document.querySelectorAll('[data-cell="difference"]')].map((cell) => cell.textContent).join();
        const before = figures();
        let first = 0;
        new MutationObserver((_, self) => {
          if (figures() === before) return;
          self.disconnect();
          requestAnimationFrame(() => (first = Date.now()));
        }).observe(body, { subtree: true, childList: true, characterData: true });
        window["shownAt"] = new Promise((done) => {
          let left = false;
          new MutationObserver((_, self) => {
            if (body.dataset.status !== "ready") left = true;
            else if (left) {
              self.disconnect();
              requestAnimationFrame(() => done({ first: first || Date.now(), last: Date.now() }));
            }
          }).observe(body, { attributes: true, attributeFilter: ["data-status"] });
        });
      });
      fs.writeFileSync(file, texts[(i + 1) % 2]);
      const saved = Date.now();
      const { first, last } = await page.locator("body").evaluate(() => window["shownAt"]);
      times.push({ first: first - saved, last: last - saved });
      await wait(1000);
    }
    return times;
  });
  say("during refreshes", refreshed);
  for (const [what, key] of [
    ["new estimates", "first"],
    ["everything", "last"],
  ]) {
    const times = refreshed.result.map((time) => time[key]);
    console.log(
      `from save to ${what} on screen, ${rows} rows × 12: median ${median(times)} ms, ${Math.min(...times)} to ${Math.max(...times)} ms`,
    );
  }
  for (const line of Object.values(server.logs())
    .join("\n")
    .split("\n")
    .filter((text) => /reading \d+: read/.test(text))
    .slice(-repeats))
    console.log(line);
} finally {
  await wb.close();
  await server.stop();
  fs.rmSync(folder, { recursive: true, force: true });
}
