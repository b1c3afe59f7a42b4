import { writeFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { documentSchemaText } from '../../sim/mechanism/index.js';
import { resultSchemaText } from '../../sim/report/index.js';
import { root } from './run.js';

/** The JSON Schemas beside the examples, each from the source that the program itself reads or writes by. */
const schemas = {
  'joulewright-1.schema.json': documentSchemaText(),
  'joulewright-result-1.schema.json': resultSchemaText(),
};
for (const [name, text] of Object.entries(schemas)) writeFileSync(resolve(root, 'assets/schema', name), text);
