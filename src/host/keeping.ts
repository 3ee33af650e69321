import { applyChange } from "../plan/change";
import { editPlan } from "../plan/edit";
import { parsePlan } from "../plan/parse";
import type { PlanChange } from "../protocol";
import type { Chosen, PlanText } from "./sessionParts";

/** How an attempt to change a plan file ended: its text now, or why it is as it was. */
export type Rewritten = { readonly ok: true; readonly text: string } | { readonly ok: false; readonly note: string };

/** Changes a file by what it holds; `edit` gives null where it holds no plan that can be changed. */
export type Rewrite = (path: string, edit: (text: string) => string | null) => Promise<Rewritten>;

export interface KeepingParts {
  readonly path: string;
  readonly rewrite: Rewrite;
  /** The plan file's text as it was last read, and what is asked in the panel now. */
  readonly known: () => PlanText | null;
  readonly apart: () => Chosen | null;
  /** All choices so far are written, or the last attempt failed. */
  readonly ended: (result: Rewritten) => void;
}

/** Writes choices into a plan file one after the other; several made meanwhile are one writing. */
export class Keeping {
  private waiting: PlanChange[] = [];
  private writing = false;
  /** What was written last of several choices: the file we know, before it is read again. */
  private own: string | null = null;

  constructor(private readonly parts: KeepingParts) {}

  get busy(): boolean {
    return this.writing;
  }

  keep(change: PlanChange): void {
    this.waiting.push(change);
    if (!this.writing) void this.write();
  }

  private async write(): Promise<void> {
    this.writing = true;
    this.own = null;
    let result: Rewritten;
    do {
      const changes = this.waiting.splice(0);
      result = await this.parts.rewrite(this.parts.path, (text) => this.edited(text, changes));
      this.own = result.ok ? bare(result.text) : null;
    } while (this.waiting.length > 0);
    this.writing = false;
    this.parts.ended(result);
  }

  /** The file as we know it becomes what is asked; to one that somebody has changed meanwhile only the new choices are added. */
  private edited(text: string, changes: readonly PlanChange[]): string | null {
    const asked = this.parts.apart();
    const known = bare(text) === (this.own ?? this.parts.known()?.text);
    if (asked && known) return editPlan(text, asked.plan);
    const parsed = parsePlan(text, "");
    return parsed.ok
      ? editPlan(
          text,
          changes.reduce((plan, change) => applyChange(plan, change), parsed.plan),
        )
      : null;
  }
}

/** A text without its byte-order mark, which an editor does not show and a file may have. */
export function bare(text: string): string {
  return text.startsWith("\uFEFF") ? text.slice(1) : text;
}
