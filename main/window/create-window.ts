import { BrowserWindow, nativeTheme, session } from 'electron';
import { palettes } from '../../sim/drawing/palette.js';
import { windowAddress } from '../ipc/contract.js';

/** Opens the window. Its page has no Node, runs in a sandbox, goes nowhere else and asks for no rights. */
export async function createWindow(preload: string): Promise<BrowserWindow> {
  const window = new BrowserWindow({
    width: 1440,
    height: 900,
    minWidth: 1024,
    minHeight: 640,
    show: false,
    backgroundColor: palettes[nativeTheme.shouldUseDarkColors ? 'dark' : 'light'].surround,
    webPreferences: { preload, contextIsolation: true, sandbox: true, nodeIntegration: false, webviewTag: false },
  });
  session.defaultSession.setPermissionRequestHandler((_contents, _permission, decide) => decide(false));
  session.defaultSession.setPermissionCheckHandler(() => false);
  window.webContents.setWindowOpenHandler(() => ({ action: 'deny' }));
  window.webContents.on('will-navigate', (event) => event.preventDefault());
  window.once('ready-to-show', () => window.show());
  await window.loadURL(windowAddress);
  return window;
}
