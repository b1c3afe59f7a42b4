import { describe, expect, it } from 'vitest';
import {
  accountSide,
  dropFile,
  example,
  inkShare,
  moment,
  openWindow,
  runExample,
  useWindow,
} from './support/window.js';

useWindow();

/** Thousandths of the unit printed, as whole numbers, so that sums are exact. */
const thousandths = (printed: string) => Math.round(Number(printed.replace('−', '-')) * 1000);

describe.each(['webgl', 'canvas'] as const)('a run on the %s renderer', (renderer) => {
  it('draws the mechanism, runs it, and prints an account whose sides add up on every page', async () => {
    const page = await openWindow({ renderer });
    await runExample(page, 'gravity-feed');
    expect(await inkShare(page, '.field .paper')).toBeGreaterThan(0.005);
    const pages = page.getByRole('group', { name: 'Pages' }).getByRole('button');
    const count = await pages.count();
    expect(count).toBeGreaterThanOrEqual(3);
    const totals: string[] = [];
    for (let i = 0; i < count; i++) {
      await pages.nth(i).click();
      const [received, paidOut] = [await accountSide(page, 'Received'), await accountSide(page, 'Paid out')];
      for (const { lines, total } of [received, paidOut]) {
        const sum = lines.reduce((all, { amount }) => all + thousandths(amount), 0);
        expect(sum, `page ${i + 1}: ${JSON.stringify(lines)}`).toBe(thousandths(total));
      }
      expect(received.total).toBe(paidOut.total);
      totals.push(received.total);
    }
    expect(new Set(totals).size).toBeGreaterThan(1);
  });

  it('moves the mechanism with the moment: scrubbed, stepped, and fed', async () => {
    const page = await openWindow({ renderer });
    await runExample(page, 'gravity-feed');
    const slider = page.getByRole('slider', { name: 'Moment of the run' });
    const box = (await slider.boundingBox())!;
    const picture = () => page.locator('.field .paper').screenshot();
    await page.mouse.click(box.x + box.width * 0.2, box.y + box.height * 0.5);
    const [early, at] = [await picture(), await moment(page)];
    expect(at).toBeGreaterThan(0);
    await page.mouse.move(box.x + box.width * 0.2, box.y + box.height * 0.5);
    await page.mouse.down();
    await page.mouse.move(box.x + box.width * 0.4, box.y + box.height * 0.5, { steps: 4 });
    await page.mouse.up();
    const later = await moment(page);
    expect(later).toBeGreaterThan(at);
    expect((await picture()).equals(early)).toBe(false);

    await page.getByRole('button', { name: 'On a tick' }).click();
    const stepped = await moment(page);
    expect(stepped).toBeGreaterThan(later);
    expect(stepped - later).toBeLessThan(0.02);
    await page.getByRole('button', { name: 'Back a tick' }).click();
    expect(await moment(page)).toBeLessThan(stepped);

    await page.getByRole('button', { name: 'Feed' }).click();
    await expect.poll(() => moment(page)).toBeGreaterThan(later + 0.02);
    await page.getByRole('button', { name: 'Stop Space' }).click();
    const stopped = await moment(page);
    await page.waitForTimeout(150);
    expect(await moment(page)).toBe(stopped);
  });
});

describe('the account', () => {
  it('follows two chosen stations, in whichever order they are chosen', async () => {
    const page = await openWindow();
    await runExample(page, 'gravity-feed');
    const before = await accountSide(page, 'Paid out');
    await page.getByRole('combobox', { name: 'To station' }).selectOption('3');
    const toThird = await accountSide(page, 'Paid out');
    expect(toThird.lines).not.toEqual(before.lines);
    await page.getByRole('combobox', { name: 'From station' }).selectOption('2');
    const pressed = page.getByRole('group', { name: 'Pages' }).locator('[aria-pressed="true"]');
    await expect.poll(async () => (await pressed.textContent())?.replaceAll(/\s/g, '')).toBe('23');
    const second = await accountSide(page, 'Received');
    const carried = before.lines.find(({ name }) => name.startsWith('Carried'))?.amount;
    expect(second.lines[0]).toEqual({ name: 'Brought forward', amount: carried });
  });

  it('marks a picked entry in its row, and the note line tells its zone and its time', async () => {
    const page = await openWindow();
    await runExample(page, 'gravity-feed');
    const entry = page.getByRole('region', { name: 'Paid out' }).getByRole('button', { name: /Friction .*R 500/ });
    await entry.click();
    expect(await entry.getAttribute('aria-pressed')).toBe('true');
    const note = (await page.locator('footer').textContent()) ?? '';
    expect(note).toMatch(/Friction 1\/4 R 500: 2\.\d{3} J, zone [A-H]\d+, from \d\.\d{3} s to \d\.\d{3} s/);
    await page.getByRole('region', { name: 'Entry' }).waitFor();
    await entry.click();
    expect(await entry.getAttribute('aria-pressed')).toBe('false');
  });

  it('has nothing unbooked, in the title block', async () => {
    const page = await openWindow();
    await runExample(page, 'gravity-feed');
    const block = (await page.getByRole('region', { name: 'Title block' }).textContent()) ?? '';
    expect(block).toMatch(/Unbooked\s*0\.000 J/);
  });
});

describe('running', () => {
  const endless = () => {
    const { name, text } = example('slider-crank-press');
    return {
      name,
      text: JSON.stringify({ ...(JSON.parse(text) as object), run: { until: '600 s', step: '0.0001 s' } }),
    };
  };

  it('shows the pen at work, halts on Esc, and keeps what was recorded', async () => {
    const page = await openWindow();
    await dropFile(page, endless());
    await page.getByRole('button', { name: 'Run F5' }).click();
    await expect.poll(() => page.locator('footer').textContent()).toMatch(/Recording: 0\.[1-9]\d* s/);
    await page.keyboard.press('Escape');
    await expect.poll(() => page.getByRole('toolbar', { name: 'Recorder' }).textContent()).toMatch(/halted/);
    expect(await page.getByRole('button', { name: 'Run again' }).isEnabled()).toBe(true);
    await page.getByRole('region', { name: 'Paid out' }).waitFor();
  });

  it('counts its runs, and the same document gives the same account again', async () => {
    const page = await openWindow();
    await runExample(page, 'buffer-drop-test');
    const first = await accountSide(page, 'Paid out');
    await page.keyboard.press('F5');
    await page.getByRole('button', { name: 'Sheet 2 Run 2' }).waitFor();
    await page.getByRole('button', { name: 'Run again' }).waitFor({ timeout: 50_000 });
    expect(await accountSide(page, 'Paid out')).toEqual(first);
  });
});
