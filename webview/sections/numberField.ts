import { el } from "../dom";
import { isReplacing } from "../redraw";

interface NumberField {
  readonly name: string;
  readonly label: string;
  readonly value: number | null;
  /** Whether no number at all is an answer. */
  readonly empty: boolean;
  readonly commit: (value: number | null) => void;
}

/** A number above zero, taken over on Enter or when the field is left. What is no such number is said beside the field and not sent. */
export function numberField({ name, label, value, empty, commit }: NumberField): HTMLElement {
  const written = value === null ? "" : String(value);
  const help = el(
    "span",
    { class: "wrong", id: `wrong-${name}`, hidden: true },
    empty ? "a number above 0, or nothing" : "a number above 0",
  );
  const input = el("input", {
    type: "text",
    inputmode: "decimal",
    autocomplete: "off",
    spellcheck: "false",
    "data-role": name,
    "data-focus": name,
    "aria-label": label,
    value: written,
  });
  let last = written;
  const take = () => {
    if (isReplacing() || input.value.trim() === last) return;
    const read = parse(input.value);
    const fine = read === null ? empty : Number.isFinite(read) && read > 0;
    help.hidden = fine;
    input.toggleAttribute("aria-invalid", false);
    if (fine) {
      input.removeAttribute("aria-describedby");
      last = input.value.trim();
      commit(read);
    } else {
      input.setAttribute("aria-invalid", "true");
      input.setAttribute("aria-describedby", help.id);
    }
  };
  input.addEventListener("blur", take);
  input.addEventListener("keydown", (event) => {
    if (event.key === "Enter") take();
    if (event.key === "Escape" && input.value !== last) {
      input.value = last;
      help.hidden = true;
      input.removeAttribute("aria-invalid");
    }
  });
  return el("span", { class: "number" }, input, help);
}

/** A comma stands for the decimal point unless it marks thousands; null for nothing written, not-a-number for no number. */
function parse(text: string): number | null {
  const bare = text.trim().replace(/\s/g, "");
  if (bare === "") return null;
  if (/^\d{1,3}(,\d{3})+(\.\d+)?$/.test(bare)) return Number(bare.replaceAll(",", ""));
  return Number(bare.replace(/^([^,.]*),([^,.]*)$/, "$1.$2"));
}
