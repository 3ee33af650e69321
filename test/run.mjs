// npm test: installs what is missing, checks and tests everything, and ends with one plain line of counts.
// Needs nothing but Node 20 and npm to begin with, so it imports nothing but Node's own modules.
//   node test/run.mjs [STEP …]   runs the named steps only (after the build)
import { execFileSync, spawn } from "node:child_process";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { installPackages, needDebian, root } from "./install.mjs";

const only = process.argv.slice(2);
const total = { passed: 0, failed: 0 };
const bin = (name) => path.join(root, "node_modules/.bin", name);
const seconds = (since) => ((Date.now() - since) / 1000).toFixed(1).padStart(6) + " s";

/** Runs a program; its output is kept and shown only where it fails. */
function run(command, args, { env = {}, minutes = 10 } = {}) {
  return new Promise((done) => {
    const child = spawn(command, args, { cwd: root, env: { ...process.env, ...env }, stdio: ["ignore", "pipe", "pipe"] });
    let output = "";
    child.stdout.on("data", (data) => (output += data));
    child.stderr.on("data", (data) => (output += data));
    const timer = setTimeout(() => {
      output += `\nno end within ${minutes} minutes`;
      child.kill("SIGKILL");
    }, minutes * 60_000);
    child.on("error", (error) => (output += error.message));
    child.on("close", (code) => {
      clearTimeout(timer);
      done({ code, output });
    });
  });
}

/** A step counts the tests it ran, or itself where it is a check. */
async function step(name, work) {
  if (only.length && name !== "build" && !only.includes(name)) return;
  const since = Date.now();
  let result;
  try {
    result = await work();
  } catch (error) {
    result = { code: 1, output: error.stack };
  }
  const counts = result.counts ?? { passed: 0, failed: 0 };
  let { passed, failed } = counts;
  if (!result.counts) passed += result.code === 0 ? 1 : 0;
  if (failed === 0 && (result.code !== 0 || passed === 0)) failed = 1;
  total.passed += passed;
  total.failed += failed;
  if (failed) console.log(`\n${result.output.trimEnd()}\n`);
  console.log(
    `${failed ? "FAILED" : "ok    "} ${name.padEnd(16)} ${String(passed).padStart(5)} passed ${String(failed).padStart(3)} failed ${seconds(since)}`,
  );
}

const number = (text, pattern) => Number(pattern.exec(text)?.[1] ?? 0);
const nodeTest = (result) => ({
  ...result,
  counts: { passed: number(result.output, /^# pass (\d+)$/m), failed: number(result.output, /^# fail (\d+)$/m) },
});

const begun = Date.now();
if (Number(process.versions.node.split(".")[0]) < 20) {
  console.error(`Slantwise needs Node 20 or newer; this is ${process.version}.`);
  process.exit(1);
}
installPackages();
needDebian({ chromium: ["chromium", "chromium-browser", "google-chrome"], ripgrep: ["rg"], pandoc: ["pandoc"] });
const { layWorkbench } = await import("./workbench/cache.mjs");
const workbench = layWorkbench();
console.log(`prepared ${seconds(begun)}`);

const shots = path.join(root, ".shots");
fs.mkdirSync(shots, { recursive: true });
const scratch = fs.mkdtempSync(path.join(os.tmpdir(), "slantwise-test-"));
const env = { WORKBENCH: workbench, SHOTS: shots, CHROMIUM: chromium() };
const node = process.execPath;

await step("build", () => run(node, ["esbuild.mjs"]));
await step("types", () => run(bin("tsc"), ["--noEmit", "-p", "."]));
await step("lint", () => run(bin("eslint"), ["-c", ".config/eslint.config.mjs", "src", "webview", "test"]));
await step("format", () => run(bin("prettier"), ["--check", "--log-level", "warn", "."]));
await step("units", async () => {
  const report = path.join(scratch, "units.json");
  const reporters = ["--reporter=dot", "--reporter=json", `--outputFile.json=${report}`];
  const result = await run(bin("vitest"), ["run", "--config", "test/vitest.config.ts", ...reporters]);
  const { numPassedTests: passed, numFailedTests: failed } = JSON.parse(fs.readFileSync(report, "utf8"));
  return { ...result, counts: { passed, failed } };
});
await step("page", async () => {
  const files = fs.readdirSync(path.join(root, "test/webview")).filter((name) => name.endsWith(".test.mjs"));
  const tests = files.map((name) => path.join("test/webview", name));
  return nodeTest(await run(node, ["--test", "--test-reporter=tap", "--test-concurrency=1", ...tests], { env }));
});
await step("host", async () => {
  const { suite } = await import("./host/build.mjs");
  const folder = fs.mkdtempSync(path.join(scratch, "folder-"));
  const args = ["--workbench", workbench, "--extension", root, "--tests", suite, "--folder", folder, "--timeout", "400"];
  const result = await run(node, ["test/workbench/run-tests.mjs", ...args], { env });
  const counts = {
    passed: number(result.output, /^(\d+) passed, \d+ failed$/m),
    failed: number(result.output, /^\d+ passed, (\d+) failed$/m),
  };
  return { ...result, counts };
});
const e2e = ["--test", "--test-reporter=tap", "test/workbench/e2e.test.mjs"];
await step("workbench", async () => nodeTest(await run(node, e2e, { env: { ...env, MODE: "dev" } })));
await step("workbench-vsix", async () => {
  const vsix = path.join(scratch, "slantwise.vsix");
  const packed = await run(node, ["test/workbench/package.mjs", vsix]);
  if (packed.code !== 0) return packed;
  return nodeTest(await run(node, e2e, { env: { ...env, MODE: "vsix", VSIX: vsix } }));
});
fs.rmSync(scratch, { recursive: true, force: true });
console.log(`all in ${seconds(begun).trim()}`);
console.log(`${total.passed} passed, ${total.failed} failed`);
process.exit(total.failed ? 1 : 0);

function chromium() {
  if (process.env.CHROMIUM) return process.env.CHROMIUM;
  for (const name of ["chromium", "chromium-browser", "google-chrome"]) {
    try {
      return execFileSync("which", [name], { encoding: "utf8" }).trim();
    } catch {
      // the next one
    }
  }
  return "/usr/bin/chromium";
}
