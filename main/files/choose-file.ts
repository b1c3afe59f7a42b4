import { BrowserWindow, dialog, type OpenDialogOptions, type WebContents } from 'electron';
import type { FileContent } from '../ipc/contract.js';
import { readFileContent } from './file-content.js';

const options: OpenDialogOptions = {
  title: 'Open a mechanism file',
  filters: [
    { name: 'Mechanism', extensions: ['json'] },
    { name: 'All files', extensions: ['*'] },
  ],
  properties: ['openFile'],
};

/** Shows the system's open dialog on the page's window and reads what was chosen; null when nothing was. */
export async function chooseFile(page: WebContents): Promise<FileContent | null> {
  const window = BrowserWindow.fromWebContents(page);
  if (window === null) return null;
  const { canceled, filePaths } = await dialog.showOpenDialog(window, options);
  return canceled || filePaths.length === 0 ? null : readFileContent(filePaths[0]);
}
