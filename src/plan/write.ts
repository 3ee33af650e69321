import { rankOf } from "./order";

/** How a text is laid out: its line end, one step of indentation, and the indentation of the line a value begins on. */
export interface Layout {
  readonly end: string;
  readonly step: string;
  readonly indent: string;
}

/** Characters of a line that a list or an object may fill before it is broken. */
const WIDTH = 120;

/**
 * A value as JSON in the house's layout: what fits is written on one line (`{ "column": "age" }`), a list of objects and the whole plan
 * one entry a line. Keys in the order of `order.ts`; undefined entries are left out.
 * @param depth how far inside the plan the value stands; 0 is the plan itself
 * @param before characters that stand before the value on its line, apart from the indentation
 */
export function writeValue(value: unknown, layout: Layout, depth: number, before = 0): string {
  if (typeof value !== "object" || value === null) return JSON.stringify(value);
  const inner: Layout = { ...layout, indent: layout.indent + layout.step };
  const [open, close] = Array.isArray(value) ? "[]" : "{}";
  const entries = Array.isArray(value)
    ? value.map((item) => ({ key: "", item: item as unknown }))
    : entriesOf(value, depth).map(([name, item]) => ({ key: `${JSON.stringify(name)}: `, item }));
  if (entries.length === 0) return open + close;
  const objects = Array.isArray(value) && value.some((item) => typeof item === "object" && !Array.isArray(item));
  if (depth > 0 && !objects) {
    const pad = open === "{" ? " " : "";
    const line = open + pad + entries.map(({ key, item }) => key + writeInline(item)).join(", ") + pad + close;
    if (layout.indent.length + before + line.length < WIDTH) return line;
  }
  const lines = entries.map(({ key, item }) => inner.indent + key + writeValue(item, inner, depth + 1, key.length));
  return [open, lines.join("," + layout.end), layout.indent + close].join(layout.end);
}

function writeInline(value: unknown): string {
  if (typeof value !== "object" || value === null) return JSON.stringify(value);
  if (Array.isArray(value)) return `[${value.map(writeInline).join(", ")}]`;
  const entries = entriesOf(value, 1);
  return entries.length === 0 ? "{}" : `{ ${entries.map(([k, v]) => `${JSON.stringify(k)}: ${writeInline(v)}`).join(", ")} }`;
}

function entriesOf(value: object, depth: number): [string, unknown][] {
  return Object.entries(value)
    .filter(([, item]) => item !== undefined)
    .sort(([a], [b]) => rankOf(a, depth) - rankOf(b, depth));
}
