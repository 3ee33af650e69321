// Bundles the in-host suite into .cache/host-suite.js, which VS Code loads in its extension host.
import { build } from "esbuild";
import path from "node:path";

const root = path.join(import.meta.dirname, "../..");
export const suite = path.join(root, ".cache/host-suite.js");

await build({
  entryPoints: [path.join(root, "test/host/suite/index.ts")],
  outfile: suite,
  bundle: true,
  platform: "node",
  format: "cjs",
  target: "node20",
  // a package's ES modules bundle whole; its UMD file may load parts of itself at run time
  mainFields: ["module", "main"],
  external: ["vscode", "mocha"],
  sourcemap: "inline",
  logLevel: "warning",
});
