import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { documentSchema, documentSchemaText } from '../../../sim/mechanism/index.js';
import { schemaOf } from '../../../sim/mechanism/json-schema.js';
import { bodyFields } from '../../../sim/mechanism/kinds/body.js';
import { number, record, required } from '../../../sim/mechanism/fields/spec.js';

describe('The JSON Schema of the mechanism file', () => {
  it('in assets is the one that the field tables give', () => {
    const file = resolve(import.meta.dirname, '../../../assets/schema/joulewright-1.schema.json');
    expect(readFileSync(file, 'utf8')).toBe(documentSchemaText());
  });

  it('has every key of the contract, and needs only format and run', () => {
    const { properties, required: needed } = documentSchema() as { properties: object; required: string[] };
    expect(Object.keys(properties)).toHaveLength(22);
    expect(needed).toEqual(['format', 'run']);
  });

  it('wants mass, or density and thickness, but not both', () => {
    expect(schemaOf(bodyFields).allOf).toContainEqual({
      oneOf: [{ required: ['mass'] }, { required: ['density', 'thickness'] }],
    });
  });

  it('carries ranges to bare numbers', () => {
    const spec = record('a thing', { share: required(number({ above: 0, atMost: 1 }), 'A share.') });
    expect(schemaOf(spec).properties).toEqual({
      share: {
        description: 'A share. Accepted: a number above 0 and of at most 1.',
        anyOf: [{ type: 'number', exclusiveMinimum: 0, maximum: 1 }, { $ref: '#/$defs/number' }],
      },
    });
  });
});
