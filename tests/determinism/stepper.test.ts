import { build } from 'esbuild';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { Worker } from 'node:worker_threads';
import { afterAll, describe, expect, it } from 'vitest';
import { hashRecording } from '../../sim/recording/index.js';
import { startRun } from '../../sim/stepper/index.js';
import { machines } from '../support/machines.js';
import { mechanismOf, run } from '../support/run.js';

const documents = Object.entries(machines);
const hashes = documents.map(([, parts]) => hashRecording(run(parts).recording));
const folder = mkdtempSync(join(tmpdir(), 'joulewright-'));
afterAll(() => {
  rmSync(folder, { recursive: true });
});

/** Bundles the thread's program and runs it on all documents. */
async function hashesInThread(): Promise<string[]> {
  const outfile = join(folder, 'worker.mjs');
  const banner = {
    js: "import { createRequire as r } from 'node:module'; const require = r(import.meta.url);",
  };
  const entry = resolve(import.meta.dirname, 'stepper-worker.ts');
  await build({ entryPoints: [entry], outfile, bundle: true, platform: 'node', format: 'esm', banner, minify: true });
  const worker = new Worker(outfile, { workerData: documents.map(([, parts]) => parts) });
  return new Promise((done, failed) => {
    worker.once('message', done);
    worker.once('error', failed);
  });
}

describe('one document with one step', () => {
  it('is the same run to the last bit when it is run again', () => {
    expect(documents.map(([, parts]) => hashRecording(run(parts).recording))).toEqual(hashes);
  });

  it('is the same run however often it is interrupted', () => {
    for (const [i, [name, parts]] of documents.entries()) {
      const piecewise = startRun(mechanismOf(parts));
      while (!piecewise.done) piecewise.advance(0);
      expect(hashRecording(piecewise.recording()), name).toBe(hashes[i]);
    }
  });

  it('is the same run beside another that runs in turns with it: engines share no state', () => {
    const pairs = documents.slice(0, -1).map((_, i) => [i, i + 1] as const);
    for (const pair of pairs) {
      const runs = pair.map((i) => startRun(mechanismOf(documents[i][1])));
      while (runs.some(({ done }) => !done)) for (const each of runs) if (!each.done) each.advance(0);
      expect(runs.map((each) => hashRecording(each.recording()))).toEqual(pair.map((i) => hashes[i]));
    }
  });

  it('is the same run in a thread of its own, bundled and minified', async () => {
    expect(await hashesInThread()).toEqual(hashes);
  });

  it('is another run with another step', () => {
    const [, parts] = documents[0];
    expect(hashRecording(run(parts, { step: 1e-3 }).recording)).not.toBe(hashes[0]);
  });
});
