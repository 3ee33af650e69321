import type { Plan } from "../../src/engine/plan";
import { Session } from "../../src/host/session";
import type { Chosen, PlanText } from "../../src/host/sessionParts";
import type { Figure, Order, RunHooks } from "../../src/host/worker/client";
import type { Compared, Outcome, Stamp } from "../../src/host/worker/messages";
import { sameStamp } from "../../src/host/worker/stamp";
import type { QuestionState, SlopesChoice, SlopesSection } from "../../src/protocol";
import type { Presentation } from "../../src/report/presentation";

export interface FakeRun {
  readonly order: Order;
  readonly hooks: RunHooks;
  readonly end: (outcome: Outcome) => void;
  cancelled: boolean;
}

export const plan: Plan = { outcome: { column: "kwh" }, exposure: { column: "retrofit" }, covariates: [{ column: "floor_m2" }] };
export const stamp = (size: number): Stamp => ({ size, mtimeMs: size, ctimeMs: size, ino: 1 });
export const presentation = (title: string): Presentation => ({
  title,
  facts: [],
  readout: [],
  blocks: [],
  joint: null,
  notes: [],
  rows: "",
  provenance: [],
  summary: title,
  slopesSummary: "",
});
export const question = (asked: Plan, guessed: boolean): QuestionState => ({
  plan: asked,
  guessed,
  columns: [],
  levels: [],
  reference: null,
  kind: "groups",
  setsChoice: "each",
  setCount: 2,
});
export const compared = (title: string, at: Stamp, more: Partial<Compared> = {}): Outcome => ({
  kind: "compared",
  result: {
    run: at.size,
    presentation: presentation(title),
    question: question(plan, true),
    guessed: true,
    sha256: title,
    stamp: at,
    ended: true,
    took: { read: 1, compare: 1 },
    ...more,
  },
});
export const refused = (text: string, at: Stamp | null): Outcome => ({
  kind: "problem",
  text,
  line: 7,
  inPlan: false,
  question: null,
  stamp: at,
});

/** A Slopes section that was asked for. */
export interface FakeFigure {
  /** Size of the file whose comparison it is about. */
  readonly of: number;
  readonly choice: SlopesChoice;
  readonly end: (section: SlopesSection | null) => void;
  cancelled: boolean;
}

export const section = (sentence: string): SlopesSection => ({
  sets: [],
  set: 0,
  modifiers: [],
  modifier: "",
  contrasts: [],
  contrast: 0,
  sentences: [sentence],
  plots: [],
});

/** A session whose file, clock and worker are played by the test. */
export class Stage {
  readonly runs: FakeRun[] = [];
  readonly figures: FakeFigure[] = [];
  /** The file as it stands; null while it is changing or gone. */
  now: Stamp | null = null;
  /** How long it has stood still, ms. */
  still = 10_000;
  doubted = 0;
  readonly session: Session;

  constructor(over: { readonly chosen?: Chosen; readonly planText?: PlanText } = {}) {
    this.session = new Session({
      target: "file:///heating.csv",
      csv: { path: "/heating.csv", file: "heating.csv" },
      compute: {
        compare: (order, hooks) => this.begin(order, hooks),
        present: () => Promise.resolve(presentation("filtered")),
        copy: (_session, as) => Promise.resolve(as),
        slopes: (_session, of, choice) => this.figure(of, choice),
        forget: () => undefined,
      },
      followed: {
        accept: () => undefined,
        stands: (asked) => sameStamp(asked, this.now),
        quiet: () => this.still,
        afresh: () => void this.doubted++,
      },
      planText: over.planText ?? null,
      chosen: over.chosen ?? null,
      changed: () => undefined,
      missingText: (file) => `${file} is missing`,
      log: () => undefined,
    });
  }

  save(size: number): void {
    this.now = null;
    this.session.fileStirs();
    this.now = stamp(size);
    this.session.fileSettled(this.now);
  }

  async end(outcome: Outcome, run = this.last): Promise<void> {
    run.end(outcome);
    for (let i = 0; i < 5; i++) await Promise.resolve();
  }

  async draw(sentence: string | null, figure = this.figures.at(-1)!): Promise<void> {
    figure.end(sentence === null ? null : section(sentence));
    for (let i = 0; i < 5; i++) await Promise.resolve();
  }

  get drawn(): string | null {
    return this.session.state().slopes?.sentences[0] ?? null;
  }

  get last(): FakeRun {
    return this.runs.at(-1)!;
  }

  get shown(): string | null {
    return this.session.state().presentation?.title ?? null;
  }

  get status(): string {
    return this.session.state().status.kind;
  }

  private figure(of: number, choice: SlopesChoice): Figure {
    let end: FakeFigure["end"] = () => undefined;
    const answer = new Promise<SlopesSection | null>((resolve) => (end = resolve));
    const figure: FakeFigure = { of, choice, end, cancelled: false };
    this.figures.push(figure);
    return { section: answer, cancel: () => void (figure.cancelled = true) };
  }

  private begin(order: Order, hooks: RunHooks): { outcome: Promise<Outcome>; cancel: () => void } {
    let end: (outcome: Outcome) => void = () => undefined;
    const outcome = new Promise<Outcome>((resolve) => (end = resolve));
    const run: FakeRun = { order, hooks, end, cancelled: false };
    this.runs.push(run);
    return { outcome, cancel: () => void (run.cancelled = true) };
  }
}
