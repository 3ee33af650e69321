import type { Comparison } from "../../engine/comparison";
import type { Plan } from "../../engine/plan";
import { count } from "../digits";
import { heldName, listed, oneLine, rowsName, word } from "../names";
import { DASH } from "../rows";
import type { ValueFault } from "../writeup/figure";
import type { BrokenReason } from "../writeup/find";
import type { Reviewed } from "../writeup/review";
import { FIGURES } from "../writeup/marker";
import type { MarkerFault } from "../writeup/marker";
import type { Printed, PrintedRow } from "../writeup/printed";

/** Digits of a fingerprint that are shown. */
const SHOWN = 12;
/** Stands for an inline number that cannot be computed. */
export const NO_NUMBER = "no number";
export const PLAN_CHANGED = "the plan was changed after results were seen";

/** "5 sets looked at". */
export function saySetsLooked({ sets }: Comparison): string {
  return `${count(sets.length)} ${sets.length === 1 ? "set" : "sets"} looked at`;
}

/** "plan heating.slantwise.json 1f2e3d4c5b6a", and how often it was changed since the block was first written. */
export function sayPlanUsed(path: string, sha: string, changes: number): string {
  const changed = changes === 0 ? "" : `, changed ${changes === 1 ? "once" : `${count(changes)} times`} after results were seen`;
  return `plan ${oneLine(path)} ${sha.slice(0, SHOWN)}${changed}`;
}

/** What a block printed and would print now, in one line: "estimate was −212, is −187; 14 flats fewer". */
export function sayMoved(was: Printed, now: Printed, planChanged: boolean, plan: Plan): string {
  const said: string[] = [];
  if (planChanged) said.push(PLAN_CHANGED);
  if (was.reported !== now.reported) said.push(`reported set was ${was.reported}, is ${now.reported}`);
  const several = was.tables.length > 1 || now.tables.length > 1;
  for (const [contrast, rows] of now.tables) {
    const before = was.tables.find(([name]) => name === contrast)?.[1];
    const lead = several ? `${contrast}: ` : "";
    if (!before) said.push(`${contrast} is new`);
    else said.push(...sayReported(find(before, was.reported), find(rows, now.reported)).map((text) => lead + text));
  }
  for (const [contrast] of was.tables)
    if (!now.tables.some(([name]) => name === contrast)) said.push(`${contrast} is no longer there`);
  const other = was.reported === now.reported ? sayOthers(was, now) : null;
  if (other) said.push(other);
  if (was.rows !== now.rows)
    said.push(`${count(Math.abs(now.rows - was.rows))} ${rowsName(plan)} ${now.rows < was.rows ? "fewer" : "more"}`);
  if (was.sets !== now.sets) said.push(`sets looked at were ${count(was.sets)}, are ${count(now.sets)}`);
  const figures = said.length > (planChanged ? 1 : 0);
  return (figures ? said : [...said, "sentences changed, no figure of the table did"]).join("; ");
}

const find = (rows: readonly PrintedRow[], held: string) => rows.find((row) => row[0] === held);
/** "−185 (−232, −137)" without its interval. */
const figure = (cell: string) => (/^[+−\d]/.test(cell) ? cell.split(" (")[0] : cell);

function sayReported(was: PrintedRow | undefined, now: PrintedRow | undefined): string[] {
  if (!was || !now) return [];
  const said: string[] = [];
  const [, difference, shift, word] = was;
  if (figure(difference) !== figure(now[1])) said.push(`estimate was ${figure(difference)}, is ${figure(now[1])}`);
  else if (difference !== now[1]) said.push(`estimate with its interval was ${difference}, is ${now[1]}`);
  // a shift moves with the estimate: it is said where the estimate did not
  else if (shift !== now[2]) said.push(`shift was ${shift}, is ${now[2]}`);
  // a dash is no word: the estimate says what became of it
  if (word !== now[3] && word !== DASH && now[3] !== DASH) said.push(`in a word it was ${word}, is ${now[3]}`);
  return said;
}

/** Sets beside the reported one: the first that moved, where the reported one did not. */
function sayOthers(was: Printed, now: Printed): string | null {
  const moved = now.tables.flatMap(([contrast, rows]) => {
    const before = was.tables.find(([name]) => name === contrast)?.[1] ?? [];
    return rows.flatMap((row) => {
      const old = find(before, row[0]);
      return old && (old[1] !== row[1] || old[2] !== row[2] || old[3] !== row[3]) ? [{ held: row[0], old, row }] : [];
    });
  });
  if (moved.length === 0 || moved.some(({ held }) => held === now.reported)) return null;
  const [{ held, old, row }] = moved;
  const more = moved.length === 1 ? "" : `, and ${count(moved.length - 1)} more of the table's rows`;
  return `with ${held} held fixed it was ${old[1]}, is ${row[1]}${more}`;
}

/** "was −212, is −187". */
export function sayTextMoved(was: string, now: string): string {
  return was === "" ? `was empty, is ${now}` : `was ${oneLine(was)}, is ${now}`;
}

/** A marker that is left alone: what is wrong with it. */
export function sayBroken(reason: BrokenReason): string {
  switch (reason.code) {
    case "block-open":
      return "the block has no closing marker (slantwise:end), so it is not touched.";
    case "block-end-alone":
      return "this closing marker has no opening one before it.";
    case "not-alone":
      return "a block's marker must stand on a line of its own.";
    case "value-open":
      return "the inline number has no closing marker (/slantwise:value) in its paragraph, so it is not touched.";
    case "value-end-alone":
      return "this closing marker has no opening one before it in its paragraph.";
    case "marker":
      return sayFault(reason.fault, reason.of);
  }
}

function sayFault(fault: MarkerFault, of: "block" | "value"): string {
  const mend = of === "block" ? "; insert the block anew." : ".";
  switch (fault.code) {
    case "not-pairs":
      return `the marker must hold key=value pairs, each key once${mend}`;
    case "format":
      return `the marker has format ${word(fault.found)}, which another version of Slantwise wrote.`;
    case "lacks":
      return `the marker lacks ${fault.key}${mend}`;
    case "unknown":
      return `a marker has no key ${word(fault.key)}${mend}`;
    case "bad":
      return `the marker's ${fault.key} ${of === "block" ? "is damaged" : `must be ${expected(fault.key)}`}${mend}`;
  }
}

function expected(key: string): string {
  switch (key) {
    case "of":
      return listed(FIGURES, "or");
    case "digits":
      return "a whole number from 0 to 99, and rows and p have digits of their own";
    default:
      return "percent-encoded";
  }
}

/** An inline number that cannot be looked up. */
export function sayValueFault(fault: ValueFault, { sets }: Comparison, plan: Plan): string {
  switch (fault.code) {
    case "no-set": {
      const names = sets.slice(0, 6).map(({ adjustedFor }) => `“${heldName(adjustedFor, plan)}”`);
      const more = sets.length > names.length ? ` and ${count(sets.length - names.length)} more` : "";
      return `no set holds exactly ${heldName(fault.set, plan)} fixed; there are ${names.join(", ")}${more}.`;
    }
    case "no-contrast":
      return `there is no contrast ${word(fault.contrast)}; there is ${listed(fault.contrasts.map(word))}.`;
    case "several-contrasts":
      return `there are several contrasts; name one of ${listed(fault.contrasts.map(word), "or")} as contrast=.`;
    case "base-shift":
      return "the unadjusted set has no shift: it is what the others are held against.";
  }
}

/** A plan's path that leads out of the folders that may be read. */
export function sayPlanOutside(path: string): string {
  return `the plan ${word(path)} lies outside the folders that may be read; keep it inside the workspace or beside the document.`;
}

/** A name that is no plan's. */
export function sayPlanName(path: string): string {
  return `a plan's name ends in .slantwise.json; ${word(path)} does not.`;
}

/**
 * How a block or an inline number stands, as one line without where it stands.
 * @param refreshing null where it is only looked at; else what was asked for beside it, the line saying what was done
 */
export function sayVerdict({ verdict }: Pick<Reviewed, "verdict">, refreshing: { readonly overwrite: boolean } | null): string {
  const moved = "moved" in verdict && verdict.moved !== null ? `: ${verdict.moved}` : "";
  switch (verdict.state) {
    case "fresh":
      return "fresh";
    case "unchanged":
      return `checked again, unchanged${verdict.note === null ? "" : `; ${verdict.note}`}`;
    case "stale":
      return `${refreshing ? "refreshed" : "stale"}${moved}`;
    case "edited":
      if (!refreshing) return moved === "" ? "edited by hand" : `edited by hand, and stale${moved}`;
      return refreshing.overwrite ? `edited by hand, overwritten${moved}` : `edited by hand, left alone${moved}`;
    case "no-number":
      return `${verdict.why}${moved === "" ? "" : ` (${verdict.moved})`}`;
    case "unusable":
      return verdict.why;
  }
}
