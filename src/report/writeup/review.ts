import { sayBroken, sayMoved, sayTextMoved, sayValueFault, PLAN_CHANGED } from "../wording/writeup";
import { present } from "../present";
import { blockBody, blockText } from "./block";
import type { Hash, Source } from "./block";
import { figureNow } from "./figure";
import { findMarkers } from "./find";
import type { Found, FoundBlock, FoundValue, Place } from "./find";
import { VALUE_END, writeValueMarker } from "./marker";
import { normalText } from "./normal";
import { printedOf } from "./printed";

/** What a plan gives now, or the sentence why nothing. */
export type Now = ({ readonly ok: true } & Source) | { readonly ok: false; readonly why: string };

export interface Reviewing {
  readonly hash: Hash;
  /** YYYY-MM-DD that a rewritten block bears. */
  readonly date: string;
  /** By a plan's path as the markers write it, relative to the document. */
  readonly now: (plan: string) => Now;
}

/**
 * How a block or an inline number stands to its data and plan:
 * fresh; checked again, unchanged (data or plan have other bytes, the text would be the same); stale; edited by hand since it was written;
 * no-number (an inline number there is none for: its text says so, or would); unusable (no plan, no data, or a marker that is damaged).
 */
export type Verdict =
  | { readonly state: "fresh" }
  | { readonly state: "unchanged"; readonly note: string | null }
  | { readonly state: "stale"; readonly moved: string }
  /** `moved` is null where it would still print what was written before the edit. */
  | { readonly state: "edited"; readonly moved: string | null }
  /** `moved` is null where the text says already that there is none. */
  | { readonly state: "no-number"; readonly why: string; readonly moved: string | null }
  | { readonly state: "unusable"; readonly why: string };

export interface Reviewed extends Place {
  readonly kind: Found["kind"];
  /** As the marker writes it; null where the marker cannot be read. */
  readonly plan: string | null;
  readonly verdict: Verdict;
  /** What a refresh puts from `start` to `end`; null where there is nothing to write. */
  readonly replacement: string | null;
}

/** Paths of the plans a document's blocks and inline numbers name, each once. */
export function plansIn(text: string): string[] {
  return [...new Set(findMarkers(text).flatMap((found) => (found.kind === "broken" ? [] : [found.marker.plan])))];
}

/** Every block and inline number of a Markdown text, compared with what would be printed now, in the order of the text. */
export function review(text: string, reviewing: Reviewing): Reviewed[] {
  return findMarkers(text).map((found) => {
    const { kind, start, end, line } = found;
    const place = { kind, start, end, line };
    if (found.kind === "broken")
      return { ...place, plan: null, verdict: { state: "unusable", why: sayBroken(found.reason) }, replacement: null };
    const now = reviewing.now(found.marker.plan);
    const plan = found.marker.plan;
    if (!now.ok) return { ...place, plan, verdict: { state: "unusable", why: now.why }, replacement: null };
    return { ...place, plan, ...(found.kind === "block" ? reviewBlock(found, now, reviewing) : reviewValue(found, now)) };
  });
}

/**
 * The document brought up to date: fresh blocks, what is unusable, and all prose stay byte for byte.
 * @param overwriteEdits rewrites what was edited by hand too
 */
export function refreshed(text: string, reviewed: readonly Reviewed[], overwriteEdits: boolean): string {
  let out = "";
  let from = 0;
  for (const { start, end, verdict, replacement } of reviewed) {
    if (replacement === null || (verdict.state === "edited" && !overwriteEdits)) continue;
    out += text.slice(from, start) + replacement;
    from = end;
  }
  return out + text.slice(from);
}

type Judged = Pick<Reviewed, "verdict" | "replacement">;

function reviewBlock({ marker, body, indent, ending }: FoundBlock, now: Source, { hash, date }: Reviewing): Judged {
  const planChanged = marker.planSha !== now.planSha;
  const dataSha = now.comparison.source.sha256;
  const edited = hash(normalText(body)) !== marker.textSha;
  // what it would print under the old fingerprints and date: any other text is a change of what is said
  const same = hash(normalText(blockBody(now, marker))) === marker.textSha;
  const origin = { ...marker, planSha: now.planSha, dataSha, date, planChanges: marker.planChanges + (planChanged ? 1 : 0) };
  const replacement = blockText(now, origin, hash)
    .split("\n")
    .map((line, i) => (line === "" || i === 0 ? line : indent + line))
    .join(ending);
  const moved = () =>
    sayMoved(marker.printed, printedOf(present(now.comparison, now.plan), now.comparison), planChanged, now.plan);
  if (edited) return { verdict: { state: "edited", moved: same ? null : moved() }, replacement: indent + replacement };
  if (!same) return { verdict: { state: "stale", moved: moved() }, replacement: indent + replacement };
  if (planChanged || marker.dataSha !== dataSha)
    return { verdict: { state: "unchanged", note: planChanged ? PLAN_CHANGED : null }, replacement: indent + replacement };
  return { verdict: { state: "fresh" }, replacement: null };
}

function reviewValue({ marker, text }: FoundValue, { comparison, plan }: Source): Judged {
  const figure = figureNow(comparison, plan, marker);
  if (!figure.ok)
    return { verdict: { state: "unusable", why: sayValueFault(figure.fault, comparison, plan) }, replacement: null };
  const shown = normalText(text);
  const now = normalText(figure.text);
  const moved = shown === now ? null : sayTextMoved(shown, now);
  const rewritten = `${writeValueMarker({ ...marker, was: figure.text })}${figure.text}${VALUE_END}`;
  // a number put right by hand is taken for ours again; a marker written by hand gets its `was` with its first change
  const replacement = moved === null && (marker.was === null || marker.was === figure.text) ? null : rewritten;
  if (marker.was !== null && shown !== normalText(marker.was) && moved !== null)
    return { verdict: { state: "edited", moved: marker.was === figure.text ? null : moved }, replacement };
  if (figure.refused !== null) return { verdict: { state: "no-number", why: figure.refused, moved }, replacement };
  return { verdict: moved === null ? { state: "fresh" } : { state: "stale", moved }, replacement };
}
