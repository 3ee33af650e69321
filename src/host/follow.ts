import { stat } from "node:fs/promises";
import { LOOK_MS, quietNeeded } from "./quiet";
import type { Stamp } from "./worker/messages";
import { sameStamp, stampOf } from "./worker/stamp";

export interface FollowEvents {
  /** The file is changing, or has gone; told at each change until it is settled. */
  stirring(): void;
  /** It looks as if saved at once: reading may begin, but nothing of it may be shown before `settled` tells the same stamp. */
  likely(stamp: Stamp): void;
  /** It has stood still long enough; null means it is not there. */
  settled(stamp: Stamp | null): void;
}

/**
 * Follows one file by looking at it whenever something may have happened (`poke`), and tells when a change begins and when the file
 * stands still again. One event never counts by itself: only two looks that agree do.
 */
export class Follow {
  /** Undefined before the first look. */
  private seen: Stamp | null | undefined = undefined;
  private since = 0;
  private changes = 0;
  private longestGap = 0;
  private open = false;
  private accepted: Stamp | null = null;
  private timer: NodeJS.Timeout | null = null;
  private looking = false;
  private again = false;
  private disposed = false;

  constructor(
    readonly path: string,
    private readonly events: FollowEvents,
  ) {}

  /** Look now: an event came, or a timer. Cheap; may be called at any time. */
  poke(): void {
    if (this.disposed) return;
    if (this.looking) {
      this.again = true;
      return;
    }
    this.looking = true;
    void look(this.path).then((stamp) => {
      this.looking = false;
      if (this.disposed) return;
      this.saw(stamp, Date.now());
      if (this.again) {
        this.again = false;
        this.poke();
      }
    });
  }

  /** The file was read whole in this state: what later ones are measured against. */
  accept(stamp: Stamp): void {
    this.accepted = stamp;
  }

  /** True while the file is as it was in that state and not about to change, as far as has been seen. */
  stands(stamp: Stamp | null): boolean {
    return !this.open && this.seen !== undefined && sameStamp(this.seen, stamp);
  }

  /** How long the file has stood still, ms. A file's own time counts as well, or an old file would be waited for. */
  quiet(): number {
    const now = Date.now();
    const own = this.seen ? now - Math.max(this.seen.mtimeMs, this.seen.ctimeMs) : 0;
    return Math.max(now - this.since, own);
  }

  /** What was settled is in doubt: let it stand still once more, then tell again. */
  afresh(): void {
    if (this.seen !== undefined) this.begin(this.seen, Date.now());
    this.poke();
  }

  dispose(): void {
    this.disposed = true;
    if (this.timer) clearTimeout(this.timer);
  }

  private saw(stamp: Stamp | null, now: number): void {
    if (this.seen === undefined) {
      // the first look: nothing to compare with, so an absent file is absent and an old file is whole
      this.begin(stamp, now);
      if (stamp === null || this.quiet() > 10 * LOOK_MS) return this.settle(stamp);
    } else if (!sameStamp(stamp, this.seen)) {
      if (this.open) {
        this.changes++;
        this.longestGap = Math.max(this.longestGap, now - this.since);
        this.seen = stamp;
        this.since = now;
        this.events.stirring();
      } else this.begin(stamp, now);
    } else if (!this.open) return;

    const still = now - this.since;
    const need = quietNeeded({ stamp, accepted: this.accepted, changes: this.changes, longestGap: this.longestGap });
    if (still >= need) return this.settle(stamp);
    if (stamp && still === 0 && need === LOOK_MS) this.events.likely(stamp);
    if (this.timer) clearTimeout(this.timer);
    this.timer = setTimeout(() => this.poke(), Math.min(LOOK_MS, need - still));
  }

  private begin(stamp: Stamp | null, now: number): void {
    this.open = true;
    this.changes = 0;
    this.longestGap = 0;
    this.seen = stamp;
    this.since = now;
    this.events.stirring();
  }

  private settle(stamp: Stamp | null): void {
    if (this.timer) clearTimeout(this.timer);
    this.timer = null;
    this.open = false;
    this.events.settled(stamp);
  }
}

async function look(path: string): Promise<Stamp | null> {
  try {
    return stampOf(await stat(path));
  } catch {
    return null;
  }
}
