/** The theme's colours as a canvas needs them: plain values, read anew whenever the theme changes. */
export interface Palette {
  readonly ink: string;
  readonly soft: string;
  readonly ground: string;
  /** Of groups in their order, again from the start after the last; the ink alone where the theme is one of high contrast. */
  readonly groups: readonly string[];
  readonly difference: string;
  readonly font: string;
  /** Size of small text, in px. */
  readonly size: number;
}

/** The reference is drawn in ink, as in a saved picture. */
const OTHERS = ["orange", "green", "purple", "red", "yellow"];
/** Small text, as a share of the page's. */
const SMALL = 0.9;

export function paletteOf(): Palette {
  const style = getComputedStyle(document.body);
  const variable = (names: readonly string[], otherwise: string) =>
    names.map((name) => style.getPropertyValue(`--vscode-${name}`).trim()).find((value) => value !== "") ?? otherwise;
  const forced = matchMedia("(forced-colors: active)").matches;
  const ink = plain(forced ? "CanvasText" : style.color);
  const alike = forced || document.body.classList.contains("vscode-high-contrast");
  const chart = (name: string) => (alike ? ink : plain(variable([`charts-${name}`], ink)));
  return {
    ink,
    soft: forced ? ink : plain(variable(["descriptionForeground"], ink)),
    ground: plain(forced ? "Canvas" : style.backgroundColor),
    groups: alike ? [ink] : [ink, ...OTHERS.map(chart)],
    difference: chart("blue"),
    font: style.fontFamily,
    size: SMALL * parseFloat(style.fontSize),
  };
}

/** A colour with so much of it left, in [0, 1]. */
export function faded(colour: string, share: number): string {
  const hex = Math.round(share * 255).toString(16);
  return /^#[0-9a-f]{6}$/.test(colour) ? `${colour}${hex.padStart(2, "0")}` : colour;
}

/** Calls back when the theme or the reader's own colours change, until it is told to stop. */
export function onTheme(call: () => void): () => void {
  const watch = new MutationObserver(call);
  watch.observe(document.body, { attributes: true, attributeFilter: ["class", "data-vscode-theme-id"] });
  const forced = matchMedia("(forced-colors: active)");
  forced.addEventListener("change", call);
  return () => {
    watch.disconnect();
    forced.removeEventListener("change", call);
  };
}

const pen = document.createElement("canvas").getContext("2d");

/** Any CSS colour as the canvas writes it, "#rrggbb" where it is opaque. */
function plain(colour: string): string {
  if (!pen) return colour;
  pen.fillStyle = "#000000";
  pen.fillStyle = colour;
  return pen.fillStyle;
}

/** Width of a small text, in px. */
export function widthOf(text: string, { font, size }: Palette): number {
  if (!pen) return text.length * size * 0.6;
  pen.font = `${size}px ${font}`;
  return pen.measureText(text).width;
}
