import { app, BrowserWindow, Menu } from 'electron';
import { join } from 'node:path';
import { chooseFile } from './files/choose-file.js';
import { readFileContent } from './files/file-content.js';
import { givenFile } from './files/given-file.js';
import { openGate } from './ipc/gate.js';
import { menuTemplate } from './menu/menu.js';
import { createWindow } from './window/create-window.js';
import { registerScheme, serveScheme } from './window/serve-scheme.js';

// As built: dist/main/main.js, with the preload script beside it and the window in dist/renderer.
const here = import.meta.dirname;
const preload = join(here, 'preload.cjs');
const given = givenFile(process.argv.slice(app.isPackaged ? 1 : 2));

registerScheme();

async function start(): Promise<void> {
  await app.whenReady();
  serveScheme(join(here, '../renderer'));
  openGate({
    'joulewright:open-file': ({ sender }) => chooseFile(sender),
    'joulewright:given-file': async () => (given === null ? null : readFileContent(given)),
  });
  const template = menuTemplate(process.platform);
  Menu.setApplicationMenu(template && Menu.buildFromTemplate(template));
  await createWindow(preload);
  app.on('activate', () => {
    if (BrowserWindow.getAllWindows().length === 0) void createWindow(preload);
  });
}

app.on('window-all-closed', () => {
  if (process.platform !== 'darwin') app.quit();
});

void start();
