import { readFile } from 'node:fs/promises';
import { extname, join, normalize, sep } from 'node:path';

/** A file of the window, ready to be sent. */
export interface StaticFile {
  body: Buffer;
  headers: Record<string, string>;
}

/** No content from elsewhere, no inline script; blobs and data addresses are those that the drawing library makes. */
export const contentSecurityPolicy = [
  "default-src 'none'",
  "script-src 'self'",
  "style-src 'self'",
  "font-src 'self' data:",
  "img-src 'self' data: blob:",
  "connect-src 'self' data: blob:",
  "worker-src 'self' blob:",
  "base-uri 'none'",
  "form-action 'none'",
  "frame-ancestors 'none'",
].join('; ');

const types: Record<string, string> = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.map': 'application/json; charset=utf-8',
  '.svg': 'image/svg+xml',
  '.woff': 'font/woff',
  '.woff2': 'font/woff2',
};

/**
 * Reads a file of the window by the path of its address. Null where there is none: outside the folder, of a type the
 * window has no use for, or not there.
 *
 * @param root the built window's folder
 * @param path as in an address: begins with "/", may be percent-encoded
 */
export async function readStaticFile(root: string, path: string): Promise<StaticFile | null> {
  const file = resolveInside(root, path);
  const type = file === null ? undefined : types[extname(file)];
  if (file === null || type === undefined) return null;
  try {
    return { body: await readFile(file), headers: headersFor(type) };
  } catch {
    return null;
  }
}

/** The file an address means; null for one that leads out of the folder or cannot be decoded. */
export function resolveInside(root: string, path: string): string | null {
  try {
    const decoded = decodeURIComponent(path);
    if (decoded.includes('\0')) return null;
    const file = normalize(join(root, decoded === '/' ? 'index.html' : decoded));
    return file.startsWith(normalize(root) + sep) ? file : null;
  } catch {
    return null;
  }
}

/** Headers of everything that is sent. */
export function headersFor(type: string): Record<string, string> {
  return {
    'content-type': type,
    'content-security-policy': contentSecurityPolicy,
    'x-content-type-options': 'nosniff',
    'referrer-policy': 'no-referrer',
    'cross-origin-opener-policy': 'same-origin',
    'cache-control': 'no-cache',
  };
}
