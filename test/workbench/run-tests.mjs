#!/usr/bin/env node
// Runs an extensionTestsPath in the real extension host; prints its console; exits with its code. Two ways to call it:
//   node run-tests.mjs --workbench DIR --extension DIR --tests FILE --folder DIR [--timeout 120]
//   as the «VS Code executable» of @vscode/test-electron (vscodeExecutablePath) or @vscode/test-cli (useInstallation.fromPath),
//   with WORKBENCH=DIR in the environment: it then reads VS Code's own --extensionDevelopmentPath= and --extensionTestsPath=.
// Exit codes: what VS Code reports (0 = run() resolved, 1 = it threw); 96 it said 0 without a closing line; 98 the host died unsaid;
// 99 no end in time. The closing line («N passed, N failed», or Mocha's «N passing») is asked for because VS Code reports 0 as
// well when the extension host crashed or a test called process.exit().
import { startServer } from "./server.mjs";
import { openWorkbench } from "./workbench.mjs";
import path from "node:path";
import { format } from "node:util";
const o = { timeout: "120", workbench: process.env.WORKBENCH };
const names = { extensionDevelopmentPath: "extension", extensionTestsPath: "tests", "folder-uri": "folder" };
for (let a = process.argv.slice(2), i = 0; i < a.length; i++) {
  const m = /^--([\w-]+)(?:=(.*))?$/.exec(a[i]);
  if (!m) {
    o.folder ??= a[i];
    continue;
  }
  const key = names[m[1]] ?? m[1];
  if (m[2] !== undefined) o[key] = m[2].replace(/^file:\/\//, "");
  else if (["workbench", "extension", "tests", "folder", "timeout"].includes(key)) o[key] = a[++i];
}
if (!o.workbench || !o.tests) {
  console.error("run-tests: needs a workbench and tests; got", process.argv.slice(2).join(" "));
  process.exit(95);
}
// lines of the window's own log, which come the same way as the host's console; RAW=1 shows them
const NOISE =
  /^(Resolv|Creating a socket|Creation of workbench|Ignoring fetching|Updating additional|ChatSessionStore|ChatModelSelection|\[ChatModel|\[Service Worker\]|\[reconnection-grace|\[AccountPolicyGate|\[AgentHost|\[lifecycle\]|Settings Sync|Started local ext|Error while fetching the extension under development|Timed out waiting for authentication provider|Unable to read file 'vscode-remote:.*Canceled|Overwriting extension|Aborted onWillSave|No extensions gallery|\[RemoteAgentHost|Canceled|Unable to write file 'vscode-remote:.*Canceled)/;
const server = await startServer({ workbench: o.workbench });
let code = 97,
  wb,
  over = false;
const seen = { passed: 0, failed: 0, closed: false };
try {
  const ends = new Promise((done) => {
    const t = setInterval(() => {
      const m = /Extension Host Process exited with code: (\S+), signal: (\S+)\./.exec(server.output());
      if (m) {
        clearInterval(t);
        setTimeout(() => done({ code: 98, why: "the extension host ended: " + m[0] }), 1500);
      }
    }, 250);
    t.unref();
    setTimeout(() => done({ code: 99, why: `no end within ${o.timeout} s` }), o.timeout * 1000).unref();
  });
  wb = await openWorkbench({
    server,
    folder: o.folder,
    extension: o.extension,
    tests: path.resolve(o.tests),
    onTestLine: (type, args) => {
      const s = format(...args).replace(/\n$/, ""); // Mocha prints with %s and %d
      for (const [re, p, f] of [
        [/(\d+) passed, (\d+) failed/, 1, 2],
        [/^\s*(?:\x1b\[\S*m|\s)*(\d+) passing/m, 1, 0],
        [/^\s*(?:\x1b\[\S*m|\s)*(\d+) failing/m, 0, 1],
      ]) {
        const m = re.exec(s);
        if (m) {
          seen.closed = true;
          if (p) seen.passed += +m[p];
          if (f) seen.failed += +m[f];
        }
      }
      if (over) return; // what the window logs while it is being closed
      if (NOISE.test(s) && !process.env.RAW) return;
      (type === "error" || type === "warn" ? process.stderr : process.stdout).write(s + "\n");
    },
  });
  const end = await Promise.race([wb.ended, ends]);
  code = end.code;
  over = true;
  if (code === 0 && !(seen.closed && seen.passed > 0 && seen.failed === 0)) {
    code = 96;
    end.why = "exit code 0, but no closing line with at least one test passed and none failed";
  }
  if (end.why) {
    console.error("run-tests: " + end.why);
    await wb.screenshot("test-failure.png").catch(() => {});
  }
} catch (e) {
  console.error("run-tests: " + e.stack);
} finally {
  await wb?.close().catch(() => {});
  await server.stop();
}
process.exit(code);
