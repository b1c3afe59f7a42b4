import { describe, expect, it } from 'vitest';
import type { Page } from 'playwright-core';
import { contrast } from '../../sim/drawing/palette.js';
import { openWindow, runExample, useWindow } from './support/window.js';

useWindow();

const sizes = [
  [1280, 720],
  [1440, 900],
  [1920, 1080],
] as const;

/** Elements that reach beyond the window, and lines of text that are cut off without an ellipsis. */
const overflowing = () =>
  [...document.querySelectorAll<HTMLElement>('.desk *')]
    .filter((element) => {
      const { right, bottom, width, height } = element.getBoundingClientRect();
      const hidden = width === 0 || height === 0 || element.closest('.visually-hidden, dialog:not([open])');
      const scrolled = element.closest('.rows, .key, .over, .upper, .notes, ol');
      return !hidden && !scrolled && (right > innerWidth + 1 || bottom > innerHeight + 1);
    })
    .map((element) => `${element.tagName}.${element.getAttribute('class') ?? ''}`);

/** Fields of the sheet that must not lie over each other. */
async function fields(page: Page) {
  const names = ['.field', '.recorder', '.note', '.column', '.key, .spine'];
  return Promise.all(
    names.map(async (name) => ({
      name,
      ...(await page.locator(`main > ${name}`.replace(', ', ', main > ')).first().boundingBox())!,
    })),
  );
}

describe.each(sizes)('at %i × %i', (width, height) => {
  it('nothing reaches beyond the window, and no field lies over another, on either sheet', async () => {
    const page = await openWindow({ width, height });
    await runExample(page, 'gravity-feed');
    for (const sheet of ['F3', 'F2']) {
      await page.keyboard.press(sheet);
      expect(await page.evaluate(overflowing)).toEqual([]);
      expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBe(width);
      const boxes = await fields(page);
      for (const a of boxes)
        for (const b of boxes) {
          if (a === b) continue;
          const overlapX = Math.min(a.x + a.width, b.x + b.width) - Math.max(a.x, b.x);
          const overlapY = Math.min(a.y + a.height, b.y + b.height) - Math.max(a.y, b.y);
          expect(Math.min(overlapX, overlapY), `${a.name} over ${b.name}`).toBeLessThanOrEqual(1);
        }
    }
  });

  it('the mechanism, the title block and the verdict stand still between the sheets', async () => {
    const page = await openWindow({ width, height });
    await runExample(page, 'gravity-feed');
    const place = async () => {
      const block = await page.getByRole('region', { name: 'Title block' }).boundingBox();
      const ruler = await page.locator('svg.x text').evaluateAll((texts) => texts.map((text) => [text.textContent, text.getBoundingClientRect().x])); // prettier-ignore
      return { block, ruler };
    };
    const onRun = await place();
    await page.keyboard.press('F2');
    expect(await place()).toEqual(onRun);
  });

  it('the recorder takes at most a third of the height, and the title column keeps its width', async () => {
    const page = await openWindow({ width, height });
    await runExample(page, 'gravity-feed');
    const recorder = (await page.locator('.recorder').boundingBox())!;
    expect(recorder.height).toBeLessThanOrEqual(height / 3 + 1);
    const column = (await page.locator('.column').boundingBox())!;
    expect(Math.round(column.width)).toBe(width < 1360 ? 372 : 420);
  });
});

/** Colour of each text and of the ground it stands on. */
const textColours = () => {
  const rgb = (text: string) => text.match(/[\d.]+/g)?.map(Number) ?? [];
  const hex = ([r, g, b]: number[]) =>
    `#${[r, g, b].map((value) => Math.round(value).toString(16).padStart(2, '0')).join('')}`;
  const groundOf = (element: Element | null): string => {
    for (let each = element; each; each = each.parentElement) {
      const channels = rgb(getComputedStyle(each).backgroundColor);
      if (channels.length >= 3 && (channels[3] ?? 1) === 1) return hex(channels);
    }
    return '#ffffff';
  };
  return [...document.querySelectorAll<HTMLElement>('.desk *')]
    .filter((element) => !element.closest('svg, select, .visually-hidden, dialog:not([open])'))
    .filter((element) => [...element.childNodes].some((node) => node.nodeType === 3 && node.textContent?.trim()))
    .map((element) => ({
      text: element.textContent?.trim().slice(0, 40) ?? '',
      size: parseFloat(getComputedStyle(element).fontSize),
      ink: hex(rgb(getComputedStyle(element).color)),
      ground: groundOf(element),
    }));
};

describe.each(['light', 'dark'] as const)('in %s', (colorScheme) => {
  it('follows the system, and every text stands out from its ground by 4.5 : 1 and is at least 11 px', async () => {
    const page = await openWindow({ colorScheme });
    await runExample(page, 'gravity-feed');
    expect(await page.evaluate(() => document.documentElement.dataset.theme)).toBe(colorScheme);
    await page
      .getByRole('region', { name: 'Paid out' })
      .getByRole('button', { name: /Friction/ })
      .first()
      .click();
    for (const sheet of ['F3', 'F2']) {
      await page.keyboard.press(sheet);
      const texts = await page.evaluate(textColours);
      expect(texts.length).toBeGreaterThan(40);
      for (const { text, ink, ground, size } of texts) {
        expect(contrast(ink, ground), `“${text}” ${ink} on ${ground}`).toBeGreaterThanOrEqual(4.5);
        expect(size, text).toBeGreaterThanOrEqual(11);
      }
    }
  });
});

describe('the theme', () => {
  it('is chosen in the View menu, kept for the next time, and given back to the system', async () => {
    const page = await openWindow({ colorScheme: 'light' });
    const theme = () => page.evaluate(() => document.documentElement.dataset.theme);
    const choose = async (name: string) => {
      await page.getByRole('menuitem', { name: 'View' }).click();
      await page.getByRole('menuitemcheckbox', { name }).click();
    };
    await choose('Dark');
    await expect.poll(theme).toBe('dark');
    await page.reload();
    await expect.poll(theme).toBe('dark');
    await choose('As the system');
    await expect.poll(theme).toBe('light');
    await page.emulateMedia({ colorScheme: 'dark' });
    await expect.poll(theme).toBe('dark');
  });

  it('sets text in the bundled typeface, with symbols in the italic one', async () => {
    const page = await openWindow();
    await runExample(page, 'gravity-feed');
    const loaded = await page.evaluate(() => [...document.fonts].filter(({ status }) => status === 'loaded').map(({ family }) => family)); // prettier-ignore
    expect(loaded.join()).toContain('Sofia Sans Semi Condensed');
    expect(loaded.join()).toContain('STIX Two Text');
  });
});
