// npm start: installs, builds, prints the sample comparison, and opens the panel on the samples: in the VS Code on the PATH or,
// where there is none, in a browser workbench on 127.0.0.1. Imports nothing but Node's own modules before the packages are there.
import { execFileSync, spawnSync } from "node:child_process";
import { randomBytes } from "node:crypto";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { installPackages, onPath, root } from "../test/install.mjs";

if (Number(process.versions.node.split(".")[0]) < 20) {
  console.error(`Slantwise needs Node 20 or newer; this is ${process.version}.`);
  process.exit(1);
}
installPackages();
execFileSync(process.execPath, ["esbuild.mjs"], { cwd: root, stdio: "inherit" });

const samples = path.join(root, "samples");
const plan = path.join(samples, "heating.slantwise.json");
const cli = path.join(root, "dist/cli.js");
console.log("$ node dist/cli.js compare samples/heating.slantwise.json --as text\n");
execFileSync(process.execPath, [cli, "compare", plan, "--as", "text"], { stdio: "inherit" });
console.log("");

// a helper extension opens the panel, so that the product itself never opens anything unasked
const opener = path.join(root, "test/workbench/opener");
const asked = { SLANTWISE_SAMPLE: plan };
const code = ["code", "codium", "code-insiders"].find(onPath);
if (code && !process.argv.includes("--browser")) {
  const args = ["--new-window", `--extensionDevelopmentPath=${root}`, `--extensionDevelopmentPath=${opener}`, samples];
  const opened = spawnSync(code, args, {
    stdio: "inherit",
    env: { ...process.env, ...asked },
    shell: process.platform === "win32",
  });
  if (opened.status === 0) {
    console.log(`Opened the samples in ${code}. If no panel shows: right-click heating.csv and choose Open Comparison.`);
    process.exit(0);
  }
}

const { layWorkbench } = await import("../test/workbench/cache.mjs");
const { startServer } = await import("../test/workbench/server.mjs");
console.log("No VS Code on the PATH: laying a browser workbench (once, about 60 MB) …");
const workbench = layWorkbench();

// as the extensions folder of the workbench has it: the manifest and the bundles, nothing else of the tree
const staged = fs.mkdtempSync(path.join(os.tmpdir(), "slantwise-start-"));
for (const name of ["package.json", "dist"]) fs.cpSync(path.join(root, name), path.join(staged, name), { recursive: true });
const token = randomBytes(12).toString("hex");
const server = await startServer({ workbench, installed: [staged, opener], environment: asked, token });
const address = `http://127.0.0.1:${server.port}/?folder=${encodeURIComponent(samples)}&tkn=${token}`;
console.log(
  `\nThe panel is open on the samples at\n\n  ${address}\n\nRun «node samples/clean.mjs» in another terminal to see it follow the data. Ctrl+C ends it.`,
);

const stop = async () => {
  await server.stop();
  fs.rmSync(staged, { recursive: true, force: true });
  process.exit(0);
};
process.once("SIGINT", () => void stop());
process.once("SIGTERM", () => void stop());
await server.ended;
