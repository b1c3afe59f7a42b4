import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { expect, it } from 'vitest';
import { resultSchemaText } from '../../../sim/report/index.js';

const file = resolve(import.meta.dirname, '../../../assets/schema/joulewright-result-1.schema.json');

it('has in assets/schema the JSON Schema that the types of the result are made from (npm run schema writes it)', () => {
  expect(readFileSync(file, 'utf8')).toBe(resultSchemaText());
});
