import { Worker } from "node:worker_threads";
import { sizesOf } from "../engine/passes/halves";
import type { Assistant, Begun, RowTask } from "../engine/passes/types";
import { DONE, IDLE, STATE, STOP, WORKING } from "./messages";
import type { AssistantData, RowOrder } from "./messages";

/** A thread that has not answered this long after the caller had done as much itself is given up. */
const PATIENCE_MS = 20_000;

/**
 * A second thread that takes the second half of passes over many rows. The caller works on the first half meanwhile and then waits, blocked:
 * for threads that have nothing else to do.
 */
export class ThreadAssistant implements Assistant {
  private readonly control = new Int32Array(new SharedArrayBuffer(8));
  private worker: Worker | null;

  /** @param script path of the bundled thread (dist/assistant.js) */
  constructor(script: string) {
    const workerData: AssistantData = { control: this.control.buffer as SharedArrayBuffer };
    this.worker = new Worker(script, { workerData });
    this.worker.on("error", () => this.end());
    // work that is still wanted is waited for; an idle thread keeps no program alive
    this.worker.unref();
  }

  begin(task: RowTask): Begun | null {
    const { control, worker } = this;
    if (!worker || !isShared(task)) return null;
    const ready = Atomics.load(control, STATE);
    if (ready === WORKING || ready === 0) return null;
    const into = sizesOf(task).map((size) => new Float64Array(new SharedArrayBuffer(size * 8)));
    Atomics.store(control, STOP, 0);
    Atomics.store(control, STATE, WORKING);
    worker.postMessage({ task, into } satisfies RowOrder);
    return {
      wait: () => {
        Atomics.wait(control, STATE, WORKING, PATIENCE_MS);
        const state = Atomics.load(control, STATE);
        if (state === WORKING) this.end();
        return state === DONE ? into : null;
      },
      drop: () => void Atomics.store(control, STOP, 1),
    };
  }

  end(): void {
    Atomics.store(this.control, STOP, 1);
    void this.worker?.terminate();
    this.worker = null;
    Atomics.compareExchange(this.control, STATE, WORKING, IDLE);
  }
}

function isShared(task: RowTask): boolean {
  const { columns, weights } = task.kind === "walk" ? task.source : task;
  const base = task.kind === "walk" ? (task.source.base ?? []) : [];
  return [...columns, ...base, ...(weights ? [weights] : [])].every((array) => array.buffer instanceof SharedArrayBuffer);
}
