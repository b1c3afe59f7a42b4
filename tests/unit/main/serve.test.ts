import { mkdtempSync, mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { request } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readFileContent } from '../../../main/files/file-content.js';
import { givenFile } from '../../../main/files/given-file.js';
import { browserCommand } from '../../../main/serve/open-browser.js';
import { serveWindow, type ServedWindow } from '../../../main/serve/server.js';
import { contentSecurityPolicy, resolveInside } from '../../../main/serve/static-files.js';

const folder = mkdtempSync(join(tmpdir(), 'window-'));
const root = join(folder, 'renderer');
let served: ServedWindow;

beforeAll(async () => {
  mkdirSync(join(root, 'assets'), { recursive: true });
  writeFileSync(join(root, 'index.html'), '<!doctype html><title>Window</title>');
  writeFileSync(join(root, 'assets/main.js'), 'export {};');
  writeFileSync(join(root, 'assets/secret.pem'), 'not served');
  writeFileSync(join(folder, 'outside.js'), 'not served');
  served = await serveWindow({ root, given: { name: 'a.json', text: '{}', size: 2 } });
});
afterAll(async () => {
  await served.close();
  rmSync(folder, { recursive: true });
});

/** A request with its path as it is written: `fetch` would tidy it up. */
function ask(path: string, { method = 'GET', host }: { method?: string; host?: string } = {}) {
  const { port } = new URL(served.address);
  return new Promise<{ status: number; headers: Record<string, unknown>; body: string }>((resolve, reject) => {
    const asked = request({ port, path, method, headers: host === undefined ? {} : { host } }, (response) => {
      let body = '';
      response.on('data', (part: Buffer) => (body += part.toString()));
      response.on('end', () => resolve({ status: response.statusCode ?? 0, headers: response.headers, body }));
    });
    asked.on('error', reject);
    asked.end();
  });
}

describe('the loopback server', () => {
  it('is reached at loopback only, and sends the window with a policy that allows nothing from elsewhere', async () => {
    expect(served.address).toMatch(/^http:\/\/127\.0\.0\.1:\d+\/$/);
    const { status, headers, body } = await ask('/?renderer=canvas');
    expect(status).toBe(200);
    expect(body).toContain('<title>Window</title>');
    expect(headers['content-security-policy']).toBe(contentSecurityPolicy);
    expect(headers['x-content-type-options']).toBe('nosniff');
    expect(contentSecurityPolicy).not.toMatch(/unsafe|https?:|\*/);
  });

  it('sends scripts as scripts, and the given file', async () => {
    expect((await ask('/assets/main.js')).headers['content-type']).toMatch(/^text\/javascript/);
    expect(JSON.parse((await ask('/given-file.json')).body)).toEqual({ name: 'a.json', text: '{}', size: 2 });
  });

  it.each([
    '/../outside.js',
    '/assets/../../outside.js',
    '/%2e%2e/outside.js',
    '/..%2foutside.js',
    '/assets%00.js',
    '/%',
    '/nowhere.js',
    '/assets/secret.pem',
    '/assets',
  ])('has nothing at %s', async (path) => {
    expect((await ask(path)).status).toBe(404);
  });

  it('answers GET only, and to a loopback name only', async () => {
    expect((await ask('/', { method: 'POST' })).status).toBe(405);
    expect((await ask('/', { host: 'evil.example' })).status).toBe(403);
    expect((await ask('/', { host: 'localhost:1234' })).status).toBe(200);
  });

  it('resolves addresses inside its folder or not at all', () => {
    expect(resolveInside('/srv/window', '/')).toBe('/srv/window/index.html');
    expect(resolveInside('/srv/window', '/a/../b.js')).toBe('/srv/window/b.js');
    expect(resolveInside('/srv/window', '/../window-other/x.js')).toBeNull();
  });
});

describe('opening', () => {
  it('takes the last word of a command line that is no option', () => {
    expect(givenFile(['--no-browser', 'a.json'])).toBe('a.json');
    expect(givenFile(['.', '--inspect'])).toBeNull();
    expect(givenFile([])).toBeNull();
  });

  it('reads a file with its name and size, and says in a sentence why it cannot', async () => {
    writeFileSync(join(folder, 'µ.json'), '{"µ":1}');
    expect(await readFileContent(join(folder, 'µ.json'))).toEqual({ name: 'µ.json', text: '{"µ":1}', size: 8 });
    await expect(readFileContent(join(folder, 'no.json'))).rejects.toThrow(
      'no.json cannot be read: there is no such file.',
    );
    await expect(readFileContent(folder)).rejects.toThrow('it is a folder');
  });

  it('opens the default browser of each system, and none where there is no screen', () => {
    const address = 'http://127.0.0.1:1/';
    expect(browserCommand(address, 'darwin', {})).toEqual(['open', address]);
    expect(browserCommand(address, 'win32', {})?.[0]).toBe('cmd');
    expect(browserCommand(address, 'linux', { DISPLAY: ':0' })).toEqual(['xdg-open', address]);
    expect(browserCommand(address, 'linux', {})).toBeNull();
  });
});
