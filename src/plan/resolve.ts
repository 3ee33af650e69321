import type { Problem } from "../engine/findings";

export type Resolved = { readonly ok: true; readonly path: string } | { readonly ok: false; readonly problem: Problem };

/**
 * The file a plan's `data` names: relative to the plan's folder, and inside one of the `roots` (absolute folders; the plan's own folder is
 * one only if given). A plan that came with somebody else's files must not read elsewhere. Names alone are looked at: a caller that follows
 * symbolic links has to compare where they lead.
 * @param planFile absolute path of the plan, with / or \ between its parts
 */
export function resolveData(planFile: string, data: string, roots: readonly string[]): Resolved {
  const file = planFile.split(/[\\/]/).pop()!;
  const refused: Resolved = { ok: false, problem: { code: "outside-folder", path: data, file } };
  const windows = /^[a-z]:[\\/]|^\\\\/i.test(planFile);
  const separators = windows ? /[\\/]/ : /\//;
  if (data === "" || /^[\\/]/.test(data) || /^[a-z]:/i.test(data)) return refused;
  const parts = planFile.split(separators).slice(0, -1);
  const top = /^\\\\/.test(planFile) ? 4 : 1; // \\server\share, a drive, or the empty part before the first /
  for (const part of data.split(separators)) {
    if (part === "..") {
      if (parts.length <= top) return refused;
      parts.pop();
    } else if (part !== "" && part !== ".") parts.push(part);
  }
  const same = (a: string, b: string) => (windows ? a.toLowerCase() === b.toLowerCase() : a === b);
  const inside = roots.some((root) => {
    const above = root.split(separators);
    while (above.length > top && above[above.length - 1] === "") above.pop();
    return above.length < parts.length && above.every((part, i) => same(part, parts[i]));
  });
  return inside ? { ok: true, path: parts.join(windows ? "\\" : "/") } : refused;
}
