import { spawn } from 'node:child_process';

/** The command that opens an address in the default browser; null where there is no screen to open it on. */
export function browserCommand(
  address: string,
  platform: NodeJS.Platform,
  environment: Readonly<Record<string, string | undefined>>,
): [command: string, ...words: string[]] | null {
  if (platform === 'darwin') return ['open', address];
  if (platform === 'win32') return ['cmd', '/c', 'start', '', address];
  const hasScreen = environment.DISPLAY !== undefined || environment.WAYLAND_DISPLAY !== undefined;
  return hasScreen ? ['xdg-open', address] : null;
}

/** Opens an address in the default browser; resolves to whether that was possible. */
export function openBrowser(address: string): Promise<boolean> {
  const found = browserCommand(address, process.platform, process.env);
  if (found === null) return Promise.resolve(false);
  const [command, ...words] = found;
  return new Promise((resolve) => {
    const child = spawn(command, words, { stdio: 'ignore', detached: true });
    child.once('error', () => resolve(false));
    child.once('spawn', () => {
      child.unref();
      resolve(true);
    });
  });
}
