// Real figures for the page's tests: the engine's and the report's own, bundled for Node.
import { build } from "esbuild";
import fs from "node:fs";
import { createRequire } from "node:module";
import os from "node:os";
import path from "node:path";
import { pathToFileURL } from "node:url";

const root = path.resolve(import.meta.dirname, "../..");

export async function figures() {
  const out = fs.mkdtempSync(path.join(os.tmpdir(), "slantwise-figures-"));
  const outfile = path.join(out, "figures.cjs");
  await build({
    entryPoints: [path.join(root, "test/webview/slopesStates.ts")],
    bundle: true,
    platform: "node",
    format: "cjs",
    mainFields: ["module", "main"],
    outfile,
    logLevel: "warning",
    // where the samples are looked for from
    define: { "import.meta.url": JSON.stringify(pathToFileURL(path.join(root, "test/report/outputs.ts")).href) },
  });
  const { slopesShown } = createRequire(import.meta.url)(outfile);
  fs.rmSync(out, { recursive: true });
  return slopesShown();
}
