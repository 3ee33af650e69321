import type { ColumnInfo, QuestionState } from "../../src/protocol";
import { button, el } from "../dom";
import { redraw } from "../redraw";
import type { View } from "../view";
import { head } from "./head";
import { numberField } from "./numberField";
import { picker } from "./picker";
import { planLine } from "./plan";
import { select } from "./select";

/** Value of the choice that asks for no average; no group is named so, since cells are trimmed. */
const NO_ROWS = " ";
/** As the plan writes it. */
const ALL_ROWS = "all rows";

/** The question as a sentence whose words are chosen in place. */
export function drawQuestion(part: HTMLElement, facts: HTMLElement, view: View): void {
  const { state, choose } = view;
  const { question, file } = state;
  // asked for where there is no single number, and shown as long as it is asked for
  const differs = state.presentation?.blocks.some(({ rows }) => rows.some(({ kind }) => kind === "varies")) ?? false;
  part.hidden = false;
  part.dataset["focusNext"] = "add";
  redraw(part, [question && { ...question, setsChoice: null, setCount: null }, file, differs, state.keptIn], () => {
    const sentence = question
      ? sentences(question, differs, choose)
      : [el("p", { class: "quiet" }, "The question follows once the file has been read.")];
    return [head("question", "Question"), el("div", { class: "body" }, ...sentence, question && planLine(view), facts)];
  });
}

function sentences(question: QuestionState, differs: boolean, choose: View["choose"]): HTMLElement[] {
  const { plan, columns, levels, reference, kind } = question;
  const exposure = columnSelect("exposure", "Exposure", columns, plan.exposure.column, "notExposure", (column) =>
    choose({ key: "exposure", column }),
  );
  const outcome = columnSelect("outcome", "Outcome", columns, plan.outcome.column, "notOutcome", (column) =>
    choose({ key: "outcome", column }),
  );
  const against = select(
    "reference",
    "Reference group",
    levels.map((level) => ({ value: level, text: level, disabled: false })),
    reference ?? "",
    (level) => choose({ key: "reference", level }),
  );
  const per = numberField({
    name: "per",
    label: `Step of ${plan.exposure.column}`,
    value: plan.exposure.per ?? 1,
    empty: false,
    commit: (value) => value !== null && choose({ key: "per", value }),
  });
  const step =
    kind === "amount"
      ? word("(per ", per, plan.exposure.unit ? ` ${plan.exposure.unit})` : ")")
      : levels.length > 0
        ? word("(against ", el("span", { class: "tied" }, against, ")"))
        : null;
  const held = plan.covariates?.map(({ column }) => column) ?? [];
  const chips = held.map((column) =>
    chip(column, plan.always?.includes(column) ?? false, () =>
      choose({ key: "covariates", columns: held.filter((other) => other !== column) }),
    ),
  );
  const add = picker(columns, reasons(question), (column) => choose({ key: "covariates", columns: [...held, column] }));
  const spaced = [
    word("How much does ", exposure),
    step,
    word("move ", outcome, ","),
    word("holding"),
    ...chips,
    word(...add.button, " fixed?"),
  ];
  return [
    el("p", { class: "question" }, ...spaced.filter((item) => item !== null).flatMap((item) => [item, " "])),
    add.list,
    el("p", { class: "question margin" }, "A difference of ", marginField(question, choose), ` ${unit(question)}would matter.`),
    ...(differs || plan.average ? [averageLine(question, choose)] : []),
  ];
}

/** Which rows to average over where slopes differ; none unless asked for. */
function averageLine({ plan, kind, levels }: QuestionState, choose: View["choose"]): HTMLElement {
  const rows = [NO_ROWS, ALL_ROWS, ...(kind === "groups" ? levels : [])];
  const choices = rows.map((over) => ({ value: over, text: over === NO_ROWS ? "no rows" : over, disabled: false }));
  const list = select("average", "Rows to average over where slopes differ", choices, plan.average ?? NO_ROWS, (over) =>
    choose({ key: "average", over: over === NO_ROWS ? null : over }),
  );
  return el("p", { class: "question margin" }, "Where slopes differ, average over ", list, ".");
}

function marginField({ plan }: QuestionState, choose: View["choose"]): HTMLElement {
  return numberField({
    name: "margin",
    label: "A difference that would matter",
    value: plan.margin ?? null,
    empty: true,
    commit: (value) => choose({ key: "margin", value }),
  });
}

function unit({ plan }: QuestionState): string {
  if (plan.outcome.form === "log") return "as a ratio less 1 ";
  return plan.outcome.unit ? `${plan.outcome.unit} ` : "";
}

/** Words and a control that stay on one line together. */
function word(...parts: (Node | string)[]): HTMLElement {
  return el("span", { class: "word" }, ...parts);
}

function chip(column: string, always: boolean, remove: () => void): HTMLElement {
  return el(
    "span",
    { class: "chip", "data-covariate": column },
    el("span", { class: "name", title: column }, column),
    always && el("span", { class: "always" }, "in every set"),
    button("×", `chip ${column}`, remove, {
      class: "remove",
      "aria-label": `Do not hold ${column} fixed`,
      title: "Do not hold fixed",
    }),
  );
}

/** Why a column cannot be held fixed now, or null; columns already held are not offered. */
function reasons({ plan }: QuestionState): (column: ColumnInfo) => string | null | "held" {
  const held = new Set(plan.covariates?.map(({ column }) => column));
  return (column) => {
    if (held.has(column.name)) return "held";
    if (column.name === plan.outcome.column) return "is the outcome";
    if (column.name === plan.exposure.column) return "is the exposure";
    return column.notCovariate;
  };
}

function columnSelect(
  role: string,
  label: string,
  columns: readonly ColumnInfo[],
  chosen: string,
  why: "notExposure" | "notOutcome",
  choose: (column: string) => void,
): HTMLElement {
  const choices = columns.map((column) => {
    const reason = column[why];
    return { value: column.name, text: reason === null ? column.name : `${column.name} — ${reason}`, disabled: reason !== null };
  });
  return select(role, label, choices, chosen, choose);
}
