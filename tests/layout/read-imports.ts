import { existsSync, readdirSync, readFileSync, statSync } from 'node:fs';
import { dirname, join, normalize, relative } from 'node:path';
import ts from 'typescript';

export interface Import {
  /** File that imports, from the project's root. */
  from: string;
  /** What it names, as written. */
  specifier: string;
  /** The project file it means; null for a package. */
  to: string | null;
  /** Vanishes when types are stripped. */
  typeOnly: boolean;
}

export const root = process.cwd();

/** All files below some folders or files of the project whose name ends in one of `endings`. */
export function listFiles(places: string[], endings: string[]): string[] {
  return places.flatMap((place) => {
    const full = join(root, place);
    if (!existsSync(full)) return [];
    if (statSync(full).isDirectory()) {
      const inside = readdirSync(full).map((name) => join(place, name));
      return listFiles(inside, endings);
    }
    return endings.some((ending) => place.endsWith(ending)) ? [place] : [];
  });
}

/** Every import of a file: static, re-exporting and dynamic. */
export function readImports(from: string): Import[] {
  const text = readFileSync(join(root, from), 'utf8');
  const source = ts.createSourceFile(from, text, ts.ScriptTarget.Latest, true);
  const imports: Import[] = [];
  const add = (specifier: string, typeOnly: boolean) =>
    imports.push({ from, specifier, to: resolve(from, specifier), typeOnly });
  const visit = (node: ts.Node): void => {
    if (ts.isImportDeclaration(node) && ts.isStringLiteral(node.moduleSpecifier)) {
      add(node.moduleSpecifier.text, importsOnlyTypes(node.importClause));
    } else if (ts.isExportDeclaration(node) && node.moduleSpecifier !== undefined) {
      if (ts.isStringLiteral(node.moduleSpecifier)) {
        add(node.moduleSpecifier.text, node.isTypeOnly);
      }
    } else if (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword) {
      const [specifier] = node.arguments;
      if (specifier !== undefined && ts.isStringLiteralLike(specifier)) add(specifier.text, false);
    }
    ts.forEachChild(node, visit);
  };
  visit(source);
  return imports;
}

function importsOnlyTypes(clause: ts.ImportClause | undefined): boolean {
  if (clause === undefined) return false;
  if (clause.phaseModifier === ts.SyntaxKind.TypeKeyword) return true;
  const named = clause.namedBindings;
  if (clause.name !== undefined || named === undefined || !ts.isNamedImports(named)) return false;
  return named.elements.length > 0 && named.elements.every((element) => element.isTypeOnly);
}

function resolve(from: string, specifier: string): string | null {
  let base: string;
  if (specifier.startsWith('@/')) base = specifier.slice(2);
  else if (specifier.startsWith('.')) base = normalize(join(dirname(from), specifier));
  else return null;
  const tries = ['', '.ts', '.tsx', '.mjs', '/index.ts', '/index.tsx'].map((end) => base + end);
  const found = tries.find((path) => {
    const full = join(root, path);
    return existsSync(full) && statSync(full).isFile();
  });
  return relative(root, join(root, found ?? base));
}
