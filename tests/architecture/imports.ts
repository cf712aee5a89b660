import { existsSync, statSync } from "node:fs";
import path from "node:path";
import ts from "typescript";
import { readSource } from "./source-files";

export interface Import {
  /** As written. */
  specifier: string;
  line: number;
  /** The file of ours that it means, by its path from the root; undefined for a package or a Node module. */
  target: string | undefined;
}

/** Every import of a file: static, of types, re-exported, dynamic, by `require` and by `import("…")` in a type. */
export function importsOf(root: string, file: string): Import[] {
  const text = readSource(root, file);
  const tree = ts.createSourceFile(file, text, ts.ScriptTarget.Latest, true);
  const found: Import[] = [];
  const add = (node: ts.Node | undefined): void => {
    if (!node || !ts.isStringLiteralLike(node)) return;
    const line = tree.getLineAndCharacterOfPosition(node.getStart(tree)).line + 1;
    found.push({ specifier: node.text, line, target: resolveOurs(root, file, node.text) });
  };
  const visit = (node: ts.Node): void => {
    if (ts.isImportDeclaration(node) || ts.isExportDeclaration(node)) add(node.moduleSpecifier);
    else if (ts.isExternalModuleReference(node)) add(node.expression);
    else if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument)) add(node.argument.literal);
    else if (ts.isCallExpression(node) && isImportCall(node)) add(node.arguments[0]);
    ts.forEachChild(node, visit);
  };
  visit(tree);
  return found;
}

function isImportCall(node: ts.CallExpression): boolean {
  if (node.expression.kind === ts.SyntaxKind.ImportKeyword) return true;
  return ts.isIdentifier(node.expression) && node.expression.text === "require";
}

const endings = ["", ".ts", ".tsx", ".mjs", ".js", ".css", "/index.ts", "/index.tsx"];

function resolveOurs(root: string, from: string, specifier: string): string | undefined {
  const name = specifier.startsWith("@/")
    ? specifier.slice(2)
    : specifier.startsWith(".")
      ? path.posix.join(path.posix.dirname(from), specifier)
      : undefined;
  if (name === undefined) return undefined;
  const ending = endings.find((each) => {
    const candidate = path.join(root, name + each);
    return existsSync(candidate) && statSync(candidate).isFile();
  });
  return ending === undefined ? name : name + ending;
}
