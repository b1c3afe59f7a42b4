import { getContext, setContext } from 'svelte';
import type { Commands } from './commands.js';

const key = Symbol('commands');

export function provideCommands(commands: Commands): void {
  setContext(key, commands);
}

export function useCommands(): Commands {
  return getContext<Commands>(key);
}
