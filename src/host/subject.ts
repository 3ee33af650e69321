import { readFile } from "node:fs/promises";
import { basename } from "node:path";
import type { Problem } from "../engine/findings";
import { parsePlan } from "../plan/parse";
import type { PanelState, PlanChange, SlopesChoice } from "../protocol";
import { sayProblem } from "../report/wording/problem";
import { Follow } from "./follow";
import { bare, Keeping } from "./keeping";
import type { Rewrite, Rewritten } from "./keeping";
import { GRACE_MS } from "./quiet";
import { Session } from "./session";
import type { SessionState } from "./session";
import type { Chosen, PlanText } from "./sessionParts";
import { dataPath, isPlan } from "./target";
import { words } from "./words";
import type { Compute } from "./worker/client";
import type { Stamp } from "./worker/messages";

export interface SubjectParts {
  /** URI string: the panel's key. */
  readonly target: string;
  /** Its path on disk: a CSV or a plan. */
  readonly path: string;
  readonly compute: Compute;
  /** Workspace folders a plan may point into. */
  readonly folders: () => readonly string[];
  readonly watch: (path: string, poke: () => void) => { dispose(): unknown };
  readonly recall: (planText: PlanText | null) => Chosen | null;
  /** Null where nothing needs to be remembered any more: the plan file holds it. */
  readonly remember: (chosen: Chosen | null, planText: PlanText | null) => void;
  readonly rewrite: Rewrite;
  readonly changed: () => void;
  readonly log: (text: string) => void;
}

/** No two sessions share what the worker keeps. */
let sessions = 0;

interface Watched {
  readonly session: Session;
  readonly csv: string;
  readonly follow: Follow;
  readonly watch: { dispose(): unknown };
}

/** What a panel is about: a CSV with a question of its own, or a plan and the CSV it names. Follows both files. */
export class Subject {
  private watched: Watched | null = null;
  private planFollow: Follow | null = null;
  private planWatch: { dispose(): unknown } | null = null;
  private planTrouble: { readonly text: string; readonly line: number | null } | null = null;
  private planText: PlanText | null = null;
  private held: NodeJS.Timeout | null = null;
  private slopes: SlopesChoice | null = null;
  private disposed = false;
  private target: string;
  private path: string;
  private keeping: Keeping | null = null;
  private note: string | null = null;

  constructor(private readonly parts: SubjectParts) {
    this.target = parts.target;
    this.path = parts.path;
    if (isPlan(parts.path)) this.followPlan();
    else this.followData(parts.path);
  }

  state(): PanelState {
    const { target, planTrouble } = this;
    const session = this.watched?.session.state() ?? this.blank();
    const status = planTrouble ? ({ kind: "unusable", ...planTrouble, inPlan: true } as const) : session.status;
    return { ...session, status, target, keptIn: this.keptIn() };
  }

  get session(): Session | null {
    return this.watched?.session ?? null;
  }

  /** Path of the CSV; null while a plan has not named one. */
  get csv(): string | null {
    return this.watched?.csv ?? null;
  }

  /** A choice in the panel: compared at once, and written into the plan file where there is one. */
  choose(change: PlanChange): void {
    const chosen = this.session?.choose(change);
    if (!chosen) return;
    this.planTrouble = null;
    if (this.keeping) this.keeping.keep(change);
    else this.parts.remember(chosen, null);
  }

  /** A bare CSV's question was saved as a plan: from now on the panel is about that. */
  adopt(target: string, path: string, text: string): void {
    this.target = target;
    this.path = path;
    this.note = null;
    this.planText = { text, file: basename(path) };
    this.session?.planChanged(this.planText, null);
    this.followPlan();
    this.parts.changed();
  }

  /** Says why a question could not be saved. */
  say(note: string): void {
    this.note = note;
    this.parts.changed();
  }

  /** The Slopes section as the page wants it, whatever file is followed. */
  showSlopes(choice: SlopesChoice | null): void {
    this.slopes = choice;
    this.session?.slopes.choose(choice);
  }

  readAgain(): void {
    this.planFollow?.afresh();
    this.session?.readAgain();
  }

  dispose(): void {
    this.disposed = true;
    if (this.held) clearTimeout(this.held);
    this.planWatch?.dispose();
    this.planFollow?.dispose();
    this.leaveData();
  }

  private followPlan(): void {
    const { path } = this;
    this.keeping = new Keeping({
      path,
      rewrite: this.parts.rewrite,
      known: () => this.planText,
      apart: () => this.session?.apart ?? null,
      ended: (result) => this.written(result),
    });
    const follow = new Follow(path, {
      stirring: () => {
        if (this.held) clearTimeout(this.held);
        this.held = null;
      },
      likely: () => undefined,
      settled: (stamp) => void this.readPlan(stamp),
    });
    this.planFollow = follow;
    this.planWatch = this.parts.watch(path, () => follow.poke());
    follow.poke();
  }

  private written(result: Rewritten): void {
    if (this.disposed) return;
    this.note = result.ok ? null : result.note;
    if (result.ok) {
      this.planText = { text: bare(result.text), file: basename(this.path) };
      this.session?.planChanged(this.planText, null);
      this.parts.remember(null, this.planText);
      // what came while we wrote was not read
      this.planFollow?.afresh();
    } else if (this.session?.apart) this.parts.remember(this.session.apart, this.planText);
    this.parts.changed();
  }

  private async readPlan(stamp: Stamp | null): Promise<void> {
    const { path } = this;
    const file = basename(path);
    const text = stamp && (await readFile(path, "utf8").then(bare, () => null));
    if (this.disposed || this.keeping?.busy) return;
    if (text === null) return this.planUnusable({ code: "file-missing", file });
    if (!this.planFollow?.stands(stamp)) return;
    const parsed = parsePlan(text, file);
    if (!parsed.ok) return this.whenStill(stamp, () => this.planUnusable(parsed.problems[0]));
    const { data } = parsed.plan;
    if (data === undefined) return this.whenStill(stamp, () => this.planUnusable({ code: "missing-key", key: "data", file }));
    const csv = dataPath(path, data, this.parts.folders());
    if (csv === null) return this.whenStill(stamp, () => this.planUnusable({ code: "outside-folder", path: data, file }));

    this.planTrouble = null;
    if (text !== this.planText?.text) this.note = null;
    this.planText = { text, file };
    if (this.watched?.csv === csv) this.watched.session.planChanged(this.planText, this.parts.recall(this.planText));
    else this.followData(csv);
    this.parts.changed();
  }

  /** A plan that cannot be used may be half written: say so only when it has stood still. */
  private whenStill(stamp: Stamp | null, say: () => void): void {
    const left = GRACE_MS - (this.planFollow?.quiet() ?? 0);
    if (left <= 0) return say();
    this.held = setTimeout(() => {
      if (this.planFollow?.stands(stamp)) say();
    }, left);
  }

  private planUnusable(problem: Problem): void {
    this.planTrouble = { text: sayProblem(problem), line: problem.line ?? null };
    this.parts.changed();
  }

  private followData(csv: string): void {
    this.leaveData();
    const { parts, planText } = this;
    const session = new Session({
      target: `${parts.target}#${++sessions}`,
      csv: { path: csv, file: basename(csv) },
      compute: parts.compute,
      followed: {
        accept: (stamp) => follow.accept(stamp),
        stands: (stamp) => follow.stands(stamp),
        quiet: () => follow.quiet(),
        afresh: () => follow.afresh(),
      },
      planText,
      chosen: parts.recall(planText),
      changed: parts.changed,
      missingText: (file) => sayProblem({ code: "file-missing", file }),
      log: (text) => parts.log(`${basename(csv)}: ${text}`),
    });
    if (this.slopes) session.slopes.choose(this.slopes);
    const follow = new Follow(csv, {
      stirring: () => session.fileStirs(),
      likely: (stamp) => session.fileLikely(stamp),
      settled: (stamp) => session.fileSettled(stamp),
    });
    this.watched = { session, csv, follow, watch: parts.watch(csv, () => follow.poke()) };
    follow.poke();
  }

  private leaveData(): void {
    this.watched?.watch.dispose();
    this.watched?.follow.dispose();
    this.watched?.session.dispose();
    this.watched = null;
  }

  private keptIn(): PanelState["keptIn"] {
    if (!this.keeping) return { plan: null, note: this.note };
    const plan = basename(this.path);
    const apart = this.session?.apart && !this.keeping.busy ? words.notInPlan(plan) : null;
    return { plan, note: this.note ?? apart };
  }

  private blank(): SessionState {
    const nothing = { question: null, presentation: null, checking: false, reading: null, filter: null, slopes: null };
    return { file: basename(this.path), status: { kind: "reading" }, ...nothing };
  }
}
