import { accessSync, constants } from 'node:fs';
import { delimiter, join } from 'node:path';

const names = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable'];

/** Where installers put it on systems that have no such command on the PATH. */
const elsewhere = [
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  '/Applications/Chromium.app/Contents/MacOS/Chromium',
  'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe',
  'C:\\Program Files (x86)\\Google\\Chrome\\Application\\chrome.exe',
];

/**
 * Path of the Chromium or Chrome that the window is tested in.
 * @throws Error with a sentence on what to install, where there is none
 */
export function chromiumPath(path = process.env.PATH ?? '', others: readonly string[] = elsewhere): string {
  const folders = path.split(delimiter).filter((folder) => folder !== '');
  const places = folders.flatMap((folder) => names.map((name) => join(folder, name)));
  const found = [...places, ...others].find(isProgram);
  if (found !== undefined) return found;
  throw new Error(
    `The window is tested in Chromium, and there is none on the PATH (${names.join(', ')}). ` +
      'Install it: `apt-get install chromium` on Debian, or Google Chrome on any system.',
  );
}

function isProgram(path: string): boolean {
  try {
    accessSync(path, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}
