// R, numpy and statsmodels doing the same, where they are on this machine. Whole processes and, from inside them, the time a set.
import { spawnSync } from "node:child_process";
import path from "node:path";

const here = import.meta.dirname;
const PEERS = [
  { name: "R lm.fit", command: ["Rscript", path.join(here, "peers.R")] },
  { name: "numpy", command: ["/usr/bin/python3", path.join(here, "peers.py"), "numpy"] },
  { name: "statsmodels", command: ["/usr/bin/python3", path.join(here, "peers.py"), "statsmodels"] },
];

/**
 * Each peer that runs here. `whole`: the process' time where it fits every set, or null with what is missing.
 * @param sets how many sets it is to fit
 */
export function runPeers(file, k, sets) {
  return PEERS.map(({ name, command }) => {
    const start = performance.now();
    const [program, ...args] = command;
    const run = spawnSync(program, [...args, file, String(k), String(sets)], { encoding: "utf8" });
    const whole = performance.now() - start;
    if (run.status !== 0) return { name, missing: run.error?.code ?? "it failed: " + run.stderr.trim().split("\n").at(-1) };
    const found = JSON.parse(run.stdout);
    return { name, ...found, whole: found.sets === 2 ** k ? whole : null };
  });
}
