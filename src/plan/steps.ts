import type { Path } from "./place";

/** One change to a JSON text. Paths are those of the text as the steps before have left it. */
export type Step =
  /** Another value in place of the one there, or a new key. */
  | { readonly kind: "set"; readonly path: Path; readonly value: unknown }
  /** A new item of a list, before the one at that index or at its end. */
  | { readonly kind: "insert"; readonly path: Path; readonly value: unknown }
  | { readonly kind: "remove"; readonly path: Path };

/** The steps from one JSON value to another, as few as leave in place what both have. Entries that are undefined count as absent. */
export function stepsBetween(before: unknown, after: unknown, path: Path = []): Step[] {
  if (same(before, after)) return [];
  if (Array.isArray(before) && Array.isArray(after)) return listSteps(before, after, path);
  if (isObject(before) && isObject(after)) return objectSteps(before, after, path);
  return [{ kind: "set", path, value: after }];
}

type Entries = Readonly<Record<string, unknown>>;

function objectSteps(before: Entries, after: Entries, path: Path): Step[] {
  const has = (entries: Entries, key: string) => Object.hasOwn(entries, key) && entries[key] !== undefined;
  const gone = Object.keys(before).filter((key) => has(before, key) && !has(after, key));
  const wanted = Object.keys(after).filter((key) => has(after, key));
  return [
    ...gone.map((key): Step => ({ kind: "remove", path: [...path, key] })),
    ...wanted.flatMap((key) =>
      has(before, key)
        ? stepsBetween(before[key], after[key], [...path, key])
        : [{ kind: "set", path: [...path, key], value: after[key] } as const],
    ),
  ];
}

/** Items that stay in their order keep their place in the text; an item that is moved is taken out and written anew. */
function listSteps(before: readonly unknown[], after: readonly unknown[], path: Path): Step[] {
  const kept = stays(before.map(nameOf), after.map(nameOf));
  const steps: Step[] = [];
  for (let i = before.length - 1; i >= 0; i--) {
    if (!kept.some(([from]) => from === i)) steps.push({ kind: "remove", path: [...path, i] });
  }
  after.forEach((item, i) => {
    const from = kept.find(([, to]) => to === i)?.[0];
    if (from === undefined) steps.push({ kind: "insert", path: [...path, i], value: item });
    else steps.push(...stepsBetween(before[from], item, [...path, i]));
  });
  return steps;
}

/** What an item of a list is known by: a covariate by its column, anything else by all of it. */
function nameOf(item: unknown): string {
  return isObject(item) && typeof item["column"] === "string" ? `column ${item["column"]}` : canonical(item);
}

/** Cells of a table of two lists' items that are worth comparing; longer lists are written anew where they differ. */
const CELLS = 1_000_000;

/** A longest row of names that stand in both lists in the same order, as pairs of indexes. */
function stays(a: readonly string[], b: readonly string[]): [number, number][] {
  const least = Math.min(a.length, b.length);
  let head = 0;
  while (head < least && a[head] === b[head]) head++;
  let tail = 0;
  while (tail < least - head && a[a.length - 1 - tail] === b[b.length - 1 - tail]) tail++;
  const middle = longest(a.slice(head, a.length - tail), b.slice(head, b.length - tail));
  return [
    ...Array.from({ length: head }, (_, i): [number, number] => [i, i]),
    ...middle.map(([i, j]): [number, number] => [i + head, j + head]),
    ...Array.from({ length: tail }, (_, i): [number, number] => [a.length - tail + i, b.length - tail + i]),
  ];
}

function longest(a: readonly string[], b: readonly string[]): [number, number][] {
  if (a.length * b.length > CELLS) return [];
  const best = Array.from({ length: a.length + 1 }, () => new Array<number>(b.length + 1).fill(0));
  for (let i = a.length - 1; i >= 0; i--) {
    for (let j = b.length - 1; j >= 0; j--) {
      best[i][j] = a[i] === b[j] ? best[i + 1][j + 1] + 1 : Math.max(best[i + 1][j], best[i][j + 1]);
    }
  }
  const pairs: [number, number][] = [];
  for (let i = 0, j = 0; i < a.length && j < b.length;) {
    if (a[i] === b[j]) pairs.push([i++, j++]);
    else if (best[i + 1][j] >= best[i][j + 1]) i++;
    else j++;
  }
  return pairs;
}

/** Whether two JSON values say the same, whatever the order of their keys. */
export function same(a: unknown, b: unknown): boolean {
  return canonical(a) === canonical(b);
}

function canonical(value: unknown): string {
  return JSON.stringify(value, (_key, item: unknown) =>
    isObject(item) ? Object.fromEntries(Object.entries(item).sort(([a], [b]) => (a < b ? -1 : 1))) : item,
  );
}

function isObject(value: unknown): value is Entries {
  return typeof value === "object" && value !== null && !Array.isArray(value);
}
