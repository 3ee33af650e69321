import "./style/panel.css";
import type { HostMessage, PanelState } from "../src/protocol";
import { openChannel } from "./channel";
import { el } from "./dom";
import { drawQuestion } from "./sections/question";
import { drawFacts, tickAge } from "./sections/facts";
import { drawReadout } from "./sections/readout";
import { drawShifts, showCopied } from "./sections/shifts";
import { showSaved } from "./sections/save";
import { drawSlopes } from "./sections/slopes";
import { drawNotes } from "./sections/notes";
import { drawStatus } from "./sections/status";
import { announcement, foresee, readKept } from "./state";
import type { Kept } from "./state";
import type { View } from "./view";

const channel = openChannel(receive);
let kept: Kept = readKept(channel.kept());
let state: PanelState | null = null;
let scrolled = false;
let copies = 0;
let announced: string | null = null;

const page = document.querySelector<HTMLElement>("#panel") ?? document.body.appendChild(el("main", { id: "panel" }));
const status = el("div", { class: "status" });
const [question, readout, shifts, slopes, notes] = ["question", "readout", "shifts", "slopes", "notes"].map((name) =>
  el("section", { "data-section": name, "aria-labelledby": `head-${name}`, hidden: true }),
);
const facts = el("p", { class: "facts" });
const live = el("p", { class: "unseen", "aria-live": "polite" });
page.append(el("h1", { class: "unseen" }, "Comparison"), status, question, readout, shifts, slopes, notes, live);

function receive(message: HostMessage): void {
  if (message.type === "copied") {
    if (message.id === copies) showCopied(shifts, message.text, message.ok);
    return;
  }
  if (message.type === "saved") return showSaved(message);
  state = message.state;
  keep({ target: state.target });
  draw();
  announce(state);
  if (!scrolled && state.presentation) {
    scrolled = true;
    window.scrollTo(0, kept.scroll);
  }
}

function draw(): void {
  if (!state) return;
  const view: View = {
    state,
    post: channel.post,
    choose: (change) => {
      channel.post({ type: "choose", change });
      if (state) state = foresee(state, change);
      draw();
    },
    isOpen: (name) => kept.open.includes(name),
    setOpen: (name, open) => {
      const others = kept.open.filter((item) => item !== name);
      keep({ open: open ? [...others, name] : others });
    },
    wanted: () => kept.slopes,
    want: (change) => {
      keep({ slopes: { ...kept.slopes, ...change } });
      draw();
    },
    copy: (as) => channel.post({ type: "copy", id: ++copies, as }),
  };
  document.body.dataset["status"] = state.status.kind;
  drawStatus(status, view);
  drawQuestion(question, facts, view);
  drawFacts(facts, view);
  drawReadout(readout, view);
  drawShifts(shifts, view);
  drawSlopes(slopes, view);
  drawNotes(notes, view);
}

/** The first result is read like any page; only later ones are told. */
function announce(now: PanelState): void {
  const text = announcement(now);
  if (text === null) return;
  const run = `${now.reading?.number ?? 0} ${text}`;
  if (announced !== null && announced !== run) live.textContent = text;
  announced = run;
}

function keep(change: Partial<Kept>): void {
  kept = { ...kept, ...change };
  channel.keep(kept);
}

let settling = 0;
window.addEventListener("scroll", () => {
  window.clearTimeout(settling);
  if (scrolled) settling = window.setTimeout(() => keep({ scroll: window.scrollY }), 150);
});
window.setInterval(() => tickAge(facts, Date.now()), 1000);
channel.post({ type: "ready" });
