// The test process's end of bridge/: host.run((vscode, a, b, { require, state }) => …, a, b)
import fs from "node:fs";
export async function connectHost(server, timeout = 60_000) {
  const end = Date.now() + timeout;
  while (!fs.existsSync(server.bridgeFile)) {
    if (Date.now() > end) throw new Error("bridge did not start");
    await new Promise((r) => setTimeout(r, 50));
  }
  const { port, token } = JSON.parse(fs.readFileSync(server.bridgeFile, "utf8"));
  return {
    async run(fn, ...args) {
      const r = await (
        await fetch(`http://127.0.0.1:${port}/`, {
          method: "POST",
          headers: { "x-token": token },
          body: JSON.stringify({ fn: String(fn), args }),
        })
      ).json();
      if ("error" in r) throw new Error(r.error);
      return r.ok;
    },
    async until(fn, ...args) {
      // first truthy answer, asked for every 50 ms, 15 s long
      const stop = Date.now() + 15_000;
      for (;;) {
        const v = await this.run(fn, ...args);
        if (v) return v;
        if (Date.now() > stop) throw new Error("never true: " + fn);
        await new Promise((r) => setTimeout(r, 50));
      }
    },
  };
}
