import { describe, expect, it } from 'vitest';
import { moment, openWindow, runExample, useWindow } from './support/window.js';

useWindow();

/** What has the focus, in words. */
const focused = () =>
  document.activeElement?.getAttribute('aria-label') ?? document.activeElement?.textContent?.trim() ?? '';

describe('the keyboard', () => {
  it('goes from the empty sheet to a station of a run without a pointer', async () => {
    const page = await openWindow();
    for (let i = 0; i < 30; i++) {
      await page.keyboard.press('Tab');
      if ((await page.evaluate(focused)).startsWith('Gravity crate feed')) break;
    }
    expect(await page.evaluate(focused)).toMatch(/^Gravity crate feed/);
    await page.keyboard.press('Enter');
    await page.getByRole('img', { name: /Drawing of Gravity/ }).waitFor();
    await page.keyboard.press('F5');
    await page.getByRole('button', { name: 'Run again' }).waitFor({ timeout: 50_000 });

    await page.keyboard.press('1');
    expect(await moment(page)).toBe(0);
    await page.keyboard.press('.');
    const tick = await moment(page);
    expect(tick).toBeGreaterThan(0);
    await page.keyboard.press(',');
    expect(await moment(page)).toBe(0);
    await page.keyboard.press('2');
    expect(await moment(page)).toBeCloseTo(1.168, 2);
    await page.keyboard.press('1');
    await page.keyboard.press(' ');
    await expect.poll(() => moment(page)).toBeGreaterThan(0);
    await page.keyboard.press(' ');
    await page.keyboard.press('F2');
    await page.getByRole('region', { name: 'Item card' }).waitFor();
    await page.keyboard.press('F3');
    await page.getByRole('region', { name: 'Paid out' }).waitFor();
  });

  it('works the menus with arrows, and Esc gives the focus back', async () => {
    const page = await openWindow();
    await page.getByRole('menuitem', { name: 'File' }).focus();
    await page.keyboard.press('ArrowDown');
    await expect.poll(() => page.evaluate(focused)).toMatch(/^Open/);
    await page.keyboard.press('ArrowRight');
    await expect.poll(() => page.evaluate(() => document.activeElement?.closest('[role="menu"]')?.getAttribute('aria-label'))).not.toBe('File'); // prettier-ignore
    await page.keyboard.press('Escape');
    expect(await page.getByRole('menu').count()).toBe(0);
    expect(await page.evaluate(() => document.activeElement?.getAttribute('role'))).toBe('menuitem');
  });

  it('opens the folded key with K on a small window, and closes it again', async () => {
    const page = await openWindow({ width: 1280, height: 720 });
    await page.getByRole('button', { name: /Gravity crate feed/ }).click();
    await page.keyboard.press('k');
    await page.getByRole('heading', { name: 'Key' }).waitFor();
    await page.keyboard.press('k');
    await expect.poll(() => page.getByRole('heading', { name: 'Key' }).count()).toBe(0);
  });

  it('reaches every control by Tab, each with a visible focus', async () => {
    const page = await openWindow();
    await runExample(page, 'gravity-feed');
    const reached = new Set<string>();
    for (let i = 0; i < 120; i++) {
      await page.keyboard.press('Tab');
      const found = await page.evaluate(() => {
        const element = document.activeElement;
        if (!element || element === document.body) return null;
        const holder = element.matches('input, select') ? element.closest('label') : element;
        const isOutlined = (each: Element | null) => each !== null && getComputedStyle(each).outlineStyle !== 'none';
        const name = element.getAttribute('aria-label') ?? element.textContent?.trim() ?? '';
        return {
          name: name || (element.closest('label')?.textContent?.trim() ?? ''),
          visible: isOutlined(element) || isOutlined(holder),
        };
      });
      if (!found) continue;
      expect(found.visible, `focus on “${found.name}”`).toBe(true);
      reached.add(found.name.replaceAll(/\s+/g, ' '));
    }
    for (const name of ['Moment of the run', 'Feed Space', 'On a tick .', 'Run again F5', 'Go to station 2'])
      expect([...reached], name).toContain(name);
    expect([...reached].some((name) => name.startsWith('Trail'))).toBe(true);
    expect([...reached].some((name) => name.includes('Friction'))).toBe(true);
  });

  it('opens help on F1, and Esc closes it without halting or feeding anything', async () => {
    const page = await openWindow();
    await page.keyboard.press('F1');
    await page.getByRole('heading', { name: 'How to read the account' }).waitFor();
    await page.keyboard.press('Escape');
    await expect.poll(() => page.getByRole('dialog').count()).toBe(0);
  });
});
