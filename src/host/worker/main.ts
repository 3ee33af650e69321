import { join } from "node:path";
import { parentPort } from "node:worker_threads";
import { Cancelled } from "../../engine/cancelled";
import type { SlopesSection } from "../../protocol";
import { present } from "../../report/present";
import { toMarkdown } from "../../report/markdown";
import { toTabSeparated } from "../../report/table";
import { sayProblem } from "../../report/wording/problem";
import { SecondThread } from "../../threads/second";
import { runCompare } from "./compare";
import type { KeptComparison } from "./compare";
import type { CompareRequest, FromWorker, Outcome, SlopesRequest, ToWorker } from "./messages";
import { Readings } from "./readings";
import { runSlopes } from "./slopes";

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
    case "slopes":
      send({ type: "slopes", id: message.id, ...slopes(message) });
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
    const detail = stackOf(error);
    const reason = error instanceof RangeError ? "it does not fit in memory" : "the comparison failed; the log names the fault";
    return { kind: "failed", text: sayProblem({ code: "file-unreadable", file: request.file, detail: reason }), detail };
  }
}

function slopes(request: SlopesRequest): { section: SlopesSection | null; detail: string | null } {
  try {
    return { section: runSlopes(request, kept.get(request.session), pathOf.get(request.session), readings), detail: null };
  } catch (error) {
    return { section: null, detail: error instanceof Cancelled ? null : stackOf(error) };
  }
}

function write(session: string, as: "markdown" | "table", date: string): string | null {
  const held = kept.get(session);
  if (!held) return null;
  const presentation = present(held.comparison, held.plan, { guessed: held.guessed });
  return as === "markdown" ? toMarkdown(presentation, held.comparison, { date }) : toTabSeparated(presentation);
}

function stackOf(error: unknown): string {
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
}

function forget(session: string): void {
  const path = pathOf.get(session);
  pathOf.delete(session);
  kept.delete(session);
  if (path !== undefined && ![...pathOf.values()].includes(path)) readings.forget(path);
  if (pathOf.size === 0) second.end();
}
