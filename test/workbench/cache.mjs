// What the real-workbench tests need besides the project's own packages, laid once into a cache outside the tree.
import { execFileSync } from "node:child_process";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";

export const WORKBENCH_VERSION = "4.100.3";
const VSCE = {
  version: "3.9.2",
  integrity: "sha512-XSxMosEEDO6vLxELAHVkwmhC0qe0ijZni2jB9Rcs8kQsW4lhTDQ/wMzmwFs/buotAWSnpmUp/dRWD2ufG3UYKA==",
};

export const cacheFolder = path.join(process.env.XDG_CACHE_HOME || path.join(os.homedir(), ".cache"), "slantwise");

/** The folder of the browser workbench. */
export function layWorkbench() {
  const folder = path.join(cacheFolder, `workbench-${WORKBENCH_VERSION}`);
  fs.mkdirSync(cacheFolder, { recursive: true });
  const lay = path.join(import.meta.dirname, "lay.mjs");
  execFileSync(process.execPath, [lay, folder, "--version", WORKBENCH_VERSION], { stdio: ["ignore", "ignore", "inherit"] });
  return folder;
}

/** The script that packs an extension. */
export function layVsce() {
  const folder = path.join(cacheFolder, `vsce-${VSCE.version}`);
  const bin = path.join(folder, "node_modules/@vscode/vsce/vsce");
  if (!fs.existsSync(bin)) {
    fs.mkdirSync(folder, { recursive: true });
    const options = ["--silent", "--no-audit", "--no-fund", "--ignore-scripts", "--omit=optional", "--prefix", folder];
    execFileSync("npm", ["install", ...options, `@vscode/vsce@${VSCE.version}`], { stdio: ["ignore", "ignore", "inherit"] });
  }
  const lock = JSON.parse(fs.readFileSync(path.join(folder, "node_modules/.package-lock.json"), "utf8"));
  const got = lock.packages["node_modules/@vscode/vsce"].integrity;
  if (got !== VSCE.integrity) throw new Error(`the packer's integrity differs: ${got}`);
  return bin;
}
