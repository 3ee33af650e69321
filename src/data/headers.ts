import type { Finding } from "../engine/findings";

/** Column names as they are used: trimmed, an empty one `column 7`, a repeated one `dose (5)`, each change a finding. */
export function nameColumns(header: readonly string[]): { readonly names: string[]; readonly findings: Finding[] } {
  const findings: Finding[] = [];
  const trimmed = header.map((cell) => cell.trim());
  const given = new Set(trimmed);
  const taken = new Set<string>();
  const names = trimmed.map((original, i) => {
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
