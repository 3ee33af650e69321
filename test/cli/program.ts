import { spawnSync } from "node:child_process";
import { copyFileSync, mkdirSync, mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { buildSync } from "esbuild";

export const root = new URL("../..", import.meta.url).pathname;

export interface Ran {
  readonly code: number | null;
  readonly out: string;
  readonly err: string;
}

/** The command line as it is shipped: one bundle in a folder of its own, run by a Node of its own. */
export class Program {
  readonly folder = mkdtempSync(join(tmpdir(), "slantwise-program-"));
  readonly script = join(this.folder, "dist/cli.js");

  constructor() {
    mkdirSync(join(this.folder, "dist"));
    copyFileSync(join(root, "package.json"), join(this.folder, "package.json"));
    buildSync({
      entryPoints: [join(root, "src/cli.ts")],
      outfile: this.script,
      bundle: true,
      platform: "node",
      format: "cjs",
      target: "node20",
      mainFields: ["module", "main"],
      logLevel: "silent",
    });
  }

  /** Runs with arguments in a folder. The environment is the caller's without SOURCE_DATE_EPOCH, and `env` over it. */
  run(cwd: string, args: readonly string[], env: Readonly<Record<string, string>> = {}): Ran {
    const { ...rest } = process.env;
    delete rest["SOURCE_DATE_EPOCH"];
    const options = { cwd, env: { ...rest, ...env }, encoding: "utf8" as const, maxBuffer: 1e9 };
    const { status, stdout, stderr } = spawnSync(process.execPath, [this.script, ...args], options);
    return { code: status, out: stdout, err: stderr };
  }

  remove(): void {
    rmSync(this.folder, { recursive: true, force: true });
  }
}
