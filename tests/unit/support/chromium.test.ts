import { chmodSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { delimiter, join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { chromiumPath } from '../../support/chromium.js';

describe('the browser the window is tested in', () => {
  let folder = '';
  const inFolder = (...parts: string[]) => join(folder, ...parts);
  beforeAll(() => {
    folder = mkdtempSync(join(tmpdir(), 'browser-'));
    for (const name of ['empty', 'bin']) mkdirSync(inFolder(name));
    writeFileSync(inFolder('bin', 'google-chrome'), '');
    chmodSync(inFolder('bin', 'google-chrome'), 0o755);
  });
  afterAll(() => rmSync(folder, { recursive: true }));

  it('is found in any folder of the PATH', () => {
    expect(chromiumPath([inFolder('empty'), inFolder('bin')].join(delimiter), [])).toBe(
      inFolder('bin', 'google-chrome'),
    );
  });

  it('is found where an installer puts it', () => {
    expect(chromiumPath('', [inFolder('bin', 'google-chrome')])).toBe(inFolder('bin', 'google-chrome'));
  });

  it('is asked for in a sentence that says what to install, where there is none', () => {
    expect(() => chromiumPath(inFolder('empty'), [])).toThrow(/Install it: `apt-get install chromium` on Debian/);
  });
});
