/**
 * JSON schemas from the SDK's own declarations, by the TypeScript compiler: which properties an object must have and
 * what each may be, down to DEPTH levels. Unions of literals are left as their primitive type, because the SDK
 * opens every one of them with `OtherString`.
 */
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import ts from 'typescript';

export type Schema = Record<string, unknown>;

const DEPTH = 2;
const ANYTHING: Schema = {};

const typings = join(dirname(createRequire(import.meta.url).resolve('stripe')), '../esm/resources');

const OPTIONS: ts.CompilerOptions = {
  strict: true,
  noEmit: true,
  skipLibCheck: true,
  target: ts.ScriptTarget.ES2022,
  module: ts.ModuleKind.ESNext,
  moduleResolution: ts.ModuleResolutionKind.Bundler,
  types: ['node'],
};

class Reader {
  constructor(private readonly checker: ts.TypeChecker) {}

  object(type: ts.Type, depth: number): Schema {
    const required: string[] = [];
    const properties: Record<string, Schema> = {};
    for (const property of type.getProperties()) {
      const optional = (property.flags & ts.SymbolFlags.Optional) !== 0;
      if (!optional) required.push(property.name);
      properties[property.name] = this.any(this.checker.getTypeOfSymbol(property), depth - 1);
    }
    return { type: 'object', properties, required, additionalProperties: false };
  }

  private any(type: ts.Type, depth: number): Schema {
    const parts = type.isUnion() ? type.types : [type];
    const known = parts.filter((part) => (part.flags & (ts.TypeFlags.Undefined | ts.TypeFlags.Void)) === 0);
    // `deleted?: void`: never there.
    return known.length === 0 ? { not: {} } : { anyOf: known.map((part) => this.one(part, depth)) };
  }

  private one(type: ts.Type, depth: number): Schema {
    const { flags } = type;
    if (flags & ts.TypeFlags.StringLike) return { type: 'string' };
    if (flags & ts.TypeFlags.NumberLike) return { type: 'number' };
    if (flags & ts.TypeFlags.BooleanLike) return { type: 'boolean' };
    if (flags & ts.TypeFlags.Null) return { type: 'null' };
    // `string & Record<never, never>`
    if (type.isIntersection())
      return type.types.some(({ flags: each }) => each & ts.TypeFlags.StringLike)
        ? { type: 'string' }
        : ANYTHING;
    if (this.checker.isArrayType(type)) {
      const [item] = this.checker.getTypeArguments(type as ts.TypeReference);
      return { type: 'array', items: item ? this.any(item, depth) : ANYTHING };
    }
    if (type.getStringIndexType()) return { type: 'object', additionalProperties: { type: 'string' } };
    return depth > 0 ? this.object(type, depth) : { type: 'object' };
  }
}

/**
 * @param wanted interface names by the file under the SDK's `resources` that declares them
 * @returns a schema for each interface
 */
export function schemasOf(wanted: Record<string, string>): Record<string, Schema> {
  const files = Object.values(wanted).map((file) => join(typings, `${file}.d.ts`));
  const program = ts.createProgram(files, OPTIONS);
  const reader = new Reader(program.getTypeChecker());
  return Object.fromEntries(
    Object.entries(wanted).map(([name, file]) => {
      const source = program.getSourceFile(join(typings, `${file}.d.ts`));
      const found = source?.statements.find(
        (statement) => ts.isInterfaceDeclaration(statement) && statement.name.text === name,
      );
      if (!found) throw new Error(`${file}.d.ts declares no ${name}`);
      return [name, reader.object(program.getTypeChecker().getTypeAtLocation(found), DEPTH)];
    }),
  );
}
