import type { PanelState, PlanChange, QuestionState, Reading, SetFilter } from "../protocol";
import type { Presentation } from "../report/presentation";
import { Asked } from "./asked";
import { Held } from "./held";
import { GRACE_MS } from "./quiet";
import type { Chosen, PlanText, SessionParts } from "./sessionParts";
import { OpenSlopes } from "./slopes";
import { statusOf } from "./status";
import type { Trouble } from "./status";
import type { Run } from "./worker/client";
import type { Compared, Outcome, Stamp } from "./worker/messages";
import { sameStamp, stampIn } from "./worker/stamp";

/** What a session knows of the panel's state; where the question is kept is its subject's to say. */
export type SessionState = Omit<PanelState, "target" | "keptIn">;

/** Progress is worth showing after this long. */
const SLOW_MS = 500;

/**
 * One panel's truth: which question, which result, how fresh. The newest save wins: a run that was overtaken shows nothing, and the
 * last good result stays until a whole file has been compared.
 */
export class Session {
  private run: Run | null = null;
  private runStarted = 0;
  private stirring = true;
  private missing = false;
  private trouble: Trouble | null = null;
  private question: QuestionState | null = null;
  private presentation: Presentation | null = null;
  private checking = false;
  private share: number | null = null;
  private reading: Reading | null = null;
  private filter: SetFilter = null;
  /** Fingerprint and ending of what is shown. */
  private shown: { readonly sha256: string; readonly ended: boolean } | null = null;
  /** Fingerprint of the last reading shown, whatever the question. */
  private lastSha: string | null = null;
  /** State of the file that the worker read last. */
  private lastStamp: Stamp | null = null;
  /** Holds back the results of a run that began before its file had settled. */
  private gate: { readonly stamp: Stamp; readonly open: () => void } | null = null;
  private readonly held: Held;
  private readonly asked: Asked;
  readonly slopes: OpenSlopes;

  constructor(private readonly parts: SessionParts) {
    this.held = new Held(parts);
    this.slopes = new OpenSlopes(parts, () => this.lost());
    this.asked = new Asked(parts.planText, parts.chosen);
  }

  state(): SessionState {
    const { csv } = this.parts;
    return {
      file: csv.file,
      status: statusOf({
        stirring: this.stirring || this.run !== null || this.held.waiting,
        missing: this.missing ? this.parts.missingText(csv.file) : null,
        trouble: this.trouble,
        hasResult: this.presentation !== null,
        share: this.share,
      }),
      question: this.question,
      presentation: this.presentation,
      checking: this.checking,
      reading: this.reading,
      filter: this.filter,
      slopes: this.slopes.section,
    };
  }

  // — the file —

  fileStirs(): void {
    if (this.gate) this.stop();
    this.held.release();
    this.stirring = true;
    this.parts.changed();
  }

  /** A save that looks whole: its run begins while the file is still being watched for more, and shows nothing until it settles. */
  fileLikely(stamp: Stamp): void {
    let open = () => {};
    const opened = new Promise<void>((resolve) => (open = resolve));
    this.start(true, opened);
    this.gate = { stamp, open };
  }

  fileSettled(stamp: Stamp | null): void {
    const gate = this.gate;
    this.gate = null;
    this.stirring = false;
    this.missing = stamp === null;
    if (gate && this.run && sameStamp(gate.stamp, stamp)) {
      gate.open();
      this.parts.changed();
      return;
    }
    if (stamp === null) {
      this.stop();
      this.slopes.resume();
      this.parts.changed();
    } else this.start(true);
  }

  readAgain(): void {
    this.shown = null;
    this.stirring = true;
    this.parts.changed();
    this.parts.followed.afresh();
  }

  // — the question —

  /** The question asked where it stands in no plan file; null where it does. */
  get apart(): Chosen | null {
    return this.asked.apart;
  }

  /** The plan file's text, newly read or written: compared only where it asks something else. */
  planChanged(text: PlanText, chosen: Chosen | null): void {
    if (text.text === this.asked.text) return;
    const guessed = this.question?.guessed ?? false;
    if (!this.asked.planChanged(text, chosen) && !this.trouble && !guessed) return;
    this.shown = null;
    this.compareAnew(true);
  }

  /** @returns the question as it is now; null where there is none yet */
  choose(change: PlanChange): Chosen | null {
    if (!this.question) return null;
    const chosen = this.asked.choose(this.question, change);
    // shown at once, so that the next choice builds on this one
    this.question = { ...this.question, ...chosen };
    this.shown = null;
    this.compareAnew(false);
    this.parts.changed();
    return chosen;
  }

  async setFilter(filter: SetFilter): Promise<void> {
    this.filter = filter;
    const before = this.presentation;
    const presentation = await this.parts.compute.present(this.parts.target, filter);
    if (presentation && this.presentation === before && !this.checking) this.presentation = presentation;
    this.parts.changed();
  }

  /** The comparison shown, written out; null where there is none yet. */
  async write(as: "markdown" | "table", date: string): Promise<string | null> {
    if (!this.presentation) return null;
    const { compute, target } = this.parts;
    const text = await compute.copy(target, as, date);
    if (text !== null || this.missing) return text;
    await this.again();
    return compute.copy(target, as, date);
  }

  dispose(): void {
    this.stop();
    this.slopes.pause();
    this.parts.compute.forget(this.parts.target);
  }

  // — runs —

  /** The thread that held the comparison was replaced: compare once more. */
  private again(): Promise<unknown> {
    this.shown = null;
    this.start(false);
    return this.run!.outcome;
  }

  private lost(): void {
    if (!this.run && !this.held.waiting && !this.stirring && !this.missing) void this.again();
  }

  /** The question changed: compare now, or when the file has settled. */
  private compareAnew(reread: boolean): void {
    if (this.stirring) this.stop();
    else if (!this.missing) this.start(reread);
  }

  /** @param reread false lets the worker use the columns it has, if they are those of the file as it stands */
  private start(reread: boolean, opened: Promise<void> = Promise.resolve()): void {
    this.stop();
    const { filter, parts } = this;
    const { compute, csv, followed, target } = parts;
    const again = reread || this.lastStamp === null || !followed.stands(this.lastStamp);
    this.runStarted = Date.now();
    this.share = null;
    const live = (then: () => void) => {
      if (this.run === run) then();
    };
    const known = this.shown?.sha256 ?? null;
    const ask = this.asked.ask();
    const run: Run = compute.compare(
      { session: target, path: csv.path, file: csv.file, ask, filter, reread: again, known },
      {
        progress: (share) =>
          live(() => {
            if (Date.now() - this.runStarted < SLOW_MS) return;
            this.share = share;
            this.parts.changed();
          }),
        preview: (result) =>
          void opened.then(() => live(() => this.held.until(result.stamp, this.doubt(result), () => this.show(result, true)))),
      },
    );
    this.run = run;
    this.slopes.pause();
    this.parts.changed();
    void Promise.all([run.outcome, opened]).then(([outcome]) => live(() => this.finished(outcome, filter)));
  }

  private finished(outcome: Outcome, filter: SetFilter): void {
    this.run = null;
    this.lastStamp = stampIn(outcome);
    if (outcome.kind !== "compared") this.slopes.resume();
    switch (outcome.kind) {
      case "compared":
        this.held.until(outcome.result.stamp, this.doubt(outcome.result), () => {
          this.show(outcome.result, false);
          if (filter !== this.filter) void this.setFilter(this.filter);
        });
        break;
      case "same":
        this.trouble = null;
        this.parts.followed.accept(outcome.stamp);
        this.parts.log("unchanged bytes");
        break;
      case "problem":
        this.held.until(outcome.stamp, GRACE_MS, () => this.refuse(outcome));
        break;
      case "failed":
        this.parts.log(outcome.detail);
        this.trouble = { text: outcome.text, line: null, inPlan: false };
        break;
      case "gone":
      case "torn":
        this.stirring = true;
        this.parts.followed.afresh();
        break;
      case "cancelled":
        break;
    }
    this.parts.changed();
  }

  /** How long to wait before a result is believed: a file that used to end with a line break and does not now is likely cut short. */
  private doubt(result: Compared): number {
    return this.shown?.ended && !result.ended ? GRACE_MS : 0;
  }

  private show(result: Compared, checking: boolean): void {
    if (this.reading === null || this.lastSha !== result.sha256) {
      this.reading = { number: (this.reading?.number ?? 0) + 1, at: new Date().toISOString() };
    }
    this.lastSha = result.sha256;
    this.presentation = result.presentation;
    this.question = result.question;
    this.asked.took(result.question.plan, result.guessed);
    this.checking = checking;
    this.trouble = null;
    this.slopes.renew(checking ? null : result.run);
    if (!checking) {
      this.asked.settled();
      this.shown = { sha256: result.sha256, ended: result.ended };
      this.parts.followed.accept(result.stamp);
      const { read, compare } = result.took;
      this.parts.log(`reading ${this.reading.number}: read ${read.toFixed(0)} ms, compared ${compare.toFixed(0)} ms`);
    }
    this.parts.changed();
  }

  private refuse(outcome: Extract<Outcome, { kind: "problem" }>): void {
    this.trouble = { text: outcome.text, line: outcome.line, inPlan: outcome.inPlan };
    if (outcome.question) this.question = outcome.question;
    this.shown = null;
    this.checking = false;
    this.parts.changed();
  }

  private stop(): void {
    this.held.release();
    this.gate = null;
    const run = this.run;
    this.run = null;
    run?.cancel();
  }
}
