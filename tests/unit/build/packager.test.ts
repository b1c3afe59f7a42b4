import { createRequire } from 'node:module';
import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';

type PackagerConfig = Record<string, unknown>;
interface ConfigModule {
  getConfig: (folder: string, file: string, options: null) => Promise<PackagerConfig>;
  validateConfiguration: (config: PackagerConfig, log: { isEnabled: boolean }) => Promise<void>;
}

const root = resolve(import.meta.dirname, '../../..');
const { getConfig, validateConfiguration } = createRequire(import.meta.url)(
  'app-builder-lib/out/util/config/config',
) as ConfigModule;

describe('the packager’s recipe', () => {
  it('is one the packager accepts', async () => {
    const config = await getConfig(root, 'electron-builder.yml', null);
    await expect(validateConfiguration(config, { isEnabled: false })).resolves.toBeUndefined();
  });

  it('is refused with a key the packager does not know, so that the check above means something', async () => {
    const config = { ...(await getConfig(root, 'electron-builder.yml', null)), fils: [] };
    await expect(validateConfiguration(config, { isEnabled: false })).rejects.toThrow(/fils/);
  });
});
