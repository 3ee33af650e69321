/** Models put together by the columns they begin with. */
export interface Branch {
  readonly column: number;
  readonly children: Branch[];
  /** The model whose path ends here; -1 for none. */
  model: number;
}

/**
 * The tree of the models' paths. Columns that more models hold come first, then the lower ones, so that what all share is done once.
 * Models of equal paths share an end: `end[i]` is the number of distinct models before, i.e. the model of path i.
 * @param paths of each model, its columns in any order
 */
export function growTree(paths: readonly (readonly number[])[]): { roots: Branch[]; end: number[]; models: number } {
  const held = new Map<number, number>();
  for (const path of paths) for (const column of path) held.set(column, (held.get(column) ?? 0) + 1);
  const order = (a: number, b: number) => held.get(b)! - held.get(a)! || a - b;
  // only what every model holds moves up: among the rest one fixed order keeps the tree small
  const everywhere = (column: number) => held.get(column) === paths.length;
  const compare = (a: number, b: number) => (everywhere(a) || everywhere(b) ? order(a, b) : a - b);
  const top: Branch = { column: -1, children: [], model: -1 };
  let models = 0;
  const end = paths.map((path) => {
    let at = top;
    for (const column of [...path].sort(compare)) {
      let next = at.children.find((child) => child.column === column);
      if (!next) at.children.push((next = { column, children: [], model: -1 }));
      at = next;
    }
    if (at.model < 0) at.model = models++;
    return at.model;
  });
  return { roots: top.children, end, models };
}
