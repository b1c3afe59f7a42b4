import type { WindowBridge } from '../../main/ipc/contract.js';
import type { OpenedFile } from '../state/workbench.svelte.js';

declare global {
  interface Window {
    /** Present in the program, absent in a browser. */
    joulewright?: WindowBridge;
  }
}

/** Lets a file be chosen: by the program's own dialog, or by the browser's. Null when nothing was chosen. */
export async function chooseFile(): Promise<OpenedFile | null> {
  const bridge = window.joulewright;
  if (bridge) return bridge.openFile();
  const file = await pickInBrowser();
  return file && readFile(file);
}

/** The file that the program was started with; null when there was none. */
export async function givenFile(): Promise<OpenedFile | null> {
  if (window.joulewright) return window.joulewright.givenFile();
  const response = await fetch('./given-file.json').catch(() => null);
  return response?.ok ? ((await response.json()) as OpenedFile | null) : null;
}

export async function readFile(file: File): Promise<OpenedFile> {
  return { name: file.name, text: await file.text(), size: file.size };
}

function pickInBrowser(): Promise<File | null> {
  const input = document.getElementById('file-input');
  if (!(input instanceof HTMLInputElement)) return Promise.resolve(null);
  return new Promise((resolve) => {
    input.value = '';
    input.addEventListener('change', () => resolve(input.files?.[0] ?? null), { once: true });
    input.addEventListener('cancel', () => resolve(null), { once: true });
    input.click();
  });
}
