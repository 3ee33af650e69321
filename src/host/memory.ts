import { createHash } from "node:crypto";
import type { Memento } from "vscode";
import type { Chosen, PlanText } from "./sessionParts";

interface Entry extends Chosen {
  /** Fingerprint of the plan file the choice was made over; null for a bare CSV. */
  readonly basis: string | null;
}

const QUESTIONS = "questions";
const OPEN = "open";
/** Questions of this many files are remembered, the latest used last. */
const LIMIT = 200;

/** What the workspace remembers between windows: the question chosen for each file, and which panels were open. */
export class Memory {
  constructor(private readonly store: Memento) {}

  /** The question chosen for this target, unless its plan file has changed since. */
  chosen(target: string, planText: PlanText | null): Chosen | null {
    const entry = this.questions()[target];
    if (!entry || entry.basis !== basisOf(planText)) return null;
    return { plan: entry.plan, guessed: entry.guessed };
  }

  /** @param chosen null forgets what was remembered */
  remember(target: string, chosen: Chosen | null, planText: PlanText | null): void {
    if (!chosen && !this.questions()[target]) return;
    const kept = Object.entries(this.questions())
      .filter(([other]) => other !== target)
      .slice(-(LIMIT - 1));
    const entry = chosen ? [[target, { ...chosen, basis: basisOf(planText) }] as const] : [];
    void this.store.update(QUESTIONS, Object.fromEntries([...kept, ...entry]));
  }

  opened(target: string, title: string): void {
    void this.store.update(OPEN, { ...this.store.get<Record<string, string>>(OPEN), [target]: title });
  }

  closed(target: string): void {
    const others = Object.entries(this.store.get<Record<string, string>>(OPEN) ?? {}).filter(([other]) => other !== target);
    void this.store.update(OPEN, Object.fromEntries(others));
  }

  /** The target of a panel that came back from a reload without its own state, found by its title. */
  byTitle(title: string): string | null {
    const entries = Object.entries(this.store.get<Record<string, string>>(OPEN) ?? {});
    return entries.find(([, name]) => name === title)?.[0] ?? null;
  }

  private questions(): Readonly<Record<string, Entry | undefined>> {
    return this.store.get<Record<string, Entry>>(QUESTIONS) ?? {};
  }
}

function basisOf(planText: PlanText | null): string | null {
  return planText && createHash("sha256").update(planText.text).digest("hex");
}
