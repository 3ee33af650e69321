import { MANY_ROWS } from "../engine/passes/halves";
import type { Passing } from "../engine/passes/types";
import { ThreadAssistant } from "./assistant";
import { SharedRows } from "./memory";

/** The second thread and the memory it shares, started with the first table that is large enough to be worth it. */
export class SecondThread {
  private assistant: ThreadAssistant | null = null;
  private memory = new SharedRows();

  /** @param script path of the bundled thread (dist/assistant.js) */
  constructor(private readonly script: string) {}

  /** What a comparison of a table of so many rows may use. */
  passing(rows: number): Pick<Passing, "assistant" | "memory"> {
    if (rows < MANY_ROWS) return {};
    this.assistant ??= new ThreadAssistant(this.script);
    return { assistant: this.assistant, memory: this.memory };
  }

  /** Lets the thread and its memory go; the next large table starts another. */
  end(): void {
    this.assistant?.end();
    this.assistant = null;
    this.memory = new SharedRows();
  }
}
