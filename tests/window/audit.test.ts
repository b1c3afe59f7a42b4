import { describe, expect, it } from 'vitest';
import type { Page } from 'playwright-core';
import { dropFile, example, moment, openWindow, runExample, runIt, useWindow } from './support/window.js';

useWindow();

const block = (page: Page) => page.getByRole('region', { name: 'Title block' });
const auditor = (page: Page) => page.getByRole('region', { name: 'Auditor' });
const verdict = (page: Page) => block(page).locator('[data-verdict]').getAttribute('data-verdict');
const text = async (page: Page, name: string) =>
  ((await page.getByRole('region', { name }).textContent()) ?? '').replaceAll(/\s+/g, ' ');

/** An example, with a member of its `run` set. */
function exampleWith(name: string, run: Record<string, unknown>) {
  const file = example(name);
  const document = JSON.parse(file.text) as { run: object };
  return { ...file, text: JSON.stringify({ ...document, run: { ...document.run, ...run } }) };
}

const wheel = { id: 'wheel', name: 'Wheel', shape: { kind: 'disc', radius: '0.1 m' }, mass: '2 kg', at: [0, 0] };
const axle = { id: 'axle', kind: 'pin', between: ['wheel', 'ground'], at: [0, 0] };
const stations = [
  { id: '1', when: { start: true } },
  { id: '2', when: { end: true } },
];
const documentOf = (parts: object) => ({
  name: 'parts.json',
  text: JSON.stringify({ format: 'joulewright/1', title: 'Parts', stations, run: { until: '0.2 s' }, ...parts }),
});

describe.each(['webgl', 'canvas'] as const)('two solvers that agree, on the %s renderer', (renderer) => {
  it('have the equals sign, a bound on the difference, and ticks beside the entries', async () => {
    const page = await openWindow({ renderer });
    await runExample(page, 'gravity-feed');
    expect(await verdict(page)).toBe('agrees');
    const said = await text(page, 'Title block');
    const bound = Number(/Agrees within (\d+\.?\d*) %/.exec(said)?.[1]);
    expect(bound).toBeGreaterThan(0);
    expect(bound).toBeLessThanOrEqual(0.5);
    const account = page.getByRole('region', { name: 'Account' });
    const gravity = account.getByRole('button', { name: /Gravity/ });
    expect(await gravity.getByRole('img', { name: 'ticked' }).count()).toBe(1);
    expect(await account.getByRole('img', { name: 'differs' }).count()).toBe(0);
    expect(
      await account
        .getByRole('button', { name: /Numerical/ })
        .getByRole('img')
        .count(),
    ).toBe(0);
  });
});

describe('the auditor', () => {
  it('shows the entry that differs most in both runs, with what is unbooked of both', async () => {
    const page = await openWindow();
    await runExample(page, 'gravity-feed');
    const said = await text(page, 'Auditor');
    const [, first, second] = /(\d\.\d{4}) against (\d\.\d{4}) J/.exec(said) ?? [];
    expect(Math.abs(Number(first) - Number(second))).toBeLessThan(0.005 * Number(first));
    expect(said).toContain('Unbooked 0.0000 and 0.0000 J');
  });

  it('says its verdict where a screen reader hears it, once both runs are in', async () => {
    const page = await openWindow();
    await runExample(page, 'spring-return-carriage');
    const live = block(page).locator('[aria-live="polite"]');
    expect(await live.textContent()).toMatch(/Verdict\s*Agrees within/);
  });

  it('shows how far it is in the note line, and Esc halts it with the stepper', async () => {
    const page = await openWindow();
    await dropFile(page, exampleWith('slider-crank-press', { until: '600 s', step: '0.0001 s' }));
    await page.getByRole('button', { name: 'Run F5' }).click();
    await expect.poll(() => page.locator('footer').textContent()).toMatch(/auditor: \d+\.\d{3} s of at most/);
    await page.keyboard.press('Escape');
    await page.getByRole('button', { name: 'Run again' }).waitFor();
    expect(await verdict(page)).toBe('unaudited');
    expect(await text(page, 'Title block')).toContain('halted');
  });
});

describe('two runs that part', () => {
  const coarse = exampleWith('gravity-feed', { step: '0.02 s' });

  it('have the unequal sign, and open the account at the entry that parts most', async () => {
    const page = await openWindow();
    await dropFile(page, coarse);
    await runIt(page);
    expect(await verdict(page)).toBe('differs');
    expect(await text(page, 'Title block')).toMatch(/Differs by [\d.]+ %\s*from station 2 on/);
    const picked = page.getByRole('region', { name: 'Account' }).locator('button[aria-pressed="true"] .name');
    expect(await picked.allTextContents()).toEqual([expect.stringMatching(/Friction 1\/4/)]);
    expect(await page.getByRole('region', { name: 'Account' }).getByRole('img', { name: 'differs' }).count()).toBeGreaterThan(0); // prettier-ignore
    expect(await text(page, 'Findings')).toMatch(/The runs part at station 2.*Take a smaller step/);
  });

  it('go to the station where they part when the verdict is pressed, by pointer or by key', async () => {
    const page = await openWindow();
    await dropFile(page, coarse);
    await runIt(page);
    const parting = await moment(page);
    for (const press of [
      (name: RegExp) => block(page).getByRole('button', { name }).click(),
      (name: RegExp) => block(page).getByRole('button', { name }).press('Enter'),
    ]) {
      // prettier-ignore
      await page.keyboard.press('5');
      expect(await moment(page)).toBeGreaterThan(parting + 1);
      await press(/Differs/);
      expect(await moment(page)).toBe(parting);
    }
    await page.keyboard.press('5');
    await auditor(page)
      .getByRole('button', { name: /The runs part at station/ })
      .click();
    expect(await moment(page)).toBe(parting);
  });
});

describe('a mechanism with what is not audited yet', () => {
  it('has the dashed box, with the element that is why, and the next file is audited', async () => {
    const page = await openWindow();
    const other = { ...wheel, id: 'other', at: ['0.2 m', 0] };
    const gear = { id: 'mesh', name: 'Mesh', kind: 'gear', joints: ['axle', 'axle-2'], ratio: -1 };
    const second = { ...axle, id: 'axle-2', between: ['other', 'ground'], at: ['0.2 m', 0] };
    await dropFile(page, documentOf({ bodies: [wheel, other], joints: [axle, second, gear] }));
    await runIt(page);
    expect(await verdict(page)).toBe('unaudited');
    expect(await block(page).locator('[data-verdict] rect').getAttribute('stroke-dasharray')).not.toBeNull();
    expect(await text(page, 'Title block')).toMatch(/Unaudited\s*not audited yet: item \d Mesh/);
    expect(await text(page, 'Auditor')).toMatch(/gear "mesh" is not audited yet/);
    expect(await text(page, 'Findings')).toMatch(/not audited yet/);
    await runExample(page, 'stacked-crates');
    expect(await verdict(page)).toBe('agrees');
  });
});

describe('criteria', () => {
  it('stand on the title block with their values, limits and outcomes in words, on either sheet', async () => {
    const page = await openWindow();
    await dropFile(page, example('gravity-feed'));
    await page.getByRole('region', { name: 'Criteria' }).waitFor();
    expect(await text(page, 'Criteria')).toMatch(/3 set, not run.*Q1.*–\s*≤ 2.2\s*not run/);
    await runIt(page);
    for (const sheet of ['F2', 'F3']) {
      await page.keyboard.press(sheet);
      const said = await text(page, 'Criteria');
      expect(said).toMatch(/3 of 3 pass, run 1, by the auditor/);
      expect(said).toMatch(/Q1\s*Approach speed at the plate\s*1\.981 m\/s\s*≤ 2\.2\s*pass/);
      expect(said).toMatch(/Q2\s*Peak force on the stop\s*184\.8 N\s*≤ 220\s*pass/);
      expect(said).toMatch(/Q3\s*Spring travel\s*71\.25 mm\s*≤ 90\s*pass/);
    }
    await page.getByRole('button', { name: 'Peak force on the stop' }).click();
    expect(await moment(page)).toBeCloseTo(1.232, 2);
  });

  it('say fail, with a cross, where the limit is not kept', async () => {
    const page = await openWindow();
    const file = example('gravity-feed');
    await dropFile(page, { ...file, text: file.text.replace('220 N', '180 N') });
    await runIt(page);
    expect(await text(page, 'Criteria')).toMatch(/2 of 3 pass.*184\.8 N\s*≤ 180\s*fail/);
  });
});

describe('the hand check', () => {
  it('is typeset under the account, with its plain text for a screen reader and its difference from the run', async () => {
    const page = await openWindow();
    await runExample(page, 'gravity-feed');
    const hand = page.getByRole('region', { name: 'Hand check' });
    expect(await hand.locator('.visually-hidden').first().textContent()).toMatch(/^½ m v₂² = m g h − /);
    expect(await text(page, 'Hand check')).toMatch(/= 1\.981 m\/s/);
    expect(await text(page, 'Hand check')).toMatch(/difference −?0\.000\d m\/s/);
    const italic = hand.locator('[aria-hidden="true"] .symbol').first();
    expect(await italic.evaluate((element) => getComputedStyle(element).fontFamily)).toMatch(/^"STIX Two Text"/);
    expect(await hand.locator('p').count()).toBe(3);
    await hand.getByRole('button', { name: 'all lines' }).click();
    expect(await text(page, 'Hand check')).toContain('where m = 4.2 kg');
    await hand.getByRole('button', { name: /item 2/ }).click();
    expect(await text(page, 'Hand check')).toContain('it does not move');
  });

  it('says why not, where no sum can be made by hand', async () => {
    const page = await openWindow();
    await runExample(page, 'slider-crank-press');
    expect(await text(page, 'Hand check')).toMatch(/No hand sum: .* link of a mechanism of several links/);
  });
});

describe('at 1280 × 720', () => {
  it('verdict, auditor, criteria and note line are whole, whatever the verdict', async () => {
    const page = await openWindow({ width: 1280, height: 720 });
    for (const file of [example('slider-crank-press'), exampleWith('gravity-feed', { step: '0.02 s' })]) {
      await dropFile(page, file);
      await runIt(page);
      for (const part of ['Title block', 'Auditor', 'Criteria']) {
        const region = page.getByRole('region', { name: part });
        const box = (await region.boundingBox())!;
        expect(box.y + box.height, part).toBeLessThanOrEqual(700);
        expect(
          await region.evaluate((element) => element.scrollHeight - element.clientHeight),
          part,
        ).toBeLessThanOrEqual(1);
      }
      const word = block(page).locator('.word');
      expect(await word.evaluate((element) => element.scrollWidth - element.clientWidth)).toBeLessThanOrEqual(0);
      expect(await page.locator('footer').isVisible()).toBe(true);
    }
  });
});
