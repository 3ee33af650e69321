// Bundles the extension's four programs into dist/. `--watch` rebuilds on change, `--production` minifies.
import { build, context } from "esbuild";
import { cpSync, mkdirSync, readdirSync, rmSync } from "node:fs";

const production = process.argv.includes("--production");
const watch = process.argv.includes("--watch");
const shared = {
  bundle: true,
  minify: production,
  sourcemap: production ? false : "linked",
  logLevel: "warning",
  outdir: "dist",
};
// a package's ES modules bundle whole; its UMD file may load parts of itself at run time
const node = { ...shared, platform: "node", format: "cjs", target: "node20", mainFields: ["module", "main"] };

const programs = [
  { ...node, entryPoints: { extension: "src/extension.ts" }, external: ["vscode"] },
  { ...node, entryPoints: { worker: "src/host/worker/main.ts" } },
  { ...node, entryPoints: { assistant: "src/threads/main.ts" } },
  { ...node, entryPoints: { cli: "src/cli.ts" }, banner: { js: "#!/usr/bin/env node" } },
  {
    ...shared,
    platform: "browser",
    format: "iife",
    target: "es2022",
    entryPoints: { panel: "webview/main.ts" },
    loader: { ".css": "css" },
  },
];

mkdirSync("dist/icons", { recursive: true });
cpSync("src/plan/plan.schema.json", "dist/plan.schema.json");
for (const name of readdirSync("webview/icons")) {
  if (/\.(png|svg)$/.test(name)) cpSync(`webview/icons/${name}`, `dist/icons/${name}`);
}
if (production) for (const name of readdirSync("dist")) if (name.endsWith(".map")) rmSync(`dist/${name}`);
if (watch) {
  for (const program of programs) await (await context(program)).watch();
  console.log("Watching src and webview.");
} else {
  await Promise.all(programs.map((program) => build(program)));
}
