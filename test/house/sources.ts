import { readdirSync, readFileSync } from "node:fs";
import { join, relative } from "node:path";

export const root = new URL("../..", import.meta.url).pathname;

/** Files under folders of the tree, as paths from its root with forward slashes. */
export function filesIn(folders: readonly string[], ending: RegExp): string[] {
  const found: string[] = [];
  const walk = (folder: string) => {
    for (const entry of readdirSync(folder, { withFileTypes: true })) {
      const path = join(folder, entry.name);
      if (entry.isDirectory()) walk(path);
      else if (ending.test(entry.name)) found.push(relative(root, path).replaceAll("\\", "/"));
    }
  };
  for (const folder of folders) walk(join(root, folder));
  return found.sort();
}

export function textOf(file: string): string {
  return readFileSync(join(root, file), "utf8");
}
