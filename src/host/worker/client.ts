import { Worker } from "node:worker_threads";
import type { SetFilter } from "../../protocol";
import type { Presentation } from "../../report/presentation";
import type { Compared, CompareRequest, FromWorker, Outcome, ToWorker } from "./messages";

/** A run that has not heeded its flag for this long is ended with its thread. */
const SILENCE_MS = 1000;

export type Order = Omit<CompareRequest, "type" | "id" | "cancel">;

export interface RunHooks {
  readonly progress: (share: number) => void;
  readonly preview: (result: Compared) => void;
}

export interface Run {
  readonly outcome: Promise<Outcome>;
  cancel(): void;
}

/** What a session needs of the worker; tests put their own in its place. */
export interface Compute {
  compare(order: Order, hooks: RunHooks): Run;
  present(session: string, filter: SetFilter): Promise<Presentation | null>;
  copy(session: string, as: "markdown" | "table", date: string): Promise<string | null>;
  forget(session: string): void;
}

interface Waiting {
  readonly message: Exclude<ToWorker, { type: "forget" }>;
  readonly settle: (reply: FromWorker | { readonly type: "lost"; readonly detail: string }) => void;
  readonly hooks: RunHooks | null;
}

/** The host's end of the one long-lived worker thread. Requests are answered in order; a lost thread is replaced. */
export class WorkerClient implements Compute {
  private worker: Worker | null = null;
  private readonly waiting = new Map<number, Waiting>();
  private next = 1;

  /**
   * @param script path of the bundled worker
   * @param lost what an unanswerable run is told, in words for the panel
   */
  constructor(
    private readonly script: string,
    private readonly lost: (file: string) => string,
    private readonly log: (text: string) => void,
  ) {}

  compare(order: Order, hooks: RunHooks): Run {
    const cancel = new SharedArrayBuffer(4);
    const flag = new Int32Array(cancel);
    const id = this.next++;
    let over = false;
    const outcome = new Promise<Outcome>((resolve) => {
      this.ask({
        message: { type: "compare", id, cancel, ...order },
        hooks,
        settle: (reply) => {
          over = true;
          if (reply.type === "done") resolve(reply.outcome);
          else if (Atomics.load(flag, 0) !== 0) resolve({ kind: "cancelled" });
          else
            resolve({ kind: "failed", text: this.lost(order.file), detail: reply.type === "lost" ? reply.detail : reply.type });
        },
      });
    });
    const stop = () => {
      if (over || Atomics.load(flag, 0) !== 0) return;
      Atomics.store(flag, 0, 1);
      this.endIfSilent(id, () => over);
    };
    return { outcome, cancel: stop };
  }

  present(session: string, filter: SetFilter): Promise<Presentation | null> {
    return new Promise((resolve) => {
      this.ask({
        message: { type: "present", id: this.next++, session, filter },
        hooks: null,
        settle: (reply) => resolve(reply.type === "presented" ? reply.presentation : null),
      });
    });
  }

  copy(session: string, as: "markdown" | "table", date: string): Promise<string | null> {
    return new Promise((resolve) => {
      this.ask({
        message: { type: "copy", id: this.next++, session, as, date },
        hooks: null,
        settle: (reply) => resolve(reply.type === "text" ? reply.text : null),
      });
    });
  }

  forget(session: string): void {
    this.worker?.postMessage({ type: "forget", session } satisfies ToWorker);
  }

  dispose(): void {
    this.drop("the window closes");
  }

  /** Answers come in order: a cancelled run that is not the first waiting has not begun, and gives up at once when it does. */
  private endIfSilent(id: number, over: () => boolean): void {
    setTimeout(() => {
      if (over()) return;
      if (this.waiting.keys().next().value === id) this.replace("a cancelled run did not stop");
      else this.endIfSilent(id, over);
    }, SILENCE_MS).unref();
  }

  private ask(request: Waiting): void {
    this.waiting.set(request.message.id, request);
    this.thread().postMessage(request.message);
  }

  private thread(): Worker {
    if (this.worker) return this.worker;
    const worker = new Worker(this.script, { resourceLimits: { maxOldGenerationSizeMb: 4096 } });
    worker.unref();
    worker.on("message", (reply: FromWorker) => this.heard(reply));
    const gone = (detail: string) => {
      if (this.worker === worker) this.drop(detail);
    };
    worker.on("error", (error) => gone(String(error)));
    worker.on("messageerror", (error) => gone(String(error)));
    worker.on("exit", (code) => gone(`the thread ended with ${code}`));
    this.worker = worker;
    return worker;
  }

  private heard(reply: FromWorker): void {
    const request = this.waiting.get(reply.id);
    if (!request) return;
    if (reply.type === "progress") request.hooks?.progress(reply.share);
    else if (reply.type === "preview") request.hooks?.preview(reply.result);
    else {
      this.waiting.delete(reply.id);
      request.settle(reply);
    }
  }

  /** Ends the thread; runs that were not cancelled start again in a new one. */
  private replace(reason: string): void {
    this.log(reason);
    const again = [...this.waiting.values()].filter(({ message }) => !("cancel" in message) || !isCancelled(message.cancel));
    for (const request of again) this.waiting.delete(request.message.id);
    this.drop(reason);
    for (const request of again) this.ask(request);
  }

  private drop(detail: string): void {
    const worker = this.worker;
    this.worker = null;
    const lost = [...this.waiting.values()];
    this.waiting.clear();
    if (worker) void worker.terminate();
    for (const request of lost) request.settle({ type: "lost", detail });
  }
}

function isCancelled(cancel: SharedArrayBuffer): boolean {
  return Atomics.load(new Int32Array(cancel), 0) !== 0;
}
