import { join } from 'node:path';
import { readFileContent } from '../files/file-content.js';
import { givenFile } from '../files/given-file.js';
import { openBrowser } from './open-browser.js';
import { serveWindow } from './server.js';

/** The window in a browser: `node dist/serve/serve.js [FILE] [--no-browser]`. It is served until the program is ended. */
const words = process.argv.slice(2);
const path = givenFile(words);
const given = path === null ? null : await readFileContent(path);
const { address } = await serveWindow({ root: join(import.meta.dirname, '../renderer'), given });
const opened = !words.includes('--no-browser') && (await openBrowser(address));
console.log(opened ? `Joulewright is open in the browser, at ${address}` : `Open ${address} in a browser.`);
console.log('Ctrl+C ends it.');
