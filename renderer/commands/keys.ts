import type { Command } from './command.js';

/** The name of a key press as shortcuts are written: "Ctrl+O", "Space", "F5", "K". */
export function shortcutOf(event: Pick<KeyboardEvent, 'key' | 'ctrlKey' | 'metaKey' | 'altKey'>): string {
  const names: Record<string, string> = { ' ': 'Space', Escape: 'Esc' };
  const key = names[event.key] ?? (event.key.length === 1 ? event.key.toUpperCase() : event.key);
  return event.ctrlKey || event.metaKey ? `Ctrl+${key}` : event.altKey ? `Alt+${key}` : key;
}

/** Elements that take Space, letters or arrows for themselves. */
const takesKeys = 'input, select, textarea, dialog[open], [role="menu"], [role="menubar"]';

/**
 * Runs the command a key press belongs to. A focused button keeps Space for itself, and menus and dialogs keep all keys;
 * the function keys work everywhere.
 */
export function handleKey(event: KeyboardEvent, commands: readonly Command[]): void {
  const shortcut = shortcutOf(event);
  const target = event.target instanceof Element ? event.target : null;
  const isFunctionKey = /^(F\d+|Ctrl\+.+)$/.test(shortcut);
  if (event.defaultPrevented || (!isFunctionKey && target?.closest(takesKeys))) return;
  if (shortcut === 'Space' && target?.closest('button, a')) return;
  const command = commands.find((each) => each.shortcut === shortcut);
  if (!command) return;
  // F5 must not reload the window, whether there is something to run or not.
  event.preventDefault();
  if (command.isEnabled()) command.run();
}
