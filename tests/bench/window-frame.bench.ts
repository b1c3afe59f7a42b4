import { resolve } from 'node:path';
import { chromium, type CDPSession, type Page } from 'playwright-core';
import { serveWindow } from '../../main/serve/server.js';
import { chromiumPath } from '../support/chromium.js';

/**
 * Script time of the window for each frame while a run of 50 bodies is fed, on both renderers, in Chromium without a
 * graphics processor. Rasterising is not counted: it is the browser's, and depends on the machine's.
 */
const bodies = 50;
/** [ms] */
const bound = 8;
const root = process.cwd();

/** Pendulums in five rows, each a bar on a pin with a damped spring to its neighbour: live symbols besides rigid ones. */
function document(): string {
  const place = (i: number): [number, number] => [(i % 10) * 0.3, -Math.floor(i / 10) * 0.35];
  const list = Array.from({ length: bodies }, (_, i) => ({ i, at: place(i) }));
  return JSON.stringify({
    format: 'joulewright/1',
    title: `${bodies} pendulums`,
    bodies: list.map(({ i, at: [x, y] }) => ({
      id: `bar-${i}`,
      shape: { kind: 'bar', length: 0.2, width: 0.02 },
      mass: 0.2,
      at: [x + 0.1, y],
    })),
    joints: list.map(({ i, at }) => ({ id: `pin-${i}`, kind: 'pin', between: [`bar-${i}`, 'ground'], at })),
    springs: list
      .filter(({ i }) => i % 5 === 0)
      .map(({ i, at: [x, y] }) => ({
        id: `spring-${i}`,
        kind: 'linear',
        between: [
          { of: `bar-${i}`, at: [x + 0.2, y] },
          { of: 'ground', at: [x + 0.2, y - 0.2] },
        ],
        rate: '20 N/m',
      })),
    stations: [
      { id: '1', when: { start: true } },
      { id: '2', when: { end: true } },
    ],
    run: { until: '3 s' },
  });
}

interface Sample {
  script: number;
  frames: number;
}

async function sample(page: Page, session: CDPSession): Promise<Sample> {
  const { metrics } = await session.send('Performance.getMetrics');
  const script = metrics.find(({ name }) => name === 'ScriptDuration')?.value ?? NaN;
  return { script, frames: await page.evaluate(() => (globalThis as unknown as { frames: number }).frames) };
}

async function measure(renderer: 'webgl' | 'canvas', address: string, executablePath: string): Promise<number> {
  const browser = await chromium.launch({ executablePath, args: ['--no-sandbox', '--disable-quic'] });
  const page = await browser.newPage({ viewport: { width: 1440, height: 900 } });
  await page.addInitScript(() => {
    const scope = globalThis as unknown as { frames: number };
    scope.frames = 0;
    const count = () => {
      scope.frames += 1;
      requestAnimationFrame(count);
    };
    requestAnimationFrame(count);
  });
  await page.goto(`${address}?renderer=${renderer}`);
  await page.locator(`[data-renderer="${renderer}"]`).waitFor();
  await page.getByRole('img', { name: /Drawing of/ }).waitFor();
  await page.keyboard.press('F5');
  // Fed once both solvers are done.
  await page.getByRole('button', { name: 'Run again' }).waitFor({ timeout: 120_000 });
  for (const key of ['1', '[', '[', '[', ' ']) await page.keyboard.press(key);
  await page.waitForTimeout(500);
  const session = await page.context().newCDPSession(page);
  await session.send('Performance.enable');
  const before = await sample(page, session);
  await page.waitForTimeout(4000);
  const after = await sample(page, session);
  const moment = await page.getByRole('slider', { name: 'Moment of the run' }).getAttribute('aria-valuenow');
  await browser.close();
  if (!(Number(moment) > 0)) throw new Error('The paper was not fed.');
  return (1000 * (after.script - before.script)) / (after.frames - before.frames);
}

const executablePath = chromiumPath();
const text = document();
const given = { name: 'pendulums.json', text, size: text.length };
const served = await serveWindow({ root: resolve(root, 'dist/renderer'), given });
console.log(`script time for each frame, ${bodies} bodies, bound ${bound} ms`);
let missed = false;
for (const renderer of ['webgl', 'canvas'] as const) {
  const time = await measure(renderer, served.address, executablePath);
  console.log(`  ${renderer.padEnd(7)} ${time.toFixed(2)} ms`);
  missed ||= !(time <= bound);
}
await served.close();
process.exitCode = missed ? 1 : 0;
