import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeEach, describe, expect, it, vi } from 'vitest';
import { channels, windowAddress } from '../../../main/ipc/contract.js';

/** Electron, doubled: what the program asked of it. */
const electron = vi.hoisted(() => {
  const window = {
    webContents: { setWindowOpenHandler: vi.fn(), on: vi.fn() },
    once: vi.fn(),
    show: vi.fn(),
    loadURL: vi.fn(() => Promise.resolve()),
  };
  const BrowserWindow = Object.assign(
    vi.fn(function () {
      return window;
    }),
    { fromWebContents: vi.fn((): unknown => window), getAllWindows: vi.fn(() => []) },
  );
  return {
    window,
    BrowserWindow,
    ipcMain: { handle: vi.fn() },
    ipcRenderer: { invoke: vi.fn(() => Promise.resolve(null)) },
    contextBridge: { exposeInMainWorld: vi.fn() },
    protocol: { handle: vi.fn(), registerSchemesAsPrivileged: vi.fn() },
    nativeTheme: { shouldUseDarkColors: true },
    session: { defaultSession: { setPermissionRequestHandler: vi.fn(), setPermissionCheckHandler: vi.fn() } },
    dialog: { showOpenDialog: vi.fn((): Promise<unknown> => Promise.resolve({ canceled: true, filePaths: [] })) },
  };
});
vi.mock('electron', () => electron);

const { openGate } = await import('../../../main/ipc/gate.js');
const { chooseFile } = await import('../../../main/files/choose-file.js');
const { createWindow } = await import('../../../main/window/create-window.js');
const { registerScheme, serveScheme } = await import('../../../main/window/serve-scheme.js');
const { menuTemplate } = await import('../../../main/menu/menu.js');

const folder = mkdtempSync(join(tmpdir(), 'program-'));
afterAll(() => rmSync(folder, { recursive: true }));
beforeEach(() => void vi.clearAllMocks());

describe('the gate between window and program', () => {
  const answer = vi.fn(() => Promise.resolve('answer'));
  const ours = { senderFrame: { parent: null, url: windowAddress } };
  const call = (channel: string, event: unknown, ...given: unknown[]): unknown => {
    openGate({ [channels.openFile]: answer, [channels.givenFile]: answer });
    const handler = electron.ipcMain.handle.mock.calls.find(([name]) => name === channel)?.[1] as (...all: unknown[]) => unknown; // prettier-ignore
    return handler(event, ...given);
  };

  it('opens the contract’s channels and no others', () => {
    openGate({ [channels.openFile]: answer, [channels.givenFile]: answer });
    expect(electron.ipcMain.handle.mock.calls.map(([name]) => name as string).sort()).toEqual(
      Object.values(channels).sort(),
    );
  });

  it('lets the main frame of our own page through', async () => {
    await expect(call(channels.openFile, ours)).resolves.toBe('answer');
  });

  it.each([
    ['another page', { senderFrame: { parent: null, url: 'https://elsewhere.example/' } }, []],
    [
      'a page whose address only looks like ours',
      { senderFrame: { parent: null, url: 'joulewright://window.evil/' } },
      [],
    ],
    ['a frame inside the page', { senderFrame: { parent: {}, url: windowAddress } }, []],
    ['a frame that is gone', { senderFrame: null }, []],
    ['a call with arguments', ours, ['/etc/passwd']],
  ])('refuses %s', (_, event, given) => {
    expect(() => call(channels.openFile, event, ...given)).toThrow(/is refused/);
    expect(answer).not.toHaveBeenCalled();
  });
});

describe('the program’s window', () => {
  it('has context isolation and a sandbox, and no Node', async () => {
    await createWindow('/program/preload.cjs');
    const [[options]] = electron.BrowserWindow.mock.calls as unknown as [[{ webPreferences: object }]];
    expect(options.webPreferences).toEqual({
      preload: '/program/preload.cjs',
      contextIsolation: true,
      sandbox: true,
      nodeIntegration: false,
      webviewTag: false,
    });
    expect(electron.window.loadURL).toHaveBeenCalledWith(windowAddress);
  });

  it('opens no other window, goes nowhere else, and grants no rights', async () => {
    await createWindow('/program/preload.cjs');
    const { webContents } = electron.window;
    const [[decideOpen]] = webContents.setWindowOpenHandler.mock.calls as unknown as [[() => unknown]];
    expect(decideOpen()).toEqual({ action: 'deny' });
    const prevent = vi.fn();
    const navigate = webContents.on.mock.calls.find(([name]) => name === 'will-navigate')?.[1] as (
      event: object,
    ) => void;
    navigate({ preventDefault: prevent });
    expect(prevent).toHaveBeenCalledOnce();
    const decide = vi.fn();
    const { setPermissionRequestHandler, setPermissionCheckHandler } = electron.session.defaultSession;
    (setPermissionRequestHandler.mock.calls[0][0] as (...all: unknown[]) => void)({}, 'geolocation', decide);
    expect(decide).toHaveBeenCalledWith(false);
    expect((setPermissionCheckHandler.mock.calls[0][0] as () => boolean)()).toBe(false);
  });

  it('comes from a scheme of its own, with the policy, and only from its folder', async () => {
    writeFileSync(join(folder, 'index.html'), '<!doctype html>');
    registerScheme();
    expect(electron.protocol.registerSchemesAsPrivileged.mock.calls[0][0]).toMatchObject([{ scheme: 'joulewright' }]);
    serveScheme(folder);
    const [, handler] = electron.protocol.handle.mock.calls[0] as [string, (asked: object) => Promise<Response>];
    const page = await handler({ url: windowAddress, method: 'GET' });
    expect([page.status, page.headers.get('content-security-policy')?.includes("default-src 'none'")]).toEqual([
      200,
      true,
    ]);
    expect((await handler({ url: 'joulewright://elsewhere/', method: 'GET' })).status).toBe(404);
    expect((await handler({ url: windowAddress, method: 'POST' })).status).toBe(404);
    expect((await handler({ url: `${windowAddress}..%2fpackage.json`, method: 'GET' })).status).toBe(404);
  });

  it('opens what is chosen in the dialog, and nothing when it is cancelled', async () => {
    expect(await chooseFile({} as never)).toBeNull();
    writeFileSync(join(folder, 'feed.json'), '{}');
    electron.dialog.showOpenDialog.mockResolvedValueOnce({ canceled: false, filePaths: [join(folder, 'feed.json')] });
    expect(await chooseFile({} as never)).toEqual({ name: 'feed.json', text: '{}', size: 2 });
    electron.BrowserWindow.fromWebContents.mockReturnValueOnce(null);
    expect(await chooseFile({} as never)).toBeNull();
  });

  it('gives the page two calls and nothing else', async () => {
    await import('../../../main/preload.js');
    const [name, bridge] = electron.contextBridge.exposeInMainWorld.mock.calls[0] as [string, Record<string, () => unknown>]; // prettier-ignore
    expect([name, Object.keys(bridge)]).toEqual(['joulewright', ['openFile', 'givenFile']]);
    await bridge.openFile();
    expect(electron.ipcRenderer.invoke).toHaveBeenCalledWith(channels.openFile);
  });

  it('has a system menu only where the system cannot do without', () => {
    expect(menuTemplate('linux')).toBeNull();
    expect(menuTemplate('darwin')?.map(({ role }) => role)).toEqual(['appMenu', 'editMenu', 'windowMenu']);
  });
});
