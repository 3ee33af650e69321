import type { Comparison } from "../engine/comparison";
import type { Finding } from "../engine/findings";
import type { Plan } from "../engine/plan";
import { axisFor } from "./axis";
import { count, levelName } from "./digits";
import { columnName, oneLine, rowsName } from "./names";
import type { ContrastBlock, Presentation, Sentence, ShiftRow } from "./presentation";
import { lineOf, shiftRows } from "./rows";
import { scaleOf } from "./scale";
import { stripOf } from "./strip";
import { sayErrors, sayJoint, sayOwnRows, sayRows } from "./wording/facts";
import { sayFinding } from "./wording/finding";
import { sayReadout } from "./wording/readout";
import { saySlopesSummary } from "./wording/slopesSection";

/** Up to this many sets are a table; more become a strip with the telling ones as rows. */
export const TABLE_SETS = 12;
/** Notes that change what the numbers mean or lose data. */
const IMPORTANT = new Set<Finding["code"]>([
  "unreadable-cells",
  "beyond-double-range",
  "long-rows",
  "log-not-positive",
  "two-valued-outcome",
  "after-exposure",
  "clusters-ignored",
  "standard-error-missing",
  "base-varies",
]);
/** Rows a filter may bring into a long table. */
const FILTER_ROWS = 50;

export interface PresentOptions {
  /** The columns were guessed, not chosen: the headline says so. */
  readonly guessed?: boolean;
  /** Errors or slopes tests are still to come. */
  readonly checking?: boolean;
  readonly filter?: { readonly holds: readonly string[]; readonly omits: readonly string[] } | null;
}

/** A comparison as every surface says it. */
export function present(
  comparison: Comparison,
  plan: Plan,
  { guessed = false, checking = false, filter = null }: PresentOptions = {},
): Presentation {
  const readout = sayReadout(comparison, plan, comparison.reported);
  const headline = withEnding(readout, guessed);
  return {
    title: oneLine(comparison.source.file),
    facts: factsOf(comparison, plan),
    readout: headline,
    blocks: (comparison.sets[0]?.contrasts ?? []).map((_, i) => blockOf(comparison, plan, i, checking, filter)),
    rows: sayRows(comparison, plan),
    joint: sayJoint(comparison, plan),
    notes: notesOf(comparison, plan),
    provenance: [
      oneLine(comparison.source.file),
      `${sayErrors(comparison, plan)}, ${levelName(comparison.question.level)} intervals`,
      `SHA-256 ${comparison.source.sha256.slice(0, 12)}`,
    ],
    summary: headline[0]?.text ?? "",
    slopesSummary: saySlopesSummary(comparison, plan, checking),
  };
}

function withEnding(readout: readonly Sentence[], guessed: boolean): Sentence[] {
  if (!guessed || readout.length === 0) return [...readout];
  const [first, ...rest] = readout;
  return [{ ...first, text: `${first.text.replace(/\.$/, "")} – columns guessed: check them.` }, ...rest];
}

function factsOf(comparison: Comparison, plan: Plan): string[] {
  const { rows, source } = comparison;
  const facts = [
    oneLine(source.file),
    `${count(rows.common)} of ${count(rows.read)} ${rowsName(plan)} complete`,
    sayErrors(comparison, plan),
  ];
  if (rows.droppedBy.length > 0)
    facts.push(`missing: ${rows.droppedBy.map((d) => `${columnName(d.column, plan)} ${count(d.rows)}`).join(", ")}`);
  return facts;
}

/** Notes in the order found, one of a kind where several sets say the same; last, what the rows alone did to the sets a person looks at. */
function notesOf(comparison: Comparison, plan: Plan): Presentation["notes"] {
  const seen = new Set<string>();
  const found = comparison.findings.flatMap((finding) => {
    const text = sayFinding(finding, comparison, plan);
    if (seen.has(text)) return [];
    seen.add(text);
    const lines = "lines" in finding ? finding.lines : [];
    return [{ code: finding.code as string, text, lines, important: IMPORTANT.has(finding.code) }];
  });
  const looked = [...new Set([0, comparison.reported])];
  const rows = looked
    .flatMap((set) => sayOwnRows(comparison, plan, set))
    .map((text) => ({ code: "own-rows", text, lines: [], important: false }));
  return [...found, ...rows];
}

function blockOf(
  comparison: Comparison,
  plan: Plan,
  contrast: number,
  checking: boolean,
  filter: PresentOptions["filter"],
): ContrastBlock {
  const scale = scaleOf(comparison.question, plan);
  const long = comparison.sets.length > TABLE_SETS;
  const shown = long ? telling(comparison, contrast, filter ?? null) : comparison.sets.map((_, i) => ({ set: i, place: null }));
  const rows = shiftRows(
    comparison,
    plan,
    contrast,
    shown.map((s) => s.set),
    checking,
  ).map((row, i): ShiftRow => ({ ...row, place: shown[i].place }));
  const lines = long ? comparison.sets.map((set) => lineOf(scale, set.contrasts[contrast])) : rows.map((row) => row.line);
  return {
    contrast: oneLine(comparison.sets[0].contrasts[contrast].contrast),
    heads: { held: "held fixed", rows: rowsName(plan), difference: scale.head, shift: "shift", word: "in a word" },
    axis: axisFor(lines),
    rows,
    strip: long ? stripOf(comparison, plan, contrast) : null,
  };
}

/** Of many sets: base, lowest, highest, reported, and those the filter asks for, in plan order. */
function telling(
  comparison: Comparison,
  contrast: number,
  filter: NonNullable<PresentOptions["filter"]> | null,
): { set: number; place: ShiftRow["place"] }[] {
  const estimates = comparison.sets.flatMap((set, i) => {
    const { readout } = set.contrasts[contrast];
    return readout.kind === "single" || readout.kind === "undecided" ? [{ i, value: readout.estimate }] : [];
  });
  const lowest = estimates.length > 0 ? estimates.reduce((a, b) => (b.value < a.value ? b : a)).i : -1;
  const highest = estimates.length > 0 ? estimates.reduce((a, b) => (b.value > a.value ? b : a)).i : -1;
  const wanted = new Set([0, lowest, highest, comparison.reported].filter((i) => i >= 0));
  if (filter) {
    const matches = comparison.sets.flatMap((set, i) => {
      const fits =
        filter.holds.every((c) => set.adjustedFor.includes(c)) && !filter.omits.some((c) => set.adjustedFor.includes(c));
      return fits ? [i] : [];
    });
    for (const i of matches.slice(0, FILTER_ROWS)) wanted.add(i);
  }
  return [...wanted]
    .sort((a, b) => a - b)
    .map((set) => ({ set, place: set === lowest ? "lowest" : set === highest ? "highest" : null }));
}
