import { writeFile } from 'node:fs/promises';
import { resolve } from 'node:path';
import { documentSchemaText } from '../../sim/mechanism/index.js';

/** Writes the JSON Schema of the mechanism file, from the field tables that read it. */
await writeFile(resolve(import.meta.dirname, '../../assets/schema/joulewright-1.schema.json'), documentSchemaText());
