import { toJsonSchema } from '@valibot/to-json-schema';
import { resultSchema } from './result.js';

/** The text of `assets/schema/joulewright-result-1.schema.json`. */
export function resultSchemaText(): string {
  // JSON has no number that is not finite, so that check needs no keyword.
  const schema = toJsonSchema(resultSchema, { ignoreActions: ['finite'] });
  return `${JSON.stringify({ ...schema, $id: 'joulewright-result-1' }, null, 2)}\n`;
}
