import type { Node } from "jsonc-parser";
import type { Problem } from "../engine/findings";
import { nearestName } from "./nearest";

/** Where the problems of a reading go: what is wrong, and the node it is wrong at. */
export type Report = (problem: Problem, at: Node) => void;

/** What a value of a plan may be. */
export interface Shape {
  /** In words, to follow "must be", one item an alternative: "a number above 0", "null". */
  readonly expected: readonly string[];
  /** The one key of an object that is told apart by it. */
  readonly key?: string;
  /** Whether the value is of this kind at all, whatever is wrong inside it; tells alternatives apart. */
  fits(node: Node): boolean;
  /** The value, with every problem in it reported; undefined where it cannot be used. `key` names it: "covariates[1].form". */
  read(node: Node, key: string, report: Report): unknown;
}

const shape = (expected: readonly string[], fits: (node: Node) => boolean): Shape => ({
  expected,
  fits,
  read: (node, key, report) => (fits(node) ? node.value : refuse(node, key, expected, report)),
});

export const words = (expected: string): Shape =>
  shape([`${expected} in quotes`], ({ type, value }) => type === "string" && (value as string).trim() !== "");

export const choice = (...values: readonly string[]): Shape =>
  shape(
    values.map((value) => JSON.stringify(value)),
    ({ type, value }) => type === "string" && values.includes(value as string),
  );

export const number = (expected: string, holds: (value: number) => boolean): Shape =>
  shape([expected], ({ type, value }) => type === "number" && Number.isFinite(value) && holds(value as number));

export const nothing: Shape = shape(["null"], ({ type }) => type === "null");

export const list = (item: Shape, expected: string, atLeast = 0): Shape => ({
  expected: [expected],
  fits: ({ type }) => type === "array",
  read(node, key, report) {
    const items = node.children ?? [];
    if (node.type !== "array" || items.length < atLeast) return refuse(node, key, [expected], report);
    return items.map((child, i) => item.read(child, `${key}[${i}]`, report));
  },
});

/** One of several shapes, told apart by `fits`. */
export const oneOf = (...shapes: readonly Shape[]): Shape => {
  const expected = shapes.flatMap((each) => each.expected);
  const fitting = (node: Node) => shapes.find((each) => each.fits(node));
  return {
    expected,
    fits: (node) => fitting(node) !== undefined,
    read: (node, key, report) => {
      const found = fitting(node);
      if (found) return found.read(node, key, report);
      const at = node.type === "object" ? node.children?.[0]?.children?.[0] : undefined;
      const keys = shapes.flatMap((each) => each.key ?? []);
      if (!at || keys.length === 0) return refuse(node, key, expected, report);
      report({ code: "unknown-key", key: String(at.value), nearest: nearestName(String(at.value), keys) }, at);
      return undefined;
    },
  };
};

/** Named values; a key that is not among `keys` is a problem with the nearest of them. */
export const object = (expected: string, keys: Readonly<Record<string, Shape>>, required: readonly string[] = []): Shape => ({
  expected: [expected],
  fits: ({ type }) => type === "object",
  read(node, key, report) {
    if (node.type !== "object") return refuse(node, key, [expected], report);
    const known = Object.keys(keys);
    const entries: [string, unknown][] = [];
    // a misspelt key is not also told as a missing one
    const seen = new Set<string | null>();
    for (const [name, at, value] of members(node, key, report)) {
      const isKnown = known.includes(name);
      const nearest = isKnown ? name : nearestName(name, known);
      seen.add(nearest);
      if (isKnown) entries.push([name, keys[name].read(value, join(key, name), report)]);
      else report({ code: "unknown-key", key: name, nearest }, at);
    }
    for (const name of required) if (!seen.has(name)) report({ code: "missing-key", key: join(key, name) }, node);
    return Object.fromEntries(entries.filter(([, value]) => value !== undefined));
  },
});

/** An object known by its one key, so that `oneOf` can tell several apart. */
export const keyed = (name: string, value: Shape, expected: string): Shape => ({
  ...object(expected, { [name]: value }, [name]),
  key: name,
  fits: (node) => namesIn(node).includes(name),
});

/** The keys of an object node; none for any other. */
export const namesIn = (node: Node): string[] =>
  node.type === "object" ? (node.children ?? []).map(({ children }) => String(children?.[0].value)) : [];

/** Values under names that are free (names of columns). */
export const byColumn = (item: Shape, expected: string): Shape => ({
  expected: [expected],
  fits: ({ type }) => type === "object",
  read(node, key, report) {
    if (node.type !== "object") return refuse(node, key, [expected], report);
    return Object.fromEntries(
      members(node, key, report).map(([name, , value]) => [name, item.read(value, join(key, name), report)]),
    );
  },
});

/** Each key with its node and its value's; a key stated twice is a problem, since only one of the two could count. */
function members(node: Node, key: string, report: Report): [string, Node, Node][] {
  const found = new Map<string, [string, Node, Node]>();
  for (const { children } of node.children ?? []) {
    if (children?.length !== 2) continue;
    const [at, value] = children;
    const name = String(at.value);
    if (found.has(name))
      report({ code: "bad-value", key: join(key, name), expected: "stated once", found: "stated again here" }, at);
    else found.set(name, [name, at, value]);
  }
  return [...found.values()];
}

export function refuse(node: Node, key: string, expected: readonly string[], report: Report): undefined {
  report({ code: "bad-value", key, expected: either(expected), found: shown(node) }, node);
  return undefined;
}

const FOUND_LENGTH = 40;

/** A value as it may be quoted in a sentence: short, on one line. */
function shown(node: Node): string {
  if (node.type === "array") return node.children?.length ? "a list" : "an empty list";
  if (node.type === "object") return "an object in braces";
  if (node.type === "number" && !Number.isFinite(node.value)) return "a number beyond double range";
  const text = JSON.stringify(node.value);
  return text.length > FOUND_LENGTH ? text.slice(0, FOUND_LENGTH - 1) + "…" : text;
}

const join = (key: string, name: string): string => (key === "" ? name : `${key}.${name}`);

const either = (items: readonly string[]): string =>
  items.length < 2 ? items.join("") : `${items.slice(0, -1).join(", ")} or ${items[items.length - 1]}`;
