import { mkdtempSync, mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { isInstalled } from '../../../main/build/setup.js';

type Locked = Record<string, { version?: string; optional?: boolean }>;

describe('whether the packages are installed', () => {
  let folder = '';
  beforeEach(() => (folder = mkdtempSync(join(tmpdir(), 'setup-'))));
  afterEach(() => rmSync(folder, { recursive: true }));

  const lock = (packages: Locked) => writeFileSync(join(folder, 'package-lock.json'), JSON.stringify({ packages }));
  const install = (packages: Locked) => {
    mkdirSync(join(folder, 'node_modules'));
    writeFileSync(join(folder, 'node_modules/.package-lock.json'), JSON.stringify({ packages }));
  };

  it('is no on a fresh clone', () => {
    lock({ '': {}, 'node_modules/a': { version: '1.0.0' } });
    expect(isInstalled(folder)).toBe(false);
  });

  it('is yes when every locked version is there', () => {
    lock({ '': {}, 'node_modules/a': { version: '1.0.0' } });
    install({ 'node_modules/a': { version: '1.0.0' } });
    expect(isInstalled(folder)).toBe(true);
  });

  it('is no when a version differs from the locked one', () => {
    lock({ '': {}, 'node_modules/a': { version: '1.0.1' } });
    install({ 'node_modules/a': { version: '1.0.0' } });
    expect(isInstalled(folder)).toBe(false);
  });

  it('is no when a package is missing, and yes when the missing one is for another platform', () => {
    lock({ '': {}, 'node_modules/a': { version: '1.0.0' }, 'node_modules/b': { version: '2.0.0', optional: true } });
    install({ 'node_modules/a': { version: '1.0.0' } });
    expect(isInstalled(folder)).toBe(true);
    lock({ '': {}, 'node_modules/a': { version: '1.0.0' }, 'node_modules/b': { version: '2.0.0' } });
    expect(isInstalled(folder)).toBe(false);
  });
});
