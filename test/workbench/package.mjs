// Builds for release and packs the extension: node test/workbench/package.mjs [OUT.vsix]. Fails if anything but the listed files is in it.
import { execFileSync } from "node:child_process";
import fs from "node:fs";
import path from "node:path";
import { layVsce } from "./cache.mjs";

const root = path.join(import.meta.dirname, "../..");
const out = path.resolve(process.argv[2] ?? path.join(root, "slantwise.vsix"));
const run = (args) => execFileSync(process.execPath, args, { cwd: root, encoding: "utf8", stdio: ["ignore", "pipe", "inherit"] });

const EXPECTED = [
  ...["CHANGELOG.md", "LICENSE", "README.md", "package.json"],
  ...[
    "dist/cli.js",
    "dist/extension.js",
    "dist/panel.css",
    "dist/panel.js",
    "dist/plan.schema.json",
    "dist/assistant.js",
    "dist/worker.js",
  ],
  ...["dist/icons/icon.png", "dist/icons/panel-dark.svg", "dist/icons/panel-light.svg"],
];

run(["esbuild.mjs", "--production"]);
const vsce = layVsce();
const listed = run([vsce, "ls", "--no-dependencies"]).split("\n").filter(Boolean).sort();
const expected = EXPECTED.sort();
if (listed.join("\n") !== expected.join("\n")) {
  const extra = listed.filter((file) => !expected.includes(file));
  const lacking = expected.filter((file) => !listed.includes(file));
  throw new Error(
    `the package holds other files than it should; extra: ${extra.join(", ") || "none"}; lacking: ${lacking.join(", ") || "none"}`,
  );
}
run([vsce, "package", "--no-dependencies", "--allow-missing-repository", "--no-rewrite-relative-links", "-o", out]);
console.log(`${out}, ${(fs.statSync(out).size / 1e6).toFixed(2)} MB`);
