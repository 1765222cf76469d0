/**
 * Reads out of the engine's sources which findings and which steps of working they can raise, so that a text can't
 * be forgotten for one that no test happens to reach.
 */
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import ts from 'typescript';

const root = fileURLToPath(new URL('../..', import.meta.url));

function sources(folders: readonly string[]): ts.SourceFile[] {
  return folders.flatMap((folder) =>
    readdirSync(join(root, folder), { recursive: true, encoding: 'utf8' })
      .filter((name) => name.endsWith('.ts'))
      .map((name) => join(root, folder, name))
      .map((path) => ts.createSourceFile(path, readFileSync(path, 'utf8'), ts.ScriptTarget.Latest, true)),
  );
}

const propertyOf = (object: ts.ObjectLiteralExpression, name: string) =>
  object.properties.find((one) => one.name && ts.isIdentifier(one.name) && one.name.text === name);

/** Every string that an expression can be: literals, and both ends of a condition. */
function literals(node: ts.Expression | undefined): string[] {
  if (!node) return [];
  if (ts.isStringLiteralLike(node)) return [node.text];
  if (ts.isConditionalExpression(node)) return [...literals(node.whenTrue), ...literals(node.whenFalse)];
  return ts.isParenthesizedExpression(node) ? literals(node.expression) : [];
}

/** The name of the nearest function or constant around a node. */
function nameAround(node: ts.Node): string | undefined {
  for (let at: ts.Node = node; at.parent; at = at.parent) {
    if (ts.isFunctionDeclaration(at) && at.name) return at.name.text;
    if (ts.isVariableDeclaration(at) && ts.isIdentifier(at.name)) return at.name.text;
  }
  return undefined;
}

export interface Codes {
  codes: string[];
  /** Places where a code is made of something that can't be read here. */
  unread: string[];
}

/**
 * @param key the property that holds the code, `marker` one that only such objects have beside it
 * @param makers functions elsewhere that take the code as their first argument
 */
export function engineCodes(
  folders: readonly string[],
  { key, marker, makers: known = [] }: { key: string; marker: string; makers?: readonly string[] },
): Codes {
  const codes = new Set<string>();
  const unread: string[] = [];
  for (const file of sources(folders)) {
    const makers = new Set(known);
    const calls: ts.CallExpression[] = [];
    const place = (node: ts.Node) =>
      `${file.fileName.slice(root.length)}:${file.getLineAndCharacterOfPosition(node.getStart()).line + 1}`;
    const add = (node: ts.Node, found: string[]) => {
      if (found.length === 0) unread.push(place(node));
      for (const code of found) codes.add(code);
    };
    const visit = (node: ts.Node): void => {
      if (ts.isCallExpression(node)) calls.push(node);
      if (ts.isObjectLiteralExpression(node) && propertyOf(node, marker)) {
        const property = propertyOf(node, key);
        if (property && ts.isShorthandPropertyAssignment(property)) makers.add(nameAround(node) ?? '');
        else if (property && ts.isPropertyAssignment(property)) add(node, literals(property.initializer));
      }
      ts.forEachChild(node, visit);
    };
    visit(file);
    for (const call of calls)
      if (ts.isIdentifier(call.expression) && makers.has(call.expression.text))
        add(call, literals(call.arguments[0]));
  }
  return { codes: [...codes].sort(), unread };
}
