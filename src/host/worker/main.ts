import { join } from "node:path";
import { parentPort } from "node:worker_threads";
import { present } from "../../report/present";
import { toMarkdown } from "../../report/markdown";
import { toTabSeparated } from "../../report/table";
import { sayProblem } from "../../report/wording/problem";
import { SecondThread } from "../../threads/second";
import { runCompare } from "./compare";
import type { KeptComparison } from "./compare";
import type { CompareRequest, FromWorker, Outcome, ToWorker } from "./messages";
import { Readings } from "./readings";

/** The worker thread: holds files, columns and comparisons between saves; only what is shown crosses to the host. */
const port = parentPort!;
const readings = new Readings();
const kept = new Map<string, KeptComparison>();
const pathOf = new Map<string, string>();
const second = new SecondThread(join(__dirname, "assistant.js"));
const send = (message: FromWorker) => port.postMessage(message);

port.on("message", (message: ToWorker) => {
  switch (message.type) {
    case "compare":
      send({ type: "done", id: message.id, outcome: guarded(message) });
      break;
    case "present": {
      const { comparison, plan, guessed } = kept.get(message.session) ?? {};
      const presentation = comparison && plan ? present(comparison, plan, { guessed, filter: message.filter }) : null;
      send({ type: "presented", id: message.id, presentation });
      break;
    }
    case "copy":
      send({ type: "text", id: message.id, text: write(message.session, message.as, message.date) });
      break;
    case "forget":
      forget(message.session);
      break;
  }
});

function guarded(request: CompareRequest): Outcome {
  if (pathOf.get(request.session) !== request.path) {
    forget(request.session);
    pathOf.set(request.session, request.path);
  }
  try {
    return runCompare(request, readings, {
      progress: (share) => send({ type: "progress", id: request.id, share }),
      preview: (result) => send({ type: "preview", id: request.id, result }),
      second,
      keep: (comparison) => kept.set(request.session, comparison),
    });
  } catch (error) {
    const detail = error instanceof Error ? (error.stack ?? error.message) : String(error);
    const reason = error instanceof RangeError ? "it does not fit in memory" : "the comparison failed; the log names the fault";
    return { kind: "failed", text: sayProblem({ code: "file-unreadable", file: request.file, detail: reason }), detail };
  }
}

function write(session: string, as: "markdown" | "table", date: string): string | null {
  const held = kept.get(session);
  if (!held) return null;
  const presentation = present(held.comparison, held.plan, { guessed: held.guessed });
  return as === "markdown" ? toMarkdown(presentation, held.comparison, { date }) : toTabSeparated(presentation);
}

function forget(session: string): void {
  const path = pathOf.get(session);
  pathOf.delete(session);
  kept.delete(session);
  if (path !== undefined && ![...pathOf.values()].includes(path)) readings.forget(path);
  if (pathOf.size === 0) second.end();
}
