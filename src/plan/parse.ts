import { findNodeAtLocation, parseTree } from "jsonc-parser";
import type { Node, ParseError } from "jsonc-parser";
import type { Problem } from "../engine/findings";
import type { Plan } from "../engine/plan";
import { planShape } from "./keys";
import { positions } from "./position";
import type { Position } from "./position";
import { sayError } from "./syntax";

/** A plan file that was understood, and where its parts stand. */
export interface ParsedPlan {
  readonly ok: true;
  readonly plan: Plan;
  /** The file's name, as given. */
  readonly file: string;
  /** Position of the value at a path of keys and indexes; of the nearest part around it where the path is not in the file. */
  readonly at: (path: readonly (string | number)[]) => Position;
}

export type Parsed = ParsedPlan | { readonly ok: false; readonly problems: Problem[] };

/** Characters of a plan; a longer text is no plan somebody wrote. */
export const PLAN_LIMIT = 1_000_000;

/**
 * The text of a plan file as a plan. JSON with comments; a comma after a last item is allowed; `$schema` is ignored.
 * Every problem carries file, line and character, in the order of the text; there is at least one where `ok` is false. Never throws.
 */
export function parsePlan(text: string, file: string): Parsed {
  const fail = (...problems: Problem[]): Parsed => ({ ok: false, problems });
  if (text.length > PLAN_LIMIT) return fail({ code: "too-large", bytes: text.length, limit: PLAN_LIMIT, file });
  const plain = text.startsWith("\uFEFF") ? text.slice(1) : text;
  const position = positions(plain);
  if (plain.trim() === "") return fail({ code: "bad-json", detail: "it is empty", file, line: 1, character: 1 });

  const errors: ParseError[] = [];
  let root: Node | undefined;
  try {
    root = parseTree(plain, errors, { allowTrailingComma: true });
  } catch {
    // the parser is recursive: only nesting without end can exhaust it
    return fail({ code: "bad-json", detail: "it is nested too deeply", file, line: 1, character: 1 });
  }
  if (errors.length > 0 || !root)
    return fail(
      ...errors.map((error): Problem => ({ code: "bad-json", detail: sayError(error), file, ...position(error.offset) })),
    );

  const problems: (Problem & { readonly offset: number })[] = [];
  const read = planShape.read(root, "", (problem, { offset }) => problems.push({ ...problem, offset }));
  if (problems.length > 0) {
    problems.sort((a, b) => a.offset - b.offset);
    return fail(...problems.map(({ offset, ...problem }) => ({ ...problem, file, ...position(offset) }) as Problem));
  }
  return { ok: true, plan: read as Plan, file, at: (path) => position(nodeAt(root, path).offset) };
}

function nodeAt(root: Node, path: readonly (string | number)[]): Node {
  for (let length = path.length; length > 0; length--) {
    const found = findNodeAtLocation(root, path.slice(0, length));
    if (found) return found;
  }
  return root;
}
