// Starts the workbench server on a free loopback port, with its own user data, and stops it again.
import { spawn, execFileSync } from "node:child_process";
import fs from "node:fs";
import path from "node:path";
import os from "node:os";

export const QUIET = {
  "telemetry.telemetryLevel": "off",
  "update.mode": "none",
  "update.showReleaseNotes": false,
  "extensions.autoUpdate": false,
  "extensions.autoCheckUpdates": false,
  "extensions.ignoreRecommendations": true,
  "workbench.startupEditor": "none",
  "workbench.tips.enabled": false,
  "workbench.welcomePage.walkthroughs.openOnInstall": false,
  "workbench.enableExperiments": false,
  "workbench.settings.enableNaturalLanguageSearch": false,
  "security.workspace.trust.enabled": false,
  "security.workspace.trust.startupPrompt": "never",
  "chat.commandCenter.enabled": false,
  "chat.setupFromDialog": false,
  "chat.disableAIFeatures": true,
  "workbench.secondarySideBar.defaultVisibility": "hidden",
  "git.enabled": false,
  "files.autoSave": "off",
  "files.hotExit": "off",
  "window.restoreWindows": "none",
  "window.dialogStyle": "custom",
  "workbench.colorTheme": "Default Dark Modern",
  "workbench.reduceMotion": "on",
  "editor.accessibilitySupport": "off",
  "json.schemaDownload.enable": false,
};

/**
 * vsix: installed with the server's own CLI before it starts. installed: folders of unpacked extensions, put in as if installed.
 * token: needed in the page's address (?tkn=…). settings: over QUIET.
 */
export async function startServer({
  workbench,
  vsix = [],
  bridge = false,
  installed = [],
  token,
  settings = {},
  environment = {},
  keep = false,
  log = "info",
}) {
  const laid = JSON.parse(fs.readFileSync(path.join(workbench, "info.json"), "utf8")).node;
  const node = laid.startsWith(workbench) ? laid : process.execPath;
  const home = fs.mkdtempSync(path.join(os.tmpdir(), "wbrun-"));
  const dirs = [
    "--server-data-dir",
    path.join(home, "s"),
    "--user-data-dir",
    path.join(home, "u"),
    "--extensions-dir",
    path.join(home, "x"),
  ];
  for (const d of ["s", "u/User", "u/logs", "x"]) fs.mkdirSync(path.join(home, d), { recursive: true });
  fs.writeFileSync(path.join(home, "u/User/settings.json"), JSON.stringify({ ...QUIET, ...settings }, null, 2));
  const main = path.join(workbench, "vscode/out/server-main.js");
  const env = { ...process.env, ...environment };
  for (const k of Object.keys(env))
    if ((k.startsWith("VSCODE_") && k !== "VSCODE_TEST_OPTIONS") || k.startsWith("CODE_SERVER_") || k === "NODE_OPTIONS")
      delete env[k];
  const bridgeFile = path.join(home, "bridge.json");
  env.WB_BRIDGE = bridgeFile; // extension hosts inherit the server's environment
  // The page takes one extensionDevelopmentPath only, so the bridge goes in as an installed extension; the server lists what
  // lies in its extensions folder when it first makes extensions.json.
  if (bridge)
    fs.cpSync(path.join(import.meta.dirname, "bridge"), path.join(home, "x/slantwise-test.bridge-0.0.1"), { recursive: true });
  for (const folder of installed) {
    const { name, publisher, version } = JSON.parse(fs.readFileSync(path.join(folder, "package.json"), "utf8"));
    fs.cpSync(folder, path.join(home, `x/${publisher}.${name}-${version}`), { recursive: true });
  }
  for (const v of vsix) {
    const o = execFileSync(node, [main, ...dirs, "--accept-server-license-terms", "--install-extension", v, "--force"], {
      env,
      encoding: "utf8",
    });
    if (!/successfully installed/.test(o)) throw new Error("not installed: " + v + "\n" + o);
  }
  const p = spawn(
    node,
    [
      main,
      ...dirs,
      "--host",
      "127.0.0.1",
      "--port",
      "0",
      ...(token ? ["--connection-token", token] : ["--without-connection-token"]),
      "--accept-server-license-terms",
      "--telemetry-level",
      "off",
      "--disable-telemetry",
      "--disable-workspace-trust",
      "--disable-getting-started-override",
      "--force-disable-user-env",
      "--log",
      log,
    ],
    { env, stdio: ["ignore", "pipe", "pipe"] },
  );
  const reap = () => {
    if (p.exitCode === null) p.kill("SIGKILL");
  };
  process.once("exit", reap); // also when the test process dies of an uncaught error
  let out = "";
  const port = await new Promise((ok, bad) => {
    const t = setTimeout(() => bad(new Error("no server after 30 s\n" + out)), 30_000);
    const on = (d) => {
      out += d;
      const m = /Extension host agent listening on (\d+)/.exec(out);
      if (m) {
        clearTimeout(t);
        ok(+m[1]);
      }
    };
    p.stdout.on("data", on);
    p.stderr.on("data", on);
    p.on("exit", (c) => bad(new Error("server ended with " + c + "\n" + out)));
  });
  return {
    port,
    home,
    pid: p.pid,
    ended: new Promise((r) => p.once("exit", r)),
    bridgeFile,
    authority: `127.0.0.1:${port}`,
    output: () => out,
    /** every log file the server and its extension hosts wrote */
    logs() {
      const r = {};
      const walk = (d) => {
        for (const e of fs.readdirSync(d, { withFileTypes: true })) {
          const f = path.join(d, e.name);
          if (e.isDirectory()) walk(f);
          else r[path.relative(home, f)] = fs.readFileSync(f, "utf8");
        }
      };
      for (const d of ["s", "u"]) {
        const l = path.join(home, d, d === "s" ? "data/logs" : "logs");
        if (fs.existsSync(l)) walk(l);
      }
      return r;
    },
    async stop() {
      process.removeListener("exit", reap);
      if (p.exitCode === null) {
        p.kill("SIGTERM");
        await Promise.race([new Promise((r) => p.once("exit", r)), new Promise((r) => setTimeout(r, 5000))]);
        if (p.exitCode === null && p.signalCode === null) p.kill("SIGKILL");
      }
      if (!keep) fs.rmSync(home, { recursive: true, force: true, maxRetries: 5, retryDelay: 200 });
    },
  };
}
