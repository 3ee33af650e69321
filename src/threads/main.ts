import { parentPort, workerData } from "node:worker_threads";
import { Cancelled } from "../engine/cancelled";
import { doRows } from "../engine/passes/halves";
import { DONE, FAILED, IDLE, STATE, STOP } from "./messages";
import type { AssistantData, RowOrder } from "./messages";

/** The assistant's thread: does one half of a pass at a time, over memory it shares with the thread that asks. */
const control = new Int32Array((workerData as AssistantData).control);

parentPort!.on("message", ({ task, into }: RowOrder) => {
  let state = DONE;
  try {
    doRows(task, into, () => {
      if (Atomics.load(control, STOP) !== 0) throw new Cancelled();
    });
  } catch {
    // whatever went wrong, the caller does this half itself and meets it there
    state = FAILED;
  }
  Atomics.store(control, STATE, state);
  Atomics.notify(control, STATE);
});
Atomics.store(control, STATE, IDLE);
