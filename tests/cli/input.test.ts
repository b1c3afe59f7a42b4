import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { joulewright } from './joulewright.js';

describe('the built command line, given what it cannot use', () => {
  let folder = '';
  beforeAll(() => (folder = mkdtempSync(join(tmpdir(), 'joulewright-'))));
  afterAll(() => rmSync(folder, { recursive: true }));

  const file = (name: string, content: string | Uint8Array) => writeFileSync(join(folder, name), content);
  const check = (...args: string[]) => joulewright(['check', ...args], { cwd: folder });

  it.each<[string, string | Uint8Array | null, RegExp]>([
    ['none.json', null, /^error: none\.json cannot be read: there is no such file\. \[file-unreadable\]\n$/],
    ['.', null, /^error: \. cannot be read: it is a folder, not a file\. \[file-unreadable\]\n$/],
    ['empty.json', '', /^error: .*\[json-syntax\]\n$/],
    ['words.json', 'a spring, somewhere', /^error: Not JSON: .* at line 1, column 1.*\[json-syntax\]\n$/],
    ['cut.json', '{"format": "joulewright/1", "bodies": [', /^error: .*\[json-syntax\]\n$/],
    ['list.json', '[]', /^error: .*\[not-a-document\]\n$/],
    ['old.json', '{"format": "joulewright/0"}', /^error: \/format: .*\[wrong-format\]\n$/],
    ['picture.png', Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 0xff), /^error: picture\.png is not text in UTF-8/],
    ['deep.json', '['.repeat(10_000), /^error: .*\[json-depth\]\n$/],
    ['proto.json', '{"format": "joulewright/1", "__proto__": {"title": "x"}}', /\[forbidden-key\]\n/],
  ])(
    'answers 3 for %s, with the reason on standard error and nothing on standard output',
    async (name, content, reason) => {
      if (content !== null) file(name, content);
      const { status, out, err } = await check(name);
      expect(err).toMatch(reason);
      expect({ status, out }).toEqual({ status: 3, out: '' });
    },
  );

  it('refuses a file of 50 MB in well under a second of work, by its size', async () => {
    file('large.json', Buffer.alloc(50_000_000, ' '));
    const { status, err, took } = await check('large.json');
    expect(err).toMatch(/^error: The file has .*\[file-too-large\]\n$/);
    expect(status).toBe(3);
    expect(took).toBeLessThan(2000);
  });

  it('answers 3 and the help’s name for a command line it does not understand', async () => {
    const { status, out, err } = await joulewright(['chekc', 'a.json']);
    expect(err).toBe("There is no command 'chekc'; there are: check, defaults.\nSee joulewright --help.\n");
    expect({ status, out }).toEqual({ status: 3, out: '' });
  });

  it('answers 4 and one line when it cannot write the files of --out', async () => {
    file('taken', '');
    file('ok.json', '{"format": "joulewright/1"}');
    const { err, status } = await check('ok.json', '--out', 'taken/inside');
    expect(err).toMatch(/taken\/inside cannot be written to: a part of its path is a file, not a folder\.\n$/);
    expect(status).toBe(4);
  });
});
