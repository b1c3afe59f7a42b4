import { describe, expect, it } from 'vitest';
import { dropFile, example, inkShare, openWindow, openWithoutWebGl, useWindow } from './support/window.js';

useWindow();

const wrong = {
  name: 'wrong.json',
  text: JSON.stringify({
    format: 'joulewright/1',
    title: 'Wrong in three places',
    bodies: [{ id: 'block', shape: { kind: 'box', width: '3 kg', height: '1 m' }, mass: '-2 kg', at: [0, 0] }],
    springs: [
      {
        id: 's',
        kind: 'linear',
        between: [
          { of: 'nobody', at: [0, 0] },
          { of: 'block', at: [1, 0] },
        ],
        rate: 10,
      },
    ],
    run: { until: '1 s' },
  }),
};

describe('opening a file', () => {
  it('lists the demos on an empty sheet, and a click puts one on it', async () => {
    const page = await openWindow();
    const rows = page.getByRole('table').getByRole('button');
    expect(await rows.count()).toBeGreaterThanOrEqual(6);
    await page.getByRole('button', { name: /Gravity crate feed/ }).click();
    await page.getByRole('img', { name: /Drawing of Gravity crate feed/ }).waitFor();
    expect(await page.title()).toContain('Gravity crate feed');
  });

  it('asks for a file on Ctrl+O and shows its drawing, parts and title block', async () => {
    const page = await openWindow();
    const choosing = page.waitForEvent('filechooser');
    // The browser is told to hand over the dialog, and must have heard it before the key.
    await page.evaluate(() => document.title);
    await page.keyboard.press('Control+o');
    const { name, text } = example('slider-crank-press');
    await (await choosing).setFiles({ name, mimeType: 'application/json', buffer: Buffer.from(text) });
    await page.getByRole('img', { name: /Drawing of Lid press/ }).waitFor();
    const parts = page.getByRole('region', { name: 'Parts list' });
    await expect.poll(() => parts.getByRole('button').count()).toBe(9);
    expect(await page.getByRole('region', { name: 'Title block' }).textContent()).toContain('NW 0352');
    expect(await inkShare(page, '.paper')).toBeGreaterThan(0.003);
  });

  it('opens a file that is dropped on the sheet, and another one after it', async () => {
    const page = await openWindow();
    await dropFile(page, example('hammer-latch'));
    await page.getByRole('img', { name: /Drawing of Date-stamp hammer/ }).waitFor();
    await dropFile(page, example('belt-feed'));
    await page.getByRole('img', { name: /Drawing of Belt feed/ }).waitFor();
    expect(await page.getByRole('region', { name: 'Item card' }).count()).toBe(1);
  });

  it('chooses in the menu by name, from the list of demos', async () => {
    const page = await openWindow();
    await page.getByRole('menuitem', { name: 'File' }).click();
    await page.getByRole('menuitem', { name: /Drop test/ }).click();
    await page.getByRole('img', { name: /Drawing of Drop test/ }).waitFor();
  });

  it('shows each error of a wrong file with its place, and steps through them', async () => {
    const page = await openWindow();
    await dropFile(page, wrong);
    const problems = page.getByRole('group', { name: 'Problems of the file' });
    await problems.waitFor();
    const seen: string[] = [];
    const count = await problems.getByRole('listitem').count();
    expect(count).toBeGreaterThanOrEqual(3);
    for (let i = 0; i < count; i++) {
      seen.push((await problems.locator('.pointer').textContent()) ?? '');
      expect((await problems.locator('.sentence dd').textContent())?.length).toBeGreaterThan(20);
      await problems.getByRole('button', { name: 'Next problem' }).click();
    }
    expect(seen).toContain('/bodies/0/shape/width');
    expect(seen).toContain('/bodies/0/mass');
    expect(seen).toContain('/springs/0/between/0/of');
    expect(await page.locator('footer').textContent()).toMatch(/1 of \d/);
    expect(await page.getByRole('button', { name: 'Run F5' }).isDisabled()).toBe(true);
  });

  it('says that a text is no JSON, and recovers with the next file', async () => {
    const page = await openWindow();
    await dropFile(page, { name: 'broken.json', text: '{ "format": ' });
    const problems = page.getByRole('group', { name: 'Problems of the file' });
    await problems.waitFor();
    expect(await problems.locator('.sentence dd').textContent()).toMatch(/JSON/);
    await dropFile(page, example('belt-feed'));
    await page.getByRole('img', { name: /Drawing of Belt feed/ }).waitFor();
    expect(await page.getByRole('button', { name: 'Run F5' }).isEnabled()).toBe(true);
  });

  it('shows the last of several files dropped in quick succession', async () => {
    const page = await openWindow();
    for (const name of ['hammer-latch', 'belt-feed', 'gravity-feed']) void dropFile(page, example(name));
    await page.getByRole('img', { name: /Drawing of Gravity crate feed/ }).waitFor();
    await page.waitForTimeout(300);
    expect(await page.title()).toContain('Gravity crate feed');
  });

  it('draws on the 2D canvas of its own accord where there is no WebGL', async () => {
    const page = await openWithoutWebGl();
    await dropFile(page, example('hammer-latch'));
    await page.getByRole('img', { name: /Drawing of Date-stamp hammer/ }).waitFor();
    expect(await page.locator('.field .paper').getAttribute('data-renderer')).toBe('canvas');
    expect(await inkShare(page, '.field .paper')).toBeGreaterThan(0.003);
  });

  it('picks an item on the drawing and shows its card', async () => {
    const page = await openWindow();
    await dropFile(page, example('buffer-drop-test'));
    const parts = page.getByRole('region', { name: 'Parts list' });
    await parts.getByRole('button', { name: 'Buffer spring' }).click();
    const card = page.getByRole('region', { name: 'Item card' });
    expect(await card.textContent()).toContain('N/mm');
    await parts.getByRole('button', { name: 'Buffer spring' }).press('ArrowUp');
    await expect.poll(() => card.getByRole('heading').textContent()).toBe('Oil damper');
  });
});
