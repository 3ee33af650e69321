import type { Status } from "../protocol";

/** Why a file or plan cannot be used, in words. */
export interface Trouble {
  readonly text: string;
  readonly line: number | null;
  readonly inPlan: boolean;
}

export interface Standing {
  /** The file is changing, or a run is going on, or its result still waits for the file to stand still. */
  readonly stirring: boolean;
  /** The sentence about a missing file; null while it is there. */
  readonly missing: string | null;
  readonly trouble: Trouble | null;
  readonly hasResult: boolean;
  /** Progress of a long run, in [0, 1]. */
  readonly share: number | null;
}

/** What the panel says about the freshness of what it shows. A file that is being written again hides yesterday's trouble. */
export function statusOf({ stirring, missing, trouble, hasResult, share }: Standing): Status {
  if (missing !== null) return { kind: "missing", text: missing };
  if (stirring) return hasResult ? { kind: "updating", share } : { kind: "reading" };
  return trouble ? { kind: "unusable", ...trouble } : { kind: "ready" };
}
