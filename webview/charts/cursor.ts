import type { Plot } from "../../src/protocol";
import type { Frame } from "../../src/report/slopes/picture/place";
import { el } from "../dom";
import { isFlipped } from "./room";

const HINT = "Point at the plot, or press arrow keys on it, for exact values.";

export interface Cursor {
  /** Lies over the plot's area and shows the place that is read. */
  readonly area: HTMLElement;
  /** The exact values there, told to a screen reader politely; room for the longest is kept once they are read. */
  readonly said: HTMLElement;
  /** The plot was drawn: its stops and where they lie. */
  readonly lay: (plot: Plot, frame: Frame) => void;
}

/** Reads a plot's exact values stop by stop: by arrow keys on the focused plot, or under the pointer for as long as it is there. */
export function layCursor(host: HTMLElement): Cursor {
  const area = el("div", { class: "plot-area", "aria-hidden": "true" });
  const text = el("span", { "aria-live": "polite" });
  const longest = el("span", { class: "longest", "aria-hidden": "true" });
  const said = el("p", { class: "plot-said" }, text, longest);
  let now: { readonly plot: Plot; readonly frame: Frame } | null = null;
  /** Where a person stands, as a value of the axis; null before the first key. */
  let stood: number | null = null;

  const places = ({ plot, frame }: NonNullable<typeof now>) =>
    plot.stops.map(({ x }) => (isFlipped(plot) ? frame.y(x) : frame.x(x)));
  const nearest = (values: readonly number[], to: number) =>
    values.reduce((best, value, i) => (Math.abs(value - to) < Math.abs(values[best] - to) ? i : best), 0);

  function show(at: number | null): void {
    if (!now) return;
    if (at !== null)
      longest.textContent = now.plot.stops.reduce((most, { text }) => (text.length > most.length ? text : most), HINT);
    const stop = at === null ? undefined : now.plot.stops[at];
    area.replaceChildren(...(stop ? marks(now.plot, now.frame, stop) : []));
    const words = stop?.text ?? HINT;
    text.classList.toggle("quiet", !stop);
    if (text.textContent !== words) text.textContent = words;
  }
  const standing = () =>
    now && stood !== null && now.plot.stops.length > 0
      ? nearest(
          now.plot.stops.map(({ x }) => x),
          stood,
        )
      : null;
  const stand = (at: number) => {
    stood = now?.plot.stops[at]?.x ?? null;
    show(standing());
  };
  const under = (event: PointerEvent) => {
    if (!now || now.plot.stops.length === 0) return null;
    const { left, top } = host.getBoundingClientRect();
    return nearest(places(now), isFlipped(now.plot) ? event.clientY - top : event.clientX - left);
  };

  host.addEventListener("pointermove", (event) => show(under(event)));
  host.addEventListener("pointerleave", () => show(standing()));
  host.addEventListener("pointerdown", (event) => {
    const at = under(event);
    if (at !== null) stand(at);
  });
  host.addEventListener("keydown", (event) => {
    if (!now || now.plot.stops.length === 0 || event.ctrlKey || event.metaKey || event.altKey) return;
    const to = next(event.key, standing(), now.plot.stops.length - 1);
    if (to === null) return;
    event.preventDefault();
    stand(to);
  });
  return {
    area,
    said,
    lay: (plot, frame) => {
      now = { plot, frame };
      const { left, top, width, height } = frame.area;
      Object.assign(area.style, { left: `${left}px`, top: `${top}px`, width: `${width}px`, height: `${height}px` });
      show(standing());
    },
  };
}

/** The stop a key leads to; null where the key is not ours. The first arrow leads to an end. */
function next(key: string, at: number | null, last: number): number | null {
  const page = Math.max(1, Math.round(last / 10));
  const within = (to: number) => Math.min(Math.max(to, 0), last);
  switch (key) {
    case "Home":
      return 0;
    case "End":
      return last;
    case "ArrowRight":
    case "ArrowDown":
      return at === null ? 0 : within(at + 1);
    case "ArrowLeft":
    case "ArrowUp":
      return at === null ? last : within(at - 1);
    case "PageDown":
      return within((at ?? 0) + page);
    case "PageUp":
      return within((at ?? last) - page);
    default:
      return null;
  }
}

/** A line through the stop and a ring on everything drawn there, relative to the area. */
function marks(plot: Plot, { area, x, y }: Frame, stop: Plot["stops"][number]): HTMLElement[] {
  const flipped = isFlipped(plot);
  const ring = (across: number, up: number) => {
    const mark = el("span", { class: "plot-ring" });
    Object.assign(mark.style, { left: `${across - area.left}px`, top: `${up - area.top}px` });
    return mark;
  };
  if (flipped) return [ring(x(stop.y), y(stop.x))];
  const line = el("span", { class: "plot-line" });
  line.style.left = `${x(stop.x) - area.left}px`;
  const curves = plot.curves.flatMap((curve) => curve.x.flatMap((at, i) => (at === stop.x ? [curve.y[i]] : [])));
  const heights = (curves.length > 0 ? curves : [stop.y]).map(y).filter((up) => up >= area.top && up <= area.top + area.height);
  return [line, ...[...new Set(heights)].map((up) => ring(x(stop.x), up))];
}
