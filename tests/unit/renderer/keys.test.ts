import { describe, expect, it } from 'vitest';
import { shortcutOf } from '../../../renderer/commands/keys.js';

const press = (key: string, more: Partial<KeyboardEvent> = {}) =>
  shortcutOf({ key, ctrlKey: false, metaKey: false, altKey: false, ...more });

describe('shortcuts', () => {
  it('are named as the key caps are', () => {
    expect([' ', 'Escape', 'k', 'K', ',', 'F5', '1'].map((key) => press(key))).toEqual(['Space', 'Esc', 'K', 'K', ',', 'F5', '1']); // prettier-ignore
    expect(press('o', { ctrlKey: true })).toBe('Ctrl+O');
    expect(press('o', { metaKey: true })).toBe('Ctrl+O');
    expect(press('F4', { altKey: true })).toBe('Alt+F4');
  });
});
