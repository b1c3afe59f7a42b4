import { protocol } from 'electron';
import { windowScheme } from '../ipc/contract.js';
import { readStaticFile } from '../serve/static-files.js';

/** Makes the window's scheme a secure origin of its own; to be called before the program is ready. */
export function registerScheme(): void {
  protocol.registerSchemesAsPrivileged([
    { scheme: windowScheme, privileges: { standard: true, secure: true, supportFetchAPI: true } },
  ]);
}

/** Serves the built window under its scheme, with the headers of the loopback server. */
export function serveScheme(root: string): void {
  protocol.handle(windowScheme, async ({ url, method }) => {
    const { host, pathname } = new URL(url);
    const file = host === 'window' && method === 'GET' ? await readStaticFile(root, pathname) : null;
    return file
      ? new Response(new Uint8Array(file.body), { headers: file.headers })
      : new Response('404\n', { status: 404, headers: { 'content-type': 'text/plain' } });
  });
}
