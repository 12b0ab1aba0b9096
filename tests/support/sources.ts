import { readdirSync, readFileSync, statSync } from "node:fs";
import path from "node:path";
import ts from "typescript";

export const root = path.resolve(import.meta.dirname, "../..");

/** Files under the given folders (relative to the root) whose name passes the filter, as relative POSIX paths. */
export function filesUnder(folders: readonly string[], accept: (file: string) => boolean): string[] {
  const found: string[] = [];
  const visit = (relative: string) => {
    const full = path.join(root, relative);
    if (!statSync(full, { throwIfNoEntry: false })) return;
    if (statSync(full).isDirectory()) {
      for (const name of readdirSync(full).sort()) visit(path.posix.join(relative, name));
    } else if (accept(relative)) found.push(relative);
  };
  for (const folder of folders) visit(folder);
  return found;
}

export const isSource = (file: string): boolean => /\.(ts|tsx)$/.test(file) && !file.endsWith(".d.ts");
export const isTest = (file: string): boolean => /\.test\.(ts|tsx)$/.test(file);

export function textOf(file: string): string {
  return readFileSync(path.join(root, file), "utf8");
}

export function parse(file: string): ts.SourceFile {
  return ts.createSourceFile(file, textOf(file), ts.ScriptTarget.Latest, true);
}

/** Every module a file names: static imports, re-exports, dynamic imports and import types. */
export function importsOf(file: string): string[] {
  const names: string[] = [];
  const visit = (node: ts.Node) => {
    if ((ts.isImportDeclaration(node) || ts.isExportDeclaration(node)) && node.moduleSpecifier) {
      if (ts.isStringLiteral(node.moduleSpecifier)) names.push(node.moduleSpecifier.text);
    } else if (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword) {
      const argument = node.arguments[0];
      if (argument !== undefined && ts.isStringLiteral(argument)) names.push(argument.text);
    } else if (ts.isImportTypeNode(node) && ts.isLiteralTypeNode(node.argument)) {
      if (ts.isStringLiteral(node.argument.literal)) names.push(node.argument.literal.text);
    }
    ts.forEachChild(node, visit);
  };
  visit(parse(file));
  return names;
}
