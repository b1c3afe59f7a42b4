import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { FileContent } from '../ipc/contract.js';
import { headersFor, readStaticFile, type StaticFile } from './static-files.js';

export interface ServedWindow {
  /** Where the window is, such as "http://127.0.0.1:41234/". */
  address: string;
  close(): Promise<void>;
}

export interface ServeOptions {
  /** Folder of the built window. */
  root: string;
  /** 0 for any free port. */
  port?: number;
  /** The file to be shown at the start. */
  given?: FileContent | null;
}

/** Serves the built window to this machine only, on the loopback interface. */
export async function serveWindow({ root, port = 0, given = null }: ServeOptions): Promise<ServedWindow> {
  const server = createServer((request, response) => void answer({ root, given }, request, response));
  const bound = await listen(server, port);
  return {
    address: `http://127.0.0.1:${bound}/`,
    close: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}

function listen(server: Server, port: number): Promise<number> {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => {
      const address = server.address();
      if (typeof address === 'object' && address !== null) resolve(address.port);
      else reject(new Error('The server has no port.'));
    });
  });
}

/** Where the window asks for the file it is to show at the start. */
const givenPath = '/given-file.json';

interface Content {
  root: string;
  given: FileContent | null;
}

function givenAnswer(given: FileContent | null): StaticFile {
  return { body: Buffer.from(JSON.stringify(given)), headers: headersFor('application/json; charset=utf-8') };
}

async function answer({ root, given }: Content, request: IncomingMessage, response: ServerResponse): Promise<void> {
  if (request.method !== 'GET') {
    end(response, 405, { allow: 'GET' });
    return;
  }
  // A name other than loopback's in Host is a page elsewhere that was pointed here.
  if (!/^(127\.0\.0\.1|localhost)(:\d+)?$/.test(request.headers.host ?? '')) {
    end(response, 403);
    return;
  }
  const [path] = (request.url ?? '/').split(/[?#]/);
  const file = path === givenPath ? givenAnswer(given) : await readStaticFile(root, path);
  if (!file) {
    end(response, 404);
    return;
  }
  response.writeHead(200, { ...file.headers, 'content-length': file.body.length });
  response.end(file.body);
}

function end(response: ServerResponse, status: number, headers: Record<string, string> = {}): void {
  response.writeHead(status, { 'content-type': 'text/plain; charset=utf-8', ...headers });
  response.end(`${status}\n`);
}
