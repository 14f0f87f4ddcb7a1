import { existsSync, statSync } from 'node:fs';
import path from 'node:path';
import ts from 'typescript';
import { read, ROOT } from './source-files';

/** What a file imports: values, which are loaded when it is; and types, which are gone when it runs. */
export type Imports = { readonly values: readonly string[]; readonly types: readonly string[] };

export type ImportGraph = ReadonlyMap<string, Imports>;

/** Endings that an import may leave out, in the order in which they are tried. */
const ENDINGS = ['', '.ts', '.tsx', '.mts', '.mjs', '/index.ts', '/index.tsx'];

/** The project's file that an import names; null for a package. @throws when it names a file that is not there. */
export function resolveImport(from: string, specifier: string): string | null {
  const base = specifier.startsWith('@/')
    ? specifier.slice(2)
    : specifier.startsWith('.')
      ? path.posix.join(path.posix.dirname(from), specifier)
      : null;
  if (base === null) return null;
  const found = ENDINGS.map((ending) => `${base}${ending}`).find((file) => {
    const place = path.join(ROOT, file);
    return existsSync(place) && statSync(place).isFile();
  });
  if (found === undefined) throw new Error(`${from} imports ${specifier}, which is not there`);
  return found;
}

function isTypeOnly(statement: ts.ImportDeclaration | ts.ExportDeclaration): boolean {
  if (ts.isExportDeclaration(statement)) return statement.isTypeOnly;
  const clause = statement.importClause;
  // `import './styles.css'` is for its effect. `import { type A }` is kept as an import with nothing in it by
  // `verbatimModuleSyntax`, and so loads the file; it counts as a value.
  return clause !== undefined && clause.phaseModifier === ts.SyntaxKind.TypeKeyword;
}

/** What one file imports, exports on, and loads later by `import()`, in the order of its text. */
export function importsOf(file: string, text: string): readonly { readonly specifier: string; readonly type: boolean }[] {
  const source = ts.createSourceFile(file, text, ts.ScriptTarget.Latest, true);
  const found: { specifier: string; type: boolean }[] = [];
  const visit = (node: ts.Node): void => {
    if ((ts.isImportDeclaration(node) || ts.isExportDeclaration(node)) && node.moduleSpecifier) {
      if (ts.isStringLiteral(node.moduleSpecifier)) {
        found.push({ specifier: node.moduleSpecifier.text, type: isTypeOnly(node) });
      }
    } else if (ts.isCallExpression(node) && node.expression.kind === ts.SyntaxKind.ImportKeyword) {
      const [argument] = node.arguments;
      if (argument && ts.isStringLiteral(argument)) found.push({ specifier: argument.text, type: false });
    }
    ts.forEachChild(node, visit);
  };
  visit(source);
  return found;
}

export function buildGraph(files: readonly string[]): ImportGraph {
  return new Map(
    files.map((file) => {
      const values = new Set<string>();
      const types = new Set<string>();
      for (const { specifier, type } of importsOf(file, read(file))) {
        const target = resolveImport(file, specifier);
        if (target !== null && target !== file) (type ? types : values).add(target);
      }
      return [file, { values: [...values], types: [...types] }];
    }),
  );
}

/**
 * The groups of nodes that can each be reached from one another: none in a graph without cycles (Tarjan 1972,
 * doi 10.1137/0201010).
 */
export function cycles(edges: ReadonlyMap<string, readonly string[]>): readonly (readonly string[])[] {
  const order = new Map<string, number>();
  const low = new Map<string, number>();
  const stack: string[] = [];
  const found: string[][] = [];
  const visit = (node: string): void => {
    const number = order.size;
    order.set(node, number);
    low.set(node, number);
    stack.push(node);
    for (const next of edges.get(node) ?? []) {
      if (!order.has(next)) visit(next);
      if (stack.includes(next)) low.set(node, Math.min(low.get(node) ?? 0, low.get(next) ?? 0));
    }
    if (low.get(node) !== number) return;
    const group = stack.splice(stack.indexOf(node));
    if (group.length > 1 || (edges.get(node) ?? []).includes(node)) found.push(group.sort());
  };
  for (const node of edges.keys()) if (!order.has(node)) visit(node);
  return found;
}
