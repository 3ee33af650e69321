import { button, el } from "../dom";
import { redraw } from "../redraw";
import type { View } from "../view";
import { head } from "./head";

type Note = NonNullable<View["state"]["presentation"]>["notes"][number];

/** Lines offered a note; more would bury the sentence. */
const LINES = 8;

/** Notes to the data and the fits: the important ones in sight, the others folded under a line that counts them. */
export function drawNotes(part: HTMLElement, { state, post, isOpen, setOpen }: View): void {
  const notes = state.presentation?.notes ?? [];
  part.hidden = notes.length === 0;
  redraw(part, notes, () => {
    const plain = notes.filter(({ important }) => important);
    const folded = notes.filter(({ important }) => !important);
    const list = (items: readonly Note[]) =>
      el("ul", { class: "notes" }, ...items.map((note) => el("li", {}, note.text, lines(note))));
    const lines = (note: Note) =>
      note.lines.length > 0 &&
      el(
        "span",
        { class: "lines" },
        ...note.lines.slice(0, LINES).map((line) =>
          button(`line ${line}`, `note ${notes.indexOf(note)} ${line}`, () => post({ type: "openLine", line }), {
            class: "link",
          }),
        ),
        note.lines.length > LINES && el("span", { class: "quiet" }, `and ${note.lines.length - LINES} more`),
      );
    const fold = el("details", { open: isOpen("notes") });
    fold.addEventListener("toggle", () => setOpen("notes", fold.open));
    const count = plain.length > 0 ? `${folded.length} more` : String(folded.length);
    fold.append(
      el("summary", { "data-focus": "notes" }, `${count} ${folded.length === 1 ? "note" : "notes"} to the data and the fits`),
      list(folded),
    );
    return [head("notes", "Notes"), el("div", { class: "body" }, plain.length > 0 && list(plain), folded.length > 0 && fold)];
  });
}
