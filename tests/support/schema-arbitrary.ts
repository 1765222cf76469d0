/** Inputs that a JSON Schema allows, or nearly: the fuel of the contract test over every calculation. */
import fc from 'fast-check';

export interface JsonSchema {
  type?: string | string[];
  const?: unknown;
  enum?: unknown[];
  anyOf?: JsonSchema[];
  oneOf?: JsonSchema[];
  properties?: Record<string, JsonSchema>;
  required?: string[];
  propertyNames?: JsonSchema;
  additionalProperties?: boolean | JsonSchema;
  items?: JsonSchema;
  minItems?: number;
  maxItems?: number;
  minimum?: number;
  maximum?: number;
  exclusiveMinimum?: number;
  pattern?: string;
}

/** Figures of circuits and money, the ends of the allowed range, and what lies far out. */
function numbers(schema: JsonSchema, whole: boolean): fc.Arbitrary<unknown> {
  const low = schema.minimum ?? schema.exclusiveMinimum ?? -1000;
  const high = Math.max(low, schema.maximum ?? 1e6);
  const ends = [low, high, low + 1, 0, 1, 1e-12, 1e15, -1];
  const near = whole
    ? fc.integer({ min: Math.ceil(low), max: Math.ceil(low) + 40 })
    : fc.double({ min: low, max: Math.min(high, Math.max(low, 0) + 300), noNaN: true });
  return fc.oneof({ arbitrary: near, weight: 12 }, { arbitrary: fc.constantFrom(...ends), weight: 1 });
}

function objects(schema: JsonSchema): fc.Arbitrary<unknown> {
  const entries = Object.entries(schema.properties ?? {});
  if (entries.length === 0 && schema.propertyNames && typeof schema.additionalProperties === 'object')
    return fc.dictionary(
      arbitraryOf(schema.propertyNames) as fc.Arbitrary<string>,
      arbitraryOf(schema.additionalProperties),
      { maxKeys: 3 },
    );
  return fc.record(Object.fromEntries(entries.map(([key, member]) => [key, arbitraryOf(member)])), {
    requiredKeys: (schema.required ?? []) as never[],
  });
}

export function arbitraryOf(schema: JsonSchema): fc.Arbitrary<unknown> {
  if (schema.const !== undefined) return fc.constant(schema.const);
  if (schema.enum) return fc.constantFrom(...schema.enum);
  const branches = schema.anyOf ?? schema.oneOf;
  if (branches) return fc.oneof(...branches.map(arbitraryOf));
  switch (schema.type) {
    case 'object':
      return objects(schema);
    case 'array':
      return fc.array(arbitraryOf(schema.items ?? {}), { minLength: schema.minItems ?? 0, maxLength: 4 });
    case 'number':
      return numbers(schema, false);
    case 'integer':
      return numbers(schema, true);
    case 'boolean':
      return fc.boolean();
    case 'null':
      return fc.constant(null);
    case 'string':
      return fc.oneof(
        schema.pattern
          ? fc.stringMatching(new RegExp(schema.pattern))
          : fc.constantFrom('a', 'b', 'USD', 'JPY'),
        fc.string({ maxLength: 4 }),
      );
    default:
      return fc.jsonValue();
  }
}

/** Paths of all objects within a value, '' for the whole. */
export function objectPaths(value: unknown, path = ''): string[] {
  if (value === null || typeof value !== 'object') return [];
  const below = Object.entries(value).flatMap(([key, member]) =>
    objectPaths(member, path === '' ? key : `${path}.${key}`),
  );
  return Array.isArray(value) ? below : [path, ...below];
}

/** A copy with `change` made to the object at `path`. */
export function changedAt(
  value: unknown,
  path: string,
  change: (object: Record<string, unknown>) => void,
): unknown {
  const copy = structuredClone(value);
  const at =
    path === '' ? copy : path.split('.').reduce((o, key) => (o as Record<string, unknown>)[key], copy);
  change(at as Record<string, unknown>);
  return copy;
}
