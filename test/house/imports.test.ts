import { dirname, posix } from "node:path";
import ts from "typescript";
import { describe, expect, test } from "vitest";
import { filesIn, textOf } from "./sources";

interface Import {
  readonly from: string;
  readonly target: string;
  readonly typeOnly: boolean;
}

interface Rule {
  /** Parts of the house whose values may be imported. */
  readonly values: readonly string[];
  /** Parts of which only types may be imported. */
  readonly types: readonly string[];
  readonly packages: RegExp;
}

const NOTHING = /^$/;
const everything = ["engine", "data", "plan", "report"];

/** DESIGN, "Who may import whom". Every part may import itself. */
const RULES: Readonly<Record<string, Rule>> = {
  engine: { values: [], types: [], packages: /^(@stdlib\/|ml-matrix$|jstat$)/ },
  // levels are kept in the engine's natural order
  data: { values: ["engine/question/natural"], types: ["engine"], packages: /^(papaparse|node:crypto)$/ },
  // a plan is checked against a table by the engine's own rules
  plan: { values: ["engine/question"], types: ["engine"], packages: /^jsonc-parser$/ },
  report: { values: [], types: ["engine", "plan"], packages: NOTHING },
  protocol: { values: [], types: ["engine", "plan", "report"], packages: NOTHING },
  // a thread over memory that the engine's passes share: Node's alone
  threads: { values: ["engine/passes", "engine/cancelled"], types: [], packages: /^node:worker_threads$/ },
  host: { values: [...everything, "protocol", "threads"], types: [], packages: /^(vscode$|node:)/ },
  extension: { values: [...everything, "protocol", "threads", "host"], types: [], packages: /^(vscode$|node:)/ },
  // a notebook's cells are found in its JSON by position
  cli: { values: [...everything, "threads"], types: [], packages: /^(node:|jsonc-parser$)/ },
  webview: { values: ["protocol", "report"], types: ["engine"], packages: /^chart\.js(\/|$)/ },
};

/** The page may use the report's pure formatting, not what writes a comparison out. */
const NOT_FOR_THE_PAGE = /^report\/(present|markdown|json|csv|text|table|writeup)(\/|$)/;

function partOf(file: string): string {
  const inSource = /^src\/([^/.]+)/.exec(file);
  return inSource ? inSource[1] : file.split("/")[0];
}

function importsOf(file: string): Import[] {
  const source = ts.createSourceFile(file, textOf(file), ts.ScriptTarget.ES2022, true);
  const found: Import[] = [];
  const add = (specifier: ts.Expression | undefined, typeOnly: boolean) => {
    if (specifier && ts.isStringLiteralLike(specifier))
      found.push({ from: file, target: resolve(file, specifier.text), typeOnly });
  };
  const visit = (node: ts.Node): void => {
    if (ts.isImportDeclaration(node)) add(node.moduleSpecifier, isTypeOnly(node.importClause));
    else if (ts.isExportDeclaration(node)) add(node.moduleSpecifier, node.isTypeOnly);
    else if (
      ts.isCallExpression(node) &&
      (node.expression.kind === ts.SyntaxKind.ImportKeyword || node.expression.getText() === "require")
    ) {
      add(node.arguments[0], false);
    } else if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument))
      add(node.argument.literal as ts.Expression, true);
    ts.forEachChild(node, visit);
  };
  visit(source);
  return found;
}

function isTypeOnly(clause: ts.ImportClause | undefined): boolean {
  if (!clause) return false;
  const named = clause.namedBindings;
  return (
    clause.isTypeOnly || (!clause.name && !!named && ts.isNamedImports(named) && named.elements.every((item) => item.isTypeOnly))
  );
}

/** A relative import as a path from the root without "src/"; a package as it is. */
function resolve(file: string, specifier: string): string {
  return specifier.startsWith(".") ? "/" + posix.join(dirname(file), specifier).replace(/^src\//, "") : specifier;
}

function allowed({ from, target, typeOnly }: Import): boolean {
  const part = partOf(from);
  const rule = RULES[part];
  if (!rule) return false;
  if (!target.startsWith("/")) return rule.packages.test(target);
  const path = target.slice(1);
  if (path === part || path.startsWith(part + "/")) return true;
  const within = (allowance: string) => path === allowance || path.startsWith(allowance + "/");
  if (part === "webview" && !typeOnly && NOT_FOR_THE_PAGE.test(path)) return false;
  return rule.values.some(within) || (typeOnly && rule.types.some(within));
}

describe("who may import whom", () => {
  const files = filesIn(["src", "webview"], /\.ts$/);

  test("every file belongs to a part that has a rule", () => {
    expect(files.filter((file) => !RULES[partOf(file)])).toEqual([]);
    expect(files.length).toBeGreaterThan(20);
  });

  test("every import is one that DESIGN's table allows", () => {
    const broken = files.flatMap(importsOf).filter((item) => !allowed(item));
    expect(broken.map(({ from, target, typeOnly }) => `${from} imports ${typeOnly ? "types of " : ""}${target}`)).toEqual([]);
  });

  test("the rule refuses what it is there to refuse", () => {
    const value = (from: string, target: string) => allowed({ from, target, typeOnly: false });
    expect(value("src/engine/compare.ts", "vscode")).toBe(false);
    expect(value("src/engine/compare.ts", "node:fs")).toBe(false);
    expect(value("src/engine/compare.ts", "/report/present")).toBe(false);
    expect(value("webview/main.ts", "/engine/compare")).toBe(false);
    expect(value("webview/main.ts", "/report/present")).toBe(false);
    expect(value("src/cli.ts", "/host/panel")).toBe(false);
    expect(value("src/report/present.ts", "/engine/compare")).toBe(false);
    expect(allowed({ from: "src/report/present.ts", target: "/engine/comparison", typeOnly: true })).toBe(true);
  });

  test("only the worker's folder of the host reaches the statistics and the reading of files", () => {
    const reaching = files
      .filter((file) => file.startsWith("src/host/") && !file.startsWith("src/host/worker/"))
      .flatMap(importsOf)
      .filter(({ target, typeOnly }) => !typeOnly && /^\/(engine|data)\//.test(target));
    expect(reaching.map(({ from, target }) => `${from} imports ${target}`)).toEqual([]);
  });
});
