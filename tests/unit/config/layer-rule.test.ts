import { Linter } from 'eslint';
import { readdirSync } from 'node:fs';
import { resolve } from 'node:path';
import ts from 'typescript-eslint';
import { describe, expect, it } from 'vitest';
import { layerOf, layerRule } from '../../../.config/layer-rule.js';
import { layers } from '../../../.config/layers.js';

const root = resolve(import.meta.dirname, '../../..');
const linter = new Linter({ cwd: root });

/** What the lint rule says of one line of code in a file of the repository. */
function complaints(file: string, code: string): string[] {
  const config = {
    files: ['**/*.ts'],
    plugins: { layers: { rules: { direction: layerRule } } },
    languageOptions: { parser: ts.parser },
    rules: { 'layers/direction': 'error' },
  } satisfies Linter.Config;
  return linter.verify(code, config, resolve(root, file)).map((each) => each.message);
}

describe('the layer rule of lint', () => {
  const forbidden: [file: string, code: string][] = [
    ['sim/auditor/impact.ts', "import { startRun } from '../stepper/index.js';"],
    ['sim/auditor/impact.ts', "import { World } from 'planck';"],
    ['sim/ledger/book.ts', "import { runStepper } from '../stepper/index.js';"],
    ['sim/ledger/book.ts', "import { audit } from '../auditor/index.js';"],
    ['sim/ledger/book.ts', "import { World } from 'planck';"],
    ['sim/stepper/run.ts', "import { audit } from '../auditor/index.js';"],
    ['sim/core/vec.ts', "import type { Mechanism } from '../mechanism/model.js';"],
    ['sim/geometry/arc.ts', "import type { Recording } from '../recording/recording.js';"],
    ['sim/criteria/speed.ts', "import { runStepper } from '../stepper/index.js';"],
    ['sim/mechanism/read.ts', "import { readFileSync } from 'node:fs';"],
    ['sim/mechanism/read.ts', "import { readFileSync } from 'fs';"],
    ['sim/drawing/spring.ts', "import { Graphics } from 'pixi.js';"],
    ['sim/report/text.ts', "import { app } from 'electron';"],
    ['main/main.ts', "import App from '../renderer/App.svelte';"],
    ['main/cli/check.ts', "import '../../renderer/state/run.js';"],
    ['renderer/sheet/sheet.ts', "import { runStepper } from '../../sim/stepper/index.js';"],
    ['renderer/sheet/sheet.ts', "import { openFile } from '../../main/files/open.js';"],
    ['renderer/sheet/sheet.ts', "import '../../sim/worker.js';"],
    ['renderer/sheet/sheet.ts', "import { readFileSync } from 'node:fs';"],
    ['sim/ledger/book.ts', "import data from '../../assets/examples/feed.json';"],
  ];
  it.each(forbidden)('refuses, in %s, %s', (file, code) => {
    expect(complaints(file, code)).toHaveLength(1);
  });

  const allowed: [file: string, code: string][] = [
    ['sim/stepper/run.ts', "import { World } from 'planck';"],
    ['sim/stepper/kinds/spring.ts', "import { world } from '../world.js';"],
    ['sim/geometry/track.ts', "import type { Track } from '../mechanism/kinds/track.js';"],
    ['sim/mechanism/rest.ts', "import { buildTrack } from '../geometry/index.js';"],
    ['sim/report/result.ts', "import { bookLedger } from '../ledger/index.js';"],
    ['sim/worker.ts', "import { startRun } from './stepper/index.js';"],
    ['main/cli/check.ts', "import { runStepper } from '../../sim/stepper/index.js';"],
    ['main/main.ts', "import { app } from 'electron';"],
    ['renderer/state/run.ts', "new Worker(new URL('../../sim/worker.ts', import.meta.url), { type: 'module' });"],
    ['renderer/state/run.ts', "import type { Ipc } from '../../main/ipc/contract.js';"],
    ['tests/cross/feed.test.ts', "import { World } from 'planck';"],
  ];
  it.each(allowed)('accepts, in %s, %s', (file, code) => {
    expect(complaints(file, code)).toEqual([]);
  });

  it.each([
    "export * from '../stepper/index.js';",
    "export { runStepper } from '../stepper/index.js';",
    "const load = () => import('../stepper/index.js');",
    "export type Run = import('../stepper/index.js').StepperRun;",
    "const address = new URL('../stepper/index.js', import.meta.url);",
  ])('sees every form of import: %s', (code) => {
    expect(complaints('sim/auditor/index.ts', code)).toEqual([
      "'auditor' may not import 'stepper' ('../stepper/index.js').",
    ]);
  });

  it('lets others see only the public face of a layer', () => {
    const message = "'../../sim/stepper/world.js' is not a public face of 'stepper'.";
    expect(complaints('main/cli/check.ts', "import { world } from '../../sim/stepper/world.js';")).toEqual([message]);
  });

  it('has a place in the table for every folder of sim', () => {
    const folders = readdirSync(resolve(root, 'sim'), { withFileTypes: true }).filter((entry) => entry.isDirectory());
    const homeless = folders.filter((folder) => layerOf(resolve(root, 'sim', folder.name, 'x.ts')) === undefined);
    expect(homeless.map((folder) => folder.name)).toEqual([]);
  });

  it('points one way: no layer but the pair mechanism and geometry can reach itself through others', () => {
    const reach = (from: string, seen = new Set<string>()): Set<string> => {
      for (const next of layers[from].layers) if (!seen.has(next)) reach(next, seen.add(next));
      return seen;
    };
    const looping = Object.keys(layers).filter((name) => reach(name).has(name));
    expect(looping).toEqual(['mechanism', 'geometry']);
  });
});
