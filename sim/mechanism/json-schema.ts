import { documentFields, FORMAT } from './document.js';
import { accepts, refWords } from './fields/accepts.js';
import { idPattern } from './fields/ids.js';
import type { Alternative, Entry, Range, RecordSpec, Spec } from './fields/spec.js';
import { layOut } from './json/layout.js';
import type { JsonObject, JsonValue } from './json/value.js';
import { quantityKinds, type QuantityName } from './units/dimension.js';

/** A text that begins like a number; what it may be in full is more than a pattern can say. */
const QUANTITY = '^\\s*[-+\u2212\u2013]?\\s*[.,]?[0-9]';

/**
 * JSON Schema (draft 2020-12) of the document, from the same field tables that read it. It says less than reading does:
 * units, references and what elements mean together are left to the program.
 */
export function documentSchema(): JsonObject {
  const $defs = Object.fromEntries(
    Object.keys(quantityKinds).map((kind) => [kind, quantityText(kind as QuantityName)]),
  );
  return {
    $schema: 'https://json-schema.org/draft/2020-12/schema',
    ...schemaOf(documentFields),
    title: `Mechanism file, ${FORMAT}`,
    description: 'One mechanism, what to ask of it, and how to run it.',
    $defs,
  };
}

/** The text of `assets/schema/joulewright-1.schema.json`. */
export const documentSchemaText = (): string => `${layOut(documentSchema())}\n`;

const quantityText = (kind: QuantityName): JsonObject => {
  const { says, si, example } = quantityKinds[kind];
  const description =
    si === '' ? 'A number, or a text such as "30 %".' : `${says} with its unit; a bare number is in ${si}.`;
  return { type: 'string', pattern: QUANTITY, description, examples: [example] };
};

/** The schema of one description. */
export function schemaOf(spec: Spec): JsonObject {
  switch (spec.type) {
    case 'text':
      return { type: 'string' };
    case 'flag':
      return { type: 'boolean' };
    case 'id':
      return { type: 'string', pattern: idPattern.source, not: { enum: ['ground', 'all'] } };
    case 'ref':
      return { type: 'string', $comment: refWords(spec.to) };
    case 'choice':
      return spec.options.length === 1 ? { const: spec.options[0] } : { enum: [...spec.options] };
    case 'quantity':
      return { anyOf: [{ type: 'number', ...rangeKeywords(spec.range) }, { $ref: `#/$defs/${spec.kind}` }] };
    case 'measure':
      return { anyOf: [{ type: 'number' }, { type: 'string', pattern: QUANTITY }] };
    case 'vector':
      return tuple(Array.from({ length: spec.size }, () => quantitySchema(spec.kind)));
    case 'table':
      return { type: 'array', items: tuple([quantitySchema(spec.x), quantitySchema(spec.y)]), minItems: 2 };
    case 'list':
      return { type: 'array', items: schemaOf(spec.item), ...(spec.atLeast > 0 && { minItems: spec.atLeast }) };
    case 'tuple':
      return tuple(spec.items.map(schemaOf));
    case 'record':
      return recordSchema(spec);
    case 'tagged':
      return { oneOf: Object.entries(spec.variants).map(([name, each]) => recordSchema(each, [spec.tag, name])) };
    case 'either':
      return { description: spec.says, anyOf: spec.options.map(schemaOf) };
    case 'map':
      return { type: 'object', additionalProperties: schemaOf(spec.value) };
  }
}

const quantitySchema = (kind: QuantityName): JsonObject => schemaOf({ type: 'quantity', kind, unit: '', range: {} });

const tuple = (items: JsonValue[]): JsonObject => ({
  type: 'array',
  prefixItems: items,
  items: false,
  minItems: items.length,
});

function rangeKeywords({ above, atLeast, below, atMost, notZero, whole }: Range): JsonObject {
  return {
    ...(above !== undefined && { exclusiveMinimum: above }),
    ...(atLeast !== undefined && { minimum: atLeast }),
    ...(below !== undefined && { exclusiveMaximum: below }),
    ...(atMost !== undefined && { maximum: atMost }),
    ...(notZero && { not: { const: 0 } }),
    ...(whole && { multipleOf: 1 }),
  };
}

function recordSchema(spec: RecordSpec, tag?: [key: string, value: string]): JsonObject {
  const entries = Object.entries(spec.fields);
  const required = entries.filter(([, entry]) => entry.presence === 'required').map(([key]) => key);
  const all = [...(tag ? [tag[0]] : []), ...required];
  const rules = spec.alternatives.map(alternativeSchema);
  return {
    type: 'object',
    title: spec.says,
    properties: {
      ...(tag && { [tag[0]]: { const: tag[1] } }),
      ...Object.fromEntries(entries.map(([key, entry]) => [key, entrySchema(entry)])),
    },
    ...(all.length > 0 && { required: all }),
    ...(rules.length > 0 && { allOf: rules }),
  };
}

const entrySchema = (entry: Entry): JsonObject => ({
  description: `${entry.doc} Accepted: ${accepts(entry.spec)}.`,
  ...schemaOf(entry.spec),
  ...(entry.value !== undefined && { default: entry.value }),
});

/** Exactly one group, or at most one; a group is given whole. */
function alternativeSchema({ groups, optional }: Alternative): JsonObject {
  const one = groups.map((group) => ({ required: [...group] }));
  if (!optional) return one.length === 1 ? one[0] : { oneOf: one };
  const none = { not: { anyOf: groups.flat().map((key) => ({ required: [key] })) } };
  return { oneOf: [none, ...one] };
}
