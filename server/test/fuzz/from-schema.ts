import fc from 'fast-check';

/** What our OpenAPI document uses of JSON Schema. */
export interface Schema {
  readonly $ref?: string;
  readonly type?: string | readonly string[];
  readonly nullable?: boolean;
  readonly enum?: readonly unknown[];
  readonly default?: unknown;
  readonly properties?: Readonly<Record<string, Schema>>;
  readonly required?: readonly string[];
  readonly additionalProperties?: boolean | Schema;
  readonly items?: Schema | false;
  readonly prefixItems?: readonly Schema[];
  readonly minItems?: number;
  readonly maxItems?: number;
  readonly minLength?: number;
  readonly maxLength?: number;
  readonly minimum?: number;
  readonly maximum?: number;
  readonly format?: string;
}

type Schemas = Readonly<Record<string, Schema>>;

/** Values that a schema's words alone do not lead to, by the name of the field: else nothing would get past the first rule. */
export type Hints = Readonly<Record<string, fc.Arbitrary<unknown>>>;

/** Values of a schema, as somebody would send who has read the document. */
export function valuesOf(schema: Schema, schemas: Schemas, hints: Hints, name = ''): fc.Arbitrary<unknown> {
  if (schema.$ref) {
    const target = schemas[schema.$ref.split('/').at(-1) ?? ''];
    if (!target) throw new Error(`${schema.$ref} is not in the document`);
    return valuesOf(target, schemas, hints, name);
  }
  const types = [schema.type ?? 'object'].flat();
  const kinds = types
    .filter((type) => type !== 'null')
    .map((type) => ofType(type, schema, schemas, hints, name));
  const values = fc.oneof(...kinds);
  return schema.nullable || types.includes('null')
    ? fc.oneof({ arbitrary: values, weight: 4 }, { arbitrary: fc.constant(null), weight: 1 })
    : values;
}

function ofType(
  type: string,
  schema: Schema,
  schemas: Schemas,
  hints: Hints,
  name: string,
): fc.Arbitrary<unknown> {
  if (schema.enum) return fc.constantFrom(...schema.enum);
  const hint = hints[name];
  if (hint && (type === 'string' || type === 'integer')) return hint;
  switch (type) {
    case 'boolean':
      return fc.boolean();
    case 'integer':
      return fc.oneof(
        fc.integer({
          min: schema.minimum ?? -100,
          max: Math.min(schema.maximum ?? 100, (schema.minimum ?? 0) + 100),
        }),
        fc.constantFrom(schema.minimum ?? 0, schema.maximum ?? 0),
      );
    case 'number':
      return fc.double({ min: schema.minimum ?? -1e6, max: schema.maximum ?? 1e6, noNaN: true });
    case 'string':
      return textOf(schema);
    case 'array':
      return listOf(schema, schemas, hints, name);
    default:
      return recordOf(schema, schemas, hints);
  }
}

function textOf({ format, minLength = 0, maxLength = 60 }: Schema): fc.Arbitrary<string> {
  if (format === 'uuid') return fc.uuid();
  const longest = Math.max(minLength, Math.min(maxLength, 60));
  return fc.oneof(
    fc.string({ minLength, maxLength: longest, unit: 'grapheme' }),
    fc.string({ minLength, maxLength: longest, unit: 'binary' }),
    fc.constant('x'.repeat(maxLength)),
  );
}

function listOf(schema: Schema, schemas: Schemas, hints: Hints, name: string): fc.Arbitrary<unknown> {
  if (schema.prefixItems) {
    return fc.tuple(...schema.prefixItems.map((item) => valuesOf(item, schemas, hints, name)));
  }
  if (!schema.items) return fc.constant([]);
  const { minItems: minLength = 0, maxItems = 100 } = schema;
  return fc.array(valuesOf(schema.items, schemas, hints, name), {
    minLength,
    maxLength: Math.max(minLength, Math.min(maxItems, 8)),
  });
}

function recordOf(schema: Schema, schemas: Schemas, hints: Hints): fc.Arbitrary<unknown> {
  const { properties = {}, required = [], additionalProperties } = schema;
  if (Object.keys(properties).length === 0 && typeof additionalProperties === 'object') {
    const keys = fc.oneof(hints['kind'] as fc.Arbitrary<string>, fc.string({ maxLength: 10 }));
    return fc.dictionary(keys, valuesOf(additionalProperties, schemas, hints), { maxKeys: 4 });
  }
  const fields = Object.fromEntries(
    Object.entries(properties).map(([name, field]) => [name, valuesOf(field, schemas, hints, name)]),
  );
  return fc.record(fields, { requiredKeys: required.filter((name) => name in fields) });
}
