import type { SlopesChoice, SlopesSection } from "../protocol";
import type { SessionParts } from "./sessionParts";
import type { Figure } from "./worker/client";

/**
 * The Slopes section of one panel: closed, or open on a choice. It is drawn after the comparison, never in its way, and what is shown is always
 * of the comparison that is shown: an answer about another one, or to an earlier choice, is dropped.
 */
export class OpenSlopes {
  private choice: SlopesChoice | null = null;
  private shown: SlopesSection | null = null;
  private asked: Figure | null = null;
  /** The comparison shown, by the number of its run; null while there is none whose slopes have been tested with the plan's errors. */
  private of: number | null = null;
  /** Whether `shown` answers the choice. */
  private answered = false;
  /** The worker had lost the comparison once already, and has not answered since. */
  private wasLost = false;

  /** @param lost the worker does not hold the comparison any more: compare once more */
  constructor(
    private readonly parts: Pick<SessionParts, "target" | "compute" | "changed">,
    private readonly lost: () => void,
  ) {}

  get section(): SlopesSection | null {
    return this.shown;
  }

  /** The page opened the section, chose in it, or closed it (null). What was drawn stays until the new choice is. */
  choose(choice: SlopesChoice | null): void {
    this.choice = choice;
    this.answered = false;
    if (choice) return this.resume();
    this.pause();
    this.shown = null;
    this.parts.changed();
  }

  /** Another comparison is shown. @param of its run, null while its slopes are still being tested */
  renew(of: number | null): void {
    this.of = of;
    this.shown = null;
    this.answered = false;
    this.resume();
  }

  /** Something more important is to be computed. */
  pause(): void {
    this.asked?.cancel();
    this.asked = null;
  }

  /** Asks for what is open and not drawn yet. */
  resume(): void {
    this.pause();
    if (!this.choice || this.of === null || this.answered) return;
    const asked = this.parts.compute.slopes(this.parts.target, this.of, this.choice);
    this.asked = asked;
    void asked.section.then((section) => {
      if (this.asked === asked) this.heard(section);
    });
  }

  private heard(section: SlopesSection | null): void {
    this.asked = null;
    if (section) {
      this.shown = section;
      this.answered = true;
      this.wasLost = false;
      this.parts.changed();
    } else if (!this.wasLost) {
      this.wasLost = true;
      this.lost();
    }
  }
}
