import type { Comparison } from "../../engine/comparison";
import type { Plan } from "../../engine/plan";
import { toMarkdown } from "../markdown";
import { present } from "../present";
import { sayPlanUsed, saySetsLooked } from "../wording/writeup";
import { END_MARKER, writeBlockMarker } from "./marker";
import type { BlockMarker } from "./marker";
import { normalText } from "./normal";
import { printedOf } from "./printed";

/** Lower-case hex SHA-256 of a text's UTF-8 bytes. Given by the caller, since the report imports nothing. */
export type Hash = (text: string) => string;

/** What a plan gives at present. */
export interface Source {
  readonly comparison: Comparison;
  readonly plan: Plan;
  /** Hash of `planText`. */
  readonly planSha: string;
}

/** Where a block says it comes from, apart from the comparison itself. */
export type Origin = Pick<BlockMarker, "plan" | "planSha" | "dataSha" | "date" | "planChanges">;

/** The origin of a block written now for the first time. @param plan path relative to the document's folder */
export function originOf({ comparison, planSha }: Source, plan: string, date: string): Origin {
  return { plan, planSha, dataSha: comparison.source.sha256, date, planChanges: 0 };
}

/** The text of a block between its markers: sentences, tables, notes and provenance. */
export function blockBody({ comparison, plan }: Source, origin: Origin): string {
  const stamped = { ...comparison, source: { ...comparison.source, sha256: origin.dataSha } };
  const presentation = present(stamped, plan);
  const provenance = [
    ...presentation.provenance,
    saySetsLooked(comparison),
    sayPlanUsed(origin.plan, origin.planSha, origin.planChanges),
  ];
  return toMarkdown({ ...presentation, provenance }, stamped, { date: origin.date }).trimEnd();
}

/** A whole block, markers and all, without a line end after it. Line ends are "\n". */
export function blockText(source: Source, origin: Origin, hash: Hash): string {
  const body = blockBody(source, origin);
  const printed = printedOf(present(source.comparison, source.plan), source.comparison);
  const begin = writeBlockMarker({ ...origin, textSha: hash(normalText(body)), printed });
  return `${begin}\n\n${body}\n\n${END_MARKER}`;
}
