import type { Finding } from "../engine/findings";

/**
 * Column names as they are used: an empty one is `column 7`, a repeated one `dose (5)`, by its 1-based position; each change a finding. A repaired
 * name that another header already has gets `(again)`, so that no given header is ever renamed for its sake and no two columns share a name.
 * @param header trimmed
 */
export function nameColumns(header: readonly string[]): { readonly names: string[]; readonly findings: Finding[] } {
  const findings: Finding[] = [];
  const given = new Set(header);
  const taken = new Set<string>();
  const names = header.map((original, i) => {
    if (original !== "" && !taken.has(original)) {
      taken.add(original);
      return original;
    }
    const base = original === "" ? `column ${i + 1}` : `${original} (${i + 1})`;
    let name = base;
    while (taken.has(name) || given.has(name)) name += " (again)";
    taken.add(name);
    findings.push(
      original === "" ? { code: "empty-header", column: name } : { code: "duplicate-header", column: name, original },
    );
    return name;
  });
  return { names, findings };
}
