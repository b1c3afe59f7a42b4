import type { MenuItemConstructorOptions } from 'electron';

/**
 * The system's menu: the window draws its own, so there is one only where the system cannot do without, for quitting and
 * for copy and paste.
 */
export function menuTemplate(platform: NodeJS.Platform): MenuItemConstructorOptions[] | null {
  return platform === 'darwin' ? [{ role: 'appMenu' }, { role: 'editMenu' }, { role: 'windowMenu' }] : null;
}
