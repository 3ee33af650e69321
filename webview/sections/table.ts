import type { ContrastBlock, ShiftRow } from "../../src/report/presentation";
import { drawAxis } from "../charts/axis";
import { drawLine } from "../charts/line";
import { button, el } from "../dom";
import type { View } from "../view";

/** A row a set. Roles are spelt out because a narrow page lays the table out as blocks, which would take them away. */
export function tableOf(block: ContrastBlock, name: string, { choose }: View): HTMLElement {
  const { heads, rows, axis } = block;
  const headOf = (text: string, kind: string) => el("th", { scope: "col", role: "columnheader", class: kind }, text);
  const scale = el(
    "th",
    { scope: "col", role: "columnheader", class: "axis-cell" },
    el("span", { class: "unseen" }, "as a line"),
    axis && drawAxis(axis),
  );
  const top = el(
    "tr",
    { role: "row" },
    headOf(heads.held, "held"),
    headOf(heads.rows, "rows"),
    headOf(heads.difference, "difference"),
    scale,
    headOf(heads.shift, "shift"),
    headOf(heads.word, "word"),
  );
  const body = rows.map((row) => line(row, block, () => choose({ key: "report", columns: row.adjustedFor })));
  const table = el("table", { role: "table", class: axis ? "shifts" : "shifts no-axis", "aria-label": name });
  table.append(el("thead", { role: "rowgroup" }, top), el("tbody", { role: "rowgroup" }, ...body));
  // estimates end on one edge, however many digits each has
  table.style.setProperty("--difference", `${widest(rows, "difference")}ch`);
  table.style.setProperty("--shift", `${widest(rows, "shift")}ch`);
  return table;
}

function line(row: ShiftRow, { axis, heads, contrast }: ContrastBlock, report: () => void): HTMLElement {
  const mark = row.reported
    ? el("span", { class: "mark" }, "◂ reported")
    : button("report", `report ${contrast} ${row.set}`, report, {
        class: "link report",
        "aria-label": `report this set: ${row.held} held fixed`,
        title: "Report this set",
      });
  const cell = (kind: "rows" | "difference" | "shift", ...content: (Node | string)[]) =>
    el("td", { role: "cell", class: kind, "data-cell": kind, "data-head": heads[kind] }, ...content);
  const single = row.kind !== "varies" && row.kind !== "none";
  return el(
    "tr",
    { role: "row", "data-set": row.set, class: row.reported ? "reported" : null },
    el(
      "th",
      { scope: "row", role: "rowheader", class: "held" },
      el("span", { "data-cell": "held", title: row.held }, ...breakable(row.held)),
      row.place !== null && el("span", { class: "place" }, ` ${row.place}`),
    ),
    cell("rows", row.rows),
    cell("difference", ...(single ? figures(row.difference) : [row.difference])),
    el("td", { role: "cell", class: "axis-cell" }, axis && drawLine(axis, row.line, row.aloud)),
    cell("shift", ...figures(row.shift)),
    el("td", { role: "cell", class: "word" }, el("span", { "data-cell": "word" }, row.word), mark),
  );
}

/** A long name may break after an underscore before it breaks anywhere. */
function breakable(text: string): (Node | string)[] {
  return text.split(/(?<=_)/).flatMap((part, i) => (i === 0 ? [part] : [el("wbr", {}), part]));
}

/** "+340 (290, 390), difference in means only": the figure, its interval, and words; lines break only between them and in the words. */
function figures(text: string): (Node | string)[] {
  const [estimate, rest] = pieces(text);
  if (rest === "") return [el("span", { class: "estimate" }, text)];
  const end = rest.indexOf(")") + 1;
  const words = rest.slice(end).replace(/^(,?) /, "$1");
  const comma = words.startsWith(",") ? "," : "";
  return [
    el("span", { class: "estimate" }, estimate),
    " ",
    el("span", { class: "between" }, rest.slice(0, end) + comma),
    ...(words === "" ? [] : [" ", el("span", { class: "said" }, words.slice(comma.length))]),
  ];
}

function pieces(text: string): [string, string] {
  const at = text.indexOf(" (");
  return at < 0 ? [text, ""] : [text.slice(0, at), text.slice(at + 1)];
}

function widest(rows: readonly ShiftRow[], key: "difference" | "shift"): number {
  return Math.max(
    1,
    ...rows
      .filter(({ kind }) => kind !== "varies" && kind !== "none")
      .map((row) => pieces(row[key])[0].length)
      .filter((length) => length < 16),
  );
}
