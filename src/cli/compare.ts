import type { Comparison } from "../engine/comparison";
import type { Problem } from "../engine/findings";
import { checkPlan } from "../plan/check";
import { toCsv } from "../report/csv";
import { toJson } from "../report/json";
import { toMarkdown } from "../report/markdown";
import { present } from "../report/present";
import { toText } from "../report/text";
import { sayProblem } from "../report/wording/problem";
import type { Arguments } from "./arguments";
import { dateOf } from "./date";
import { fit } from "./fit";
import { readInput } from "./input";
import { questionOf } from "./question";
import type { Question } from "./question";
import { Refusal } from "./refusal";
import { say } from "./sentences";
import type { Format } from "./values";
import { checkPlace, writeFile } from "./write";

/** What `compare` has to say: `out` for stdout (empty where it went to a file), `aside` for stderr. */
export interface Said {
  readonly out: string;
  readonly aside: string;
  /** 0 where it is not given. */
  readonly exitCode?: number;
}

/** @throws Refusal where the input cannot be used */
export function runCompare({ positionals: [path], values }: Arguments): Said {
  const read = readInput(path, values.get("missing") as readonly string[] | undefined);
  if (!read.ok) throw refusal(read.problem);
  const { table, parsed, shown, files } = read.input;
  // the table knows its file's name, a person the path
  const located = (problem: Problem): Problem => (problem.file === table.source.file ? { ...problem, file: shown } : problem);
  const question = questionOf(table, values, parsed);
  if ("problem" in question) throw refusal(located(question.problem));
  const [problem] = checkPlan(table, question.plan, parsed);
  if (problem) throw refusal(located(problem));

  const to = values.get("to") as string | undefined;
  if (to !== undefined) checkPlace(to, files);
  const format = (values.get("as") ?? "text") as Format;
  const out = written(fit(table, question.plan), question, format);
  const aside = question.filledIn.length > 0 ? say.guessed(question.filledIn) + "\n" : "";
  if (to === undefined) return { out, aside };
  writeFile(to, out, files);
  return { out: "", aside };
}

function written(comparison: Comparison, { plan, guessed }: Question, format: Format): string {
  const presentation = () => present(comparison, plan, { guessed });
  switch (format) {
    case "json":
      return ended(JSON.stringify(toJson(comparison, plan), null, 2));
    case "csv":
      return ended(toCsv(comparison, plan));
    case "markdown":
      return ended(toMarkdown(presentation(), comparison, { date: dateOf(new Date(), process.env["SOURCE_DATE_EPOCH"]) }));
    case "text":
      return ended(toText(presentation()));
  }
}

/** A text file's last line ends too. */
const ended = (text: string): string => (text.endsWith("\n") ? text : text + "\n");

const refusal = (problem: Problem): Refusal => new Refusal(sayProblem(problem));
