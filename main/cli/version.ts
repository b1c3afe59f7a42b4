import { readFileSync } from 'node:fs';

/** The version in package.json, two folders up from here and from the bundle alike. */
export function version(): string {
  const file = readFileSync(new URL('../../package.json', import.meta.url), 'utf8');
  return (JSON.parse(file) as { version: string }).version;
}
