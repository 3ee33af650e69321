import { Worker } from "node:worker_threads";
import type { SetFilter, SlopesChoice, SlopesSection } from "../../protocol";
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

/** A Slopes section on its way; null where the comparison it is about is not held any more, or it was cancelled. */
export interface Figure {
  readonly section: Promise<SlopesSection | null>;
  cancel(): void;
}

/** What a session needs of the worker; tests put their own in its place. */
export interface Compute {
  compare(order: Order, hooks: RunHooks): Run;
  present(session: string, filter: SetFilter): Promise<Presentation | null>;
  copy(session: string, as: "markdown" | "table", date: string): Promise<string | null>;
  /** @param of number of the run whose comparison is asked about */
  slopes(session: string, of: number, choice: SlopesChoice): Figure;
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
    const id = this.next++;
    const stopper = this.stopperOf(id);
    const { cancel } = stopper;
    const outcome = new Promise<Outcome>((resolve) => {
      this.ask({
        message: { type: "compare", id, cancel, ...order },
        hooks,
        settle: (reply) => {
          if (reply.type === "done") resolve(reply.outcome);
          else if (isCancelled(cancel)) resolve({ kind: "cancelled" });
          else
            resolve({ kind: "failed", text: this.lost(order.file), detail: reply.type === "lost" ? reply.detail : reply.type });
        },
      });
    });
    return { outcome, cancel: stopper.stop };
  }

  slopes(session: string, of: number, choice: SlopesChoice): Figure {
    const id = this.next++;
    const { cancel, stop } = this.stopperOf(id);
    const section = new Promise<SlopesSection | null>((resolve) => {
      this.ask({
        message: { type: "slopes", id, session, of, choice, cancel },
        hooks: null,
        settle: (reply) => {
          if (reply.type === "slopes" && reply.detail !== null) this.log(reply.detail);
          resolve(reply.type === "slopes" ? reply.section : null);
        },
      });
    });
    return { section, cancel: stop };
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

  /** The flag a request is stopped by, and what raises it. */
  private stopperOf(id: number): { readonly cancel: SharedArrayBuffer; readonly stop: () => void } {
    const cancel = new SharedArrayBuffer(4);
    const stop = () => {
      if (!this.waiting.has(id) || isCancelled(cancel)) return;
      Atomics.store(new Int32Array(cancel), 0, 1);
      this.endIfSilent(id);
    };
    return { cancel, stop };
  }

  /** Answers come in order: a cancelled run that is not the first waiting has not begun, and gives up at once when it does. */
  private endIfSilent(id: number): void {
    setTimeout(() => {
      if (!this.waiting.has(id)) return;
      if (this.waiting.keys().next().value === id) this.replace("a cancelled run did not stop");
      else this.endIfSilent(id);
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
