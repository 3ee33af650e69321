/** Small tools to build the page. Text is only ever set as text. */
type Attributes = Readonly<Record<string, string | number | boolean | null | undefined>>;
type Child = Node | string | null | false;

const SVG = "http://www.w3.org/2000/svg";

/** An HTML element; attributes that are null or false are left out, `true` stands without a value. */
export function el<K extends keyof HTMLElementTagNameMap>(
  tag: K,
  attributes: Attributes = {},
  ...children: readonly Child[]
): HTMLElementTagNameMap[K] {
  const element = document.createElement(tag);
  put(element, attributes);
  for (const child of children) if (child !== null && child !== false) element.append(child);
  return element;
}

/** An SVG element. */
export function svg<K extends keyof SVGElementTagNameMap>(
  tag: K,
  attributes: Attributes = {},
  ...children: readonly Child[]
): SVGElementTagNameMap[K] {
  const element = document.createElementNS(SVG, tag);
  put(element, attributes);
  for (const child of children) if (child !== null && child !== false) element.append(child);
  return element;
}

/** A button; `focus` names it across redraws, so that the keyboard stays where it was. */
export function button(text: string, focus: string, act: () => void, attributes: Attributes = {}): HTMLButtonElement {
  const element = el("button", { type: "button", "data-focus": focus, ...attributes }, text);
  element.addEventListener("click", act);
  return element;
}

function put(element: Element, attributes: Attributes): void {
  for (const [name, value] of Object.entries(attributes)) {
    if (value !== null && value !== undefined && value !== false) element.setAttribute(name, value === true ? "" : String(value));
  }
}
