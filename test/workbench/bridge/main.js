// Test helper, loaded beside the extension under test: runs functions that the test process sends, in the real extension host.
const vscode = require("vscode");
const http = require("http");
const fs = require("fs");
const state = {};
exports.activate = (ctx) => {
  const file = process.env.WB_BRIDGE;
  if (!file) return;
  const token = require("crypto").randomBytes(16).toString("hex");
  const server = http
    .createServer((req, res) => {
      let body = "";
      req.on("data", (d) => (body += d));
      req.on("end", async () => {
        let out;
        try {
          if (req.headers["x-token"] !== token) throw new Error("no token");
          const { fn, args } = JSON.parse(body);
          out = {
            ok: await new Function("require", "vscode", "state", "args", `return (${fn})(vscode, ...args, { require, state })`)(
              require,
              vscode,
              state,
              args,
            ),
          };
        } catch (e) {
          out = { error: (e && e.stack) || String(e) };
        }
        res.end(JSON.stringify(out === undefined ? {} : out) ?? "{}");
      });
    })
    .listen(0, "127.0.0.1", () => {
      fs.writeFileSync(file + ".tmp", JSON.stringify({ port: server.address().port, token }));
      fs.renameSync(file + ".tmp", file);
    });
  ctx.subscriptions.push({ dispose: () => server.close() });
};
