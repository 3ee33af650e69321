// The benchmark's figures as tables: a time, a rate, and how it stands against what.
import os from "node:os";

export function describeMachine() {
  const cpus = os.cpus();
  const memory = Math.round(os.totalmem() / 2 ** 30);
  return `${cpus.length} × ${cpus[0].model.trim()}, ${memory} GiB, Node ${process.version.slice(1)}, ${os.type()}`;
}

export const say = (ms) =>
  ms >= 10_000
    ? `${(ms / 1000).toFixed(0)} s`
    : ms >= 1000
      ? `${(ms / 1000).toFixed(1)} s`
      : ms >= 10
        ? `${ms.toFixed(0)} ms`
        : `${ms.toPrecision(2)} ms`;
const times = (ratio) => (ratio >= 10 ? ratio.toFixed(0) : ratio.toPrecision(2));
const per = (count, ms, unit) => {
  const rate = (count / ms) * 1000;
  return rate >= 1e6
    ? `${(rate / 1e6).toPrecision(3)} M ${unit}/s`
    : `${Number(rate.toPrecision(3)).toLocaleString("en")} ${unit}/s`;
};

/** Rows of [what, time, rate, against the read of the bytes, against papaparse, against naive refits of every set]. */
function rowsOf({ n, bytes, cycle, factor, papa, naive, slopes }) {
  const naiveAll = naive.perSet * cycle.sets;
  const row = (what, ms, rate, refits) => [
    what,
    say(ms),
    rate,
    times(ms / cycle.bytes.warm),
    times(ms / papa.papa.warm),
    refits ? `1/${times(naiveAll / ms)}` : "",
  ];
  const megabytes = bytes / 1e6;
  const rows = [
    row("bytes of the file, fresh", cycle.bytes.warm, per(megabytes, cycle.bytes.warm, "MB")),
    row("bytes of the file, kept buffer", cycle.kept.warm, per(megabytes, cycle.kept.warm, "MB")),
    row("papaparse alone", papa.papa.warm, per(megabytes, papa.papa.warm, "MB")),
    row("read into columns", cycle.read.warm, per(n, cycle.read.warm, "rows")),
    row("factor", factor.factor.warm, per(factor.rows, factor.factor.warm, "rows")),
    row("file → first table: every set, classical", cycle.table.warm, per(cycle.sets, cycle.table.warm, "sets"), true),
    row("file → comparison: every set, HC3", cycle.total.warm, per(cycle.sets, cycle.total.warm, "sets"), true),
    row("the same, first time", cycle.total.first, per(cycle.sets, cycle.total.first, "sets"), true),
    row("refits one by one (scaled from 8 sets)", naiveAll, per(cycle.sets, naiveAll, "sets"), true),
  ];
  if (slopes) {
    const more = slopes.withTests.warm - slopes.without.warm;
    rows.push(row("slopes tests of every covariate in every set, more", more, per(slopes.models, more, "models")));
  }
  return rows;
}

export function textTable(result) {
  const { n, k, bytes, cycle, papa, slopes, peers } = result;
  const head = ["", "time", "rate", "/ bytes", "/ papaparse", "/ refits"];
  const all = [head, ...rowsOf(result)];
  const widths = head.map((_, c) => Math.max(...all.map((row) => row[c].length)));
  const lines = all.map((row) => row.map((cell, c) => (c === 0 ? cell.padEnd(widths[c]) : cell.padStart(widths[c]))).join("  "));
  const title = `${n.toLocaleString("en")} rows × ${k} covariates (${(bytes / 1e6).toFixed(1)} MB), ${cycle.sets.toLocaleString("en")} sets`;
  const memory = `peak memory: ${cycle.megabytes.toFixed(0)} MB for the cycle, ${papa.megabytes.toFixed(0)} MB for papaparse alone`;
  const left = slopes ? [] : ["slopes tests of every set left out: minutes at this size"];
  return [title, ...lines, memory, ...left, ...peers.map((peer) => peerLine(peer, cycle))].join("\n");
}

function peerLine(peer, cycle) {
  if (peer.missing) return `${peer.name}: not measured (${peer.missing})`;
  const each = `${say(peer.perSet)} a set, ${times(peer.perSet / (cycle.total.warm / cycle.sets))} times ours (file included)`;
  const whole =
    peer.whole === null
      ? `${peer.sets} sets sampled`
      : `whole process ${say(peer.whole)}, ${times(peer.whole / cycle.total.first)} times our first cycle`;
  return `${peer.name} with HC3: ${each}; ${whole}`;
}

export function markdownTable(results) {
  const head = [
    "rows × covariates (file)",
    "sets",
    "read",
    "first table",
    "all with HC3",
    "first time",
    "of papaparse alone",
    "R lm.fit + HC3, a set",
    "one by one",
    "slopes tests, more",
    "peak memory",
  ];
  const rows = results.map(({ n, k, bytes, cycle, papa, naive, slopes, peers }) => {
    const r = peers.find((peer) => peer.name === "R lm.fit" && !peer.missing);
    return [
      `${n.toLocaleString("en")} × ${k} (${(bytes / 1e6).toFixed(1)} MB)`,
      cycle.sets.toLocaleString("en"),
      say(cycle.read.warm),
      say(cycle.table.warm),
      say(cycle.total.warm),
      say(cycle.total.first),
      `${times(cycle.total.warm / papa.papa.warm)} × ${say(papa.papa.warm)}`,
      r ? `${say(r.perSet)} (${times((r.perSet * cycle.sets) / cycle.total.warm)} ×)` : "–",
      `${say(naive.perSet * cycle.sets)} (${times((naive.perSet * cycle.sets) / cycle.total.warm)} ×)`,
      slopes ? say(slopes.withTests.warm - slopes.without.warm) : "not run",
      `${cycle.megabytes.toFixed(0)} MB`,
    ];
  });
  const line = (cells) => `| ${cells.join(" | ")} |`;
  return [line(head), line(head.map((_, c) => (c === 0 ? "---" : "---:"))), ...rows.map(line)].join("\n");
}
