import { spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join, resolve } from 'node:path';
import { afterEach, describe, expect, it } from 'vitest';

const root = resolve(import.meta.dirname, '../../..');
const vitest = resolve(dirname(createRequire(import.meta.url).resolve('vitest/package.json')), 'vitest.mjs');
const reporter = resolve(root, '.config/count-reporter.ts');

describe('the last line of a test run', () => {
  let folder = '';
  afterEach(() => rmSync(folder, { recursive: true }));

  /** Runs one test file of this content, in a folder from which `vitest` can be imported; what was printed, by lines. */
  function lines(content: string, checks = {}): string[] {
    mkdirSync(resolve(root, 'dist'), { recursive: true });
    folder = mkdtempSync(resolve(root, 'dist/count-'));
    writeFileSync(join(folder, 'a.test.ts'), `import { expect, it } from 'vitest';\n${content}`);
    const args = ['run', '--root', folder, '--reporter', reporter];
    // Nothing of the run that this test is part of may reach the one inside it.
    const clean = Object.fromEntries(
      Object.entries(process.env).filter(([name]) => !/^(VITEST|CHECKS_|NODE_ENV)/.test(name)),
    );
    const run = spawnSync(process.execPath, [vitest, ...args], {
      env: { ...clean, ...checks },
      encoding: 'utf8',
    });
    return run.stdout.trimEnd().split('\n');
  }

  it('counts what passed and what failed', () => {
    expect(lines(`it('a', () => {}); it('b', () => {}); it('c', () => expect(1).toBe(2));`).at(-1)).toBe(
      '2 passed, 1 failed',
    );
  });

  it('counts a file that does not load as failed', () => {
    expect(lines(`throw new Error('no'); it('a', () => {});`).at(-1)).toBe('0 passed, 1 failed');
  });

  it('counts an error outside any test as failed', () => {
    const content = `it('a', async () => { setTimeout(() => { throw new Error('late'); }); await new Promise((r) => setTimeout(r, 50)); });`;
    expect(lines(content).at(-1)).toBe('1 passed, 1 failed');
  });

  it('adds the checks that ran before the tests', () => {
    expect(lines(`it('a', () => {});`, { CHECKS_PASSED: '2', CHECKS_FAILED: '1' }).at(-1)).toBe('3 passed, 1 failed');
  });

  it('names a test that was left out', () => {
    expect(lines(`it('a', () => {}); it.skip('b', () => {});`).slice(-2)).toEqual([
      '  not run: b',
      '1 passed, 0 failed',
    ]);
  });
});
