import type { SessionParts } from "./sessionParts";
import type { Stamp } from "./worker/messages";

/** What may be shown once the file has stood still for a while; one thing at a time. */
export class Held {
  private timer: NodeJS.Timeout | null = null;

  constructor(private readonly parts: Pick<SessionParts, "followed" | "changed">) {}

  get waiting(): boolean {
    return this.timer !== null;
  }

  /** Acts once the file has stood still, in the state it was read, for `quiet` ms; not at all if it changes first. */
  until(stamp: Stamp | null, quiet: number, act: () => void): void {
    this.release();
    const { followed, changed } = this.parts;
    const left = quiet - followed.quiet();
    // a file that changed meanwhile will settle and start another run
    if (left <= 0) {
      if (stamp === null || followed.stands(stamp)) act();
      return;
    }
    this.timer = setTimeout(() => {
      this.timer = null;
      if (stamp === null || followed.stands(stamp)) act();
      changed();
    }, left);
  }

  release(): void {
    if (this.timer) clearTimeout(this.timer);
    this.timer = null;
  }
}
