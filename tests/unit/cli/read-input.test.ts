import { mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readInput } from '../../../main/cli/read-input.js';
import { recordedTerminal } from './recorded-terminal.js';

describe('reading the input', () => {
  let folder = '';
  beforeAll(() => (folder = mkdtempSync(join(tmpdir(), 'input-'))));
  afterAll(() => rmSync(folder, { recursive: true }));

  const file = (name: string, content: string | Uint8Array) => {
    writeFileSync(join(folder, name), content);
    return join(folder, name);
  };

  const reasonFor = async (path: string) => {
    const input = await readInput(path, recordedTerminal());
    return 'problem' in input && input.problem.code === 'file-unreadable' ? input.problem.text : input;
  };

  it('gives the text and its size in bytes', async () => {
    expect(await readInput(file('a.json', '{"title": "½"}'), recordedTerminal())).toEqual({
      text: '{"title": "½"}',
      size: 15,
    });
  });

  it('reads standard input for -', async () => {
    expect(await readInput('-', recordedTerminal('{}'))).toEqual({ text: '{}', size: 2 });
  });

  it('leaves out a byte order mark', async () => {
    expect(await readInput(file('bom.json', '\ufeff{}'), recordedTerminal())).toEqual({ text: '{}', size: 5 });
  });

  it('says what a file it cannot read is', async () => {
    symlinkSync('loop', join(folder, 'loop'));
    const inside = join(file('plain.json', '{}'), 'x.json');
    const wrong: [string, string][] = [
      [join(folder, 'none.json'), 'there is no such file'],
      [folder, 'it is a folder, not a file'],
      [inside, 'a part of its path is a file, not a folder'],
      [join(folder, 'n'.repeat(300)), 'its name is too long'],
      [join(folder, 'loop'), 'its links lead in a circle'],
    ];
    for (const [path, reason] of wrong) expect(await reasonFor(path)).toBe(`${path} cannot be read: ${reason}.`);
  });

  it('says that bytes which are not UTF-8 are no mechanism file', async () => {
    const path = file('picture.png', Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 0xff, 0xfe));
    expect(await reasonFor(path)).toBe(`${path} is not text in UTF-8, so it is no mechanism file.`);
  });

  it('stops reading at 64 MiB', async () => {
    const path = file('large.json', Buffer.alloc(65 * 2 ** 20, ' '));
    expect(await reasonFor(path)).toBe(`${path} is larger than 64 MiB, which no mechanism file is.`);
  });
});
