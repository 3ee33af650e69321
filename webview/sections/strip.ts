import type { ContrastBlock, Strip } from "../../src/report/presentation";
import { drawStrip, PLOT, ROW, stripAxis } from "../charts/strip";
import { onWidth } from "../charts/width";
import { button, el, svg } from "../dom";
import { percent } from "../charts/scale";
import type { View } from "../view";

/** Where a person last stood in a strip, by contrast; it outlives a redraw. */
const cursors = new Map<string, number>();

/** All sets of a long list in one picture. Arrow keys or the pointer name a set exactly; it can be made the reported one. */
export function stripOf(block: ContrastBlock, strip: Strip, { choose }: View): HTMLElement {
  const axis = stripAxis(strip, block.axis);
  const last = strip.items.length - 1;
  const texts = new Map(block.rows.map((row) => [row.set, row.difference]));
  const held = (i: number) => strip.items[i].holds.map((column) => strip.columns[column]);
  const said = (i: number) => {
    const item = strip.items[i];
    const text = item.difference ?? texts.get(item.set) ?? without(item.kind);
    return `${i + 1} of ${last + 1}: ${held(i).join(", ") || "nothing"} held fixed${text ? `; ${text}` : ""}`;
  };
  let at = Math.min(cursors.get(block.contrast) ?? 0, last);
  const height = PLOT + strip.columns.length * ROW;
  const picture = svg("svg", { class: "strip-picture", width: "100%", height, "aria-hidden": "true" });
  const plot = el("div", {
    class: "strip-plot",
    role: "slider",
    tabindex: 0,
    "aria-label": `All sets by their difference, ${block.contrast}`,
    "aria-valuemin": 1,
    "aria-valuemax": last + 1,
    "data-focus": `strip ${block.contrast}`,
  });
  plot.append(picture);
  const text = el("span", {});
  const report = button("report this set", `strip-report ${block.contrast}`, () => choose({ key: "report", columns: held(at) }), {
    class: "link",
  });
  let width = 0;
  const paint = (index: number) => {
    const shown = Math.min(Math.max(index, 0), last);
    text.textContent = said(shown);
    if (width > 0) picture.replaceChildren(...drawStrip(strip, axis, width, shown));
    return shown;
  };
  const stand = (index: number) => {
    at = paint(index);
    cursors.set(block.contrast, at);
    plot.setAttribute("aria-valuenow", String(at + 1));
    plot.setAttribute("aria-valuetext", said(at));
  };
  const under = (event: PointerEvent) =>
    Math.floor(((event.clientX - plot.getBoundingClientRect().left) / Math.max(1, width)) * (last + 1));
  plot.addEventListener("pointermove", (event) => paint(under(event)));
  plot.addEventListener("pointerleave", () => paint(at));
  plot.addEventListener("pointerdown", (event) => stand(under(event)));
  plot.addEventListener("keydown", (event) => {
    const step = Math.max(1, Math.round(last / 20));
    const to = {
      ArrowLeft: at - 1,
      ArrowDown: at - 1,
      ArrowRight: at + 1,
      ArrowUp: at + 1,
      PageDown: at - step,
      PageUp: at + step,
      Home: 0,
      End: last,
    }[event.key];
    if (to === undefined || event.ctrlKey || event.metaKey || event.altKey) return;
    event.preventDefault();
    stand(to);
  });
  onWidth(plot, (now) => {
    width = now;
    stand(at);
  });
  stand(at);
  const names = el("div", { class: "strip-names", "aria-hidden": "true" });
  const scale = el("div", { class: "strip-scale" });
  scale.style.height = `${PLOT}px`;
  for (const tick of axis.ticks) {
    const mark = el("span", {}, tick.text);
    mark.style.bottom = `${6 + (percent(axis, tick.at) / 100) * (PLOT - 12)}px`;
    scale.append(mark);
  }
  names.append(scale, ...strip.columns.map((column) => el("div", { class: "strip-name", title: column }, column)));
  return el(
    "div",
    { class: "strip" },
    el("div", { class: "strip-area" }, names, plot),
    el("p", { class: "strip-said" }, text, " ", report),
  );
}

function without(kind: Strip["items"][number]["kind"]): string {
  if (kind === "varies") return "no single difference";
  return kind === "none" ? "no difference can be given" : "";
}
