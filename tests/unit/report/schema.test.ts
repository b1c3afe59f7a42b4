import { toJsonSchema } from '@valibot/to-json-schema';
import { describe, expect, it } from 'vitest';
import { resultSchema } from '../../../sim/report/result.js';

describe('the JSON Schema of the result', () => {
  it('is what the types are made from (run vitest with -u to write it anew)', async () => {
    // JSON has no number that is not finite, so that check needs no keyword.
    const schema = toJsonSchema(resultSchema, { ignoreActions: ['finite'] });
    const text = `${JSON.stringify({ ...schema, $id: 'joulewright-result-1' }, null, 2)}\n`;
    await expect(text).toMatchFileSnapshot('../../../assets/schema/joulewright-result-1.schema.json');
  });
});
