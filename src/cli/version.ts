import { readFileSync } from "node:fs";
import { join } from "node:path";

/** The version of the package this was built into: dist/cli.js lies in a folder beside its package.json. */
export function versionOf(): string {
  const manifest = JSON.parse(readFileSync(join(__dirname, "..", "package.json"), "utf8")) as { version: string };
  return manifest.version;
}
