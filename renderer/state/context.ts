import { getContext, setContext } from 'svelte';
import type { Workbench } from './workbench.svelte.js';

const key = Symbol('workbench');

export function provideWorkbench(bench: Workbench): void {
  setContext(key, bench);
}

export function useWorkbench(): Workbench {
  return getContext<Workbench>(key);
}
