import ts from "typescript";
import { environmentReaders, longFilesAllowed, pureFolders, purePackages } from "./layers";
import { importsOf } from "./imports";
import { isTest, readSource, sourceFiles } from "./source-files";

const inside = (file: string, folders: string[]): boolean => folders.some((folder) => file.startsWith(folder));

/** Every node of a file, with its line. */
function nodes(root: string, file: string): { node: ts.Node; line: number; text: string }[] {
  const tree = ts.createSourceFile(file, readSource(root, file), ts.ScriptTarget.Latest, true);
  const found: { node: ts.Node; line: number; text: string }[] = [];
  const visit = (node: ts.Node): void => {
    if (ts.isPropertyAccessExpression(node) || ts.isElementAccessExpression(node) || ts.isNewExpression(node)) {
      const line = tree.getLineAndCharacterOfPosition(node.getStart(tree)).line + 1;
      found.push({ node, line, text: node.getText(tree).replaceAll(/\s/g, "") });
    }
    ts.forEachChild(node, visit);
  };
  visit(tree);
  return found;
}

/** Uses of `process.env` in TypeScript outside the settings. */
export function environmentBreaches(root: string): string[] {
  return sourceFiles(root)
    .filter((file) => /\.tsx?$/.test(file) && !inside(file, environmentReaders))
    .flatMap((file) =>
      nodes(root, file).flatMap(({ text, line }) =>
        text === "process.env" || text === 'process["env"]' ? [`${file}:${line}: reads process.env`] : [],
      ),
    );
}

const impure = [
  /^Date\.now$/,
  /^new Date(\(\))?$/,
  /^newDate(\(\))?$/,
  /^Math\.random$/,
  /^performance\.now$/,
  /^process\./,
  /^crypto\./,
  /^globalThis\./,
];

/** A clock, randomness, environment or I/O in the pure parts, and packages that they have no use for. */
export function purityBreaches(root: string): string[] {
  return sourceFiles(root)
    .filter((file) => inside(file, pureFolders))
    .flatMap((file) => [
      ...nodes(root, file).flatMap(({ text, line }) =>
        impure.some((each) => each.test(text)) ? [`${file}:${line}: uses ${text}`] : [],
      ),
      ...importsOf(root, file).flatMap(({ specifier, line, target }) =>
        target === undefined && !purePackages.includes(specifier) ? [`${file}:${line}: imports ${specifier}`] : [],
      ),
    ]);
}

export interface Length {
  file: string;
  lines: number;
}

/** Lines of each file that isn't data, shortest first. */
export function lengths(root: string): Length[] {
  return sourceFiles(root)
    .filter((file) => !longFilesAllowed.some((each) => each.test(file)))
    .map((file) => ({ file, lines: readSource(root, file).trimEnd().split("\n").length }))
    .sort((a, b) => a.lines - b.lines);
}

/** `any`, `!` and switched-off rules are lint's and types' matter; a default export is Next's and tools' alone. */
export function barrelFiles(root: string): string[] {
  return sourceFiles(root).filter((file) => /(^|\/)index\.(ts|tsx)$/.test(file) && !isTest(file));
}
