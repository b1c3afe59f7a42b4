import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { chromium, type Browser, type Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect } from 'vitest';
import { serveWindow, type ServedWindow } from '../../../main/serve/server.js';
import { chromiumPath } from '../../support/chromium.js';

const root = resolve(import.meta.dirname, '../../..');
const switches = ['--no-sandbox', '--disable-quic', '--no-first-run', '--disable-background-networking'];

export const example = (name: string): { name: string; text: string } => ({
  name: `${name}.json`,
  text: readFileSync(resolve(root, 'assets/examples', `${name}.json`), 'utf8'),
});

export interface WindowOptions {
  width?: number;
  height?: number;
  renderer?: 'webgl' | 'canvas';
  colorScheme?: 'light' | 'dark';
}

let browser: Browser;
/** A browser without WebGL, while a test has one. */
let blind: Browser | null = null;
let served: ServedWindow;
let errors: string[] = [];

/** A browser and a served window for the tests of a file; any error of a page fails the test it happened in. */
export function useWindow(): void {
  beforeAll(async () => {
    served = await serveWindow({ root: resolve(root, 'dist/renderer') });
    browser = await chromium.launch({ executablePath: chromiumPath(), args: switches });
  });
  afterEach(async () => {
    for (const context of browser.contexts()) await context.close();
    await blind?.close();
    blind = null;
    const seen = errors;
    errors = [];
    expect(seen).toEqual([]);
  });
  afterAll(async () => {
    await browser.close();
    await served.close();
  });
}

/** Opens the window in a new page. */
export async function openWindow(options: WindowOptions = {}): Promise<Page> {
  const { width = 1440, height = 900, renderer = 'canvas', colorScheme = 'light' } = options;
  const page = await browser.newPage({ viewport: { width, height }, colorScheme });
  page.on('pageerror', ({ message }) => errors.push(message));
  page.on('console', (message) => {
    if (message.type() === 'error') errors.push(message.text());
  });
  await page.goto(`${served.address}?renderer=${renderer}`);
  await page.locator(`[data-renderer="${renderer}"]`).waitFor();
  return page;
}

/** Opens the window in a browser without WebGL, as on a machine without a graphics driver. */
export async function openWithoutWebGl(): Promise<Page> {
  blind = await chromium.launch({ executablePath: chromiumPath(), args: [...switches, '--disable-3d-apis'] });
  const page = await blind.newPage({ viewport: { width: 1440, height: 900 } });
  page.on('pageerror', ({ message }) => errors.push(message));
  await page.goto(served.address);
  await page.locator('[data-renderer]').waitFor();
  return page;
}

/** Drops a file on the sheet. */
export async function dropFile(page: Page, { name, text }: { name: string; text: string }): Promise<void> {
  await page.evaluate(
    ([fileName, content]) => {
      const data = new DataTransfer();
      data.items.add(new File([content], fileName, { type: 'application/json' }));
      const event = new DragEvent('drop', { dataTransfer: data, bubbles: true, cancelable: true });
      document.querySelector('main')?.dispatchEvent(event);
    },
    [name, text] as const,
  );
}

/** Drops an example, runs it, and waits until both solvers are done. */
export async function runExample(page: Page, name: string): Promise<void> {
  await dropFile(page, example(name));
  await runIt(page);
}

/** Runs what is on the sheet, and waits until both solvers are done. */
export async function runIt(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Run F5' }).click();
  await page.getByRole('button', { name: 'Run again' }).waitFor({ timeout: 50_000 });
}

/** The printed lines of a side of the account, with their total. */
export async function accountSide(page: Page, side: 'Received' | 'Paid out') {
  const region = page.getByRole('region', { name: side });
  const lines = await region.locator('li button').evaluateAll((buttons) =>
    buttons.map((button) => ({
      name: button.querySelector('.name')?.textContent?.trim() ?? '',
      amount: button.querySelector('.amount')?.textContent?.trim() ?? '',
    })),
  );
  const total = await region.getByRole('status').textContent();
  return { lines, total: total?.trim() ?? '' };
}

/** Share of the pixels of a part of the page that differ clearly from its most frequent colour, 0 to 1. */
export async function inkShare(page: Page, selector: string): Promise<number> {
  const picture = await page.locator(selector).screenshot();
  return page.evaluate(async (base64) => {
    const response = await fetch(`data:image/png;base64,${base64}`);
    const bitmap = await createImageBitmap(await response.blob());
    const canvas = new OffscreenCanvas(bitmap.width, bitmap.height);
    const context = canvas.getContext('2d');
    context?.drawImage(bitmap, 0, 0);
    const data = context?.getImageData(0, 0, bitmap.width, bitmap.height).data ?? new Uint8ClampedArray();
    const counts = new Map<number, number>();
    for (let i = 0; i < data.length; i += 4) {
      const colour = (data[i] << 16) | (data[i + 1] << 8) | data[i + 2];
      counts.set(colour, (counts.get(colour) ?? 0) + 1);
    }
    const [[ground]] = [...counts].sort((a, b) => b[1] - a[1]);
    const channel = (colour: number, shift: number) => (colour >> shift) & 255;
    let ink = 0;
    for (const [colour, count] of counts)
      if ([16, 8, 0].some((shift) => Math.abs(channel(colour, shift) - channel(ground, shift)) > 60)) ink += count;
    return ink / (data.length / 4);
  }, picture.toString('base64'));
}

/** The moment that the recorder's cursor is at [s]. */
export async function moment(page: Page): Promise<number> {
  const value = await page.getByRole('slider', { name: 'Moment of the run' }).getAttribute('aria-valuenow');
  return Number(value);
}
