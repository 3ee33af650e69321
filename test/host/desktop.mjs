// npm run test:desktop: the in-host suite in a desktop VS Code, which @vscode/test-electron downloads (or VSCODE_PATH names).
import { runTests } from "@vscode/test-electron";
import { execFileSync } from "node:child_process";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { suite } from "./build.mjs";

const root = path.join(import.meta.dirname, "../..");
execFileSync(process.execPath, [path.join(root, "esbuild.mjs")], { cwd: root, stdio: "inherit" });
const folder = fs.mkdtempSync(path.join(os.tmpdir(), "slantwise-desktop-"));
try {
  const code = await runTests({
    extensionDevelopmentPath: root,
    extensionTestsPath: suite,
    launchArgs: [folder, "--disable-extensions", "--disable-workspace-trust"],
    ...(process.env.VSCODE_PATH
      ? { vscodeExecutablePath: process.env.VSCODE_PATH }
      : { version: process.env.VSCODE_VERSION ?? "stable" }),
  });
  process.exitCode = code;
} catch (error) {
  console.error(`The desktop run failed: ${error.message}`);
  process.exitCode = 1;
} finally {
  fs.rmSync(folder, { recursive: true, force: true });
}
