import type { OpenedFile } from '../state/workbench.svelte.js';

/** A mechanism that comes with the program. */
export interface Demo extends OpenedFile {
  title: string;
  drawingNumber: string;
}

const texts = import.meta.glob<string>('../../assets/examples/*.json', {
  query: '?raw',
  import: 'default',
  eager: true,
});

export const demos: readonly Demo[] = Object.entries(texts)
  .map(([path, text]) => demoOf(path.slice(path.lastIndexOf('/') + 1), text))
  .sort((a, b) => a.drawingNumber.localeCompare(b.drawingNumber) || a.title.localeCompare(b.title));

function demoOf(name: string, text: string): Demo {
  const document = JSON.parse(text) as { title?: string; sheet?: { drawingNumber?: string } };
  return {
    name,
    text,
    size: text.length,
    title: document.title ?? name,
    drawingNumber: document.sheet?.drawingNumber ?? '',
  };
}
