import { relative } from "node:path";
import { refreshed, review } from "../report/writeup/review";
import type { Now, Reviewed } from "../report/writeup/review";
import { sayPlanName, sayPlanOutside, sayVerdict } from "../report/wording/writeup";
import type { Arguments } from "./arguments";
import type { Said } from "./compare";
import { dateOf } from "./date";
import { readDocument, writeDocument } from "./document";
import { isPlan, pathNamed } from "./input";
import { Refusal } from "./refusal";
import { say } from "./sentences";
import { hashOf, sourceOf } from "./source";

const STALE = 1;
const UNUSABLE = 2;

/**
 * `check` and `refresh`: one line for every block and inline number, what cannot be used on stderr. A document that cannot be used does not
 * keep the others from being looked at.
 */
export function runWriteUps(command: "check" | "refresh", { positionals, flags }: Arguments): Said {
  const date = dateOf(new Date(), process.env["SOURCE_DATE_EPOCH"]);
  const sources = new Map<string, Now>();
  const [out, aside]: [string[], string[]] = [[], []];
  let exitCode = 0;
  const reach = (code: number) => (exitCode = Math.max(exitCode, code));
  for (const path of positionals) {
    try {
      const document = readDocument(path);
      const now = (plan: string) => planNow(path, plan, sources);
      const parts = document.parts.map((part) => ({ ...part, reviewed: review(part.text, { hash: hashOf, date, now }) }));
      const overwrite = flags.has("overwrite-edits");
      if (command === "refresh") {
        const file = document.withParts(parts.map(({ text, reviewed }) => refreshed(text, reviewed, overwrite)));
        if (file !== document.file) writeDocument(document, file);
      }
      if (parts.every(({ reviewed }) => reviewed.length === 0)) out.push(`${path}: ${say.nothingThere}`);
      for (const { shown, reviewed } of parts)
        for (const item of reviewed) {
          reach(codeOf(item, command, overwrite));
          const line = `${shown}:${item.line}: ${sayVerdict(item, command === "refresh" ? { overwrite } : null)}`;
          (item.verdict.state === "unusable" ? aside : out).push(line);
        }
    } catch (error) {
      if (!(error instanceof Refusal)) throw error;
      aside.push(error.message);
      reach(UNUSABLE);
    }
  }
  return { out: ended(out), aside: ended(aside), exitCode };
}

function codeOf({ verdict: { state } }: Reviewed, command: "check" | "refresh", overwrite: boolean): number {
  switch (state) {
    case "fresh":
    case "unchanged":
      return 0;
    case "stale":
      return command === "check" ? STALE : 0;
    case "edited":
      return command === "refresh" && overwrite ? 0 : STALE;
    case "no-number":
      return STALE;
    case "unusable":
      return UNUSABLE;
  }
}

/** What the plan a document names gives; read once a run, however many name it. */
function planNow(document: string, plan: string, sources: Map<string, Now>): Now {
  if (!isPlan(plan)) return { ok: false, why: sayPlanName(plan) };
  const path = pathNamed(document, plan);
  if (path === null) return { ok: false, why: sayPlanOutside(plan) };
  const known = sources.get(path);
  if (known) return known;
  const shown = relative(process.cwd(), path);
  const now = sourceOf(shown.startsWith("..") ? path : shown);
  sources.set(path, now);
  return now;
}

const ended = (lines: readonly string[]): string => lines.map((line) => `${line}\n`).join("");
