/**
 * Which folder may import from which, and which packages each may use: the one table the lint rule reads.
 * Imports point one way. A layer always sees itself; `faces` narrows what others may see of a layer to those modules.
 */

/**
 * @typedef {object} Layer
 * @property {string} path folder or file, relative to the repository
 * @property {readonly string[]} layers names of the layers it may import
 * @property {readonly string[]} [packages] packages it may import; 'node' stands for Node's built-in modules
 * @property {readonly RegExp[]} [faces] the modules other layers may import, relative to `path`; absent: all of them
 */

const model = ['core', 'mechanism', 'geometry', 'recording'];
const answers = ['ledger', 'criteria', 'spread', 'sizing', 'drawing'];
const index = /^index\.ts$/;

/** @type {Readonly<Record<string, Layer>>} */
export const layers = {
  core: { path: 'sim/core', layers: [] },
  mechanism: { path: 'sim/mechanism', layers: ['core', 'geometry'] },
  geometry: { path: 'sim/geometry', layers: ['core', 'mechanism'] },
  recording: { path: 'sim/recording', layers: ['core', 'mechanism'] },
  protocol: { path: 'sim/protocol', layers: ['core', 'mechanism', 'recording'] },
  stepper: { path: 'sim/stepper', layers: model, packages: ['planck'], faces: [index] },
  auditor: { path: 'sim/auditor', layers: model, faces: [index] },
  ledger: { path: 'sim/ledger', layers: model, faces: [index, /^ledger\.ts$/] },
  drawing: { path: 'sim/drawing', layers: model },
  criteria: { path: 'sim/criteria', layers: [...model, 'ledger'], faces: [index] },
  spread: { path: 'sim/spread', layers: [...model, 'ledger', 'criteria'], faces: [index] },
  sizing: { path: 'sim/sizing', layers: [...model, 'ledger', 'criteria', 'spread'], faces: [index] },
  report: {
    path: 'sim/report',
    layers: [...model, ...answers],
    packages: ['valibot', '@valibot/to-json-schema'],
    faces: [index],
  },
  worker: { path: 'sim/worker.ts', layers: [...model, ...answers, 'report', 'stepper', 'auditor', 'protocol'] },
  ipc: { path: 'main/ipc', layers: [...model], packages: ['node', 'electron'] },
  main: {
    path: 'main',
    layers: [...model, ...answers, 'report', 'stepper', 'auditor', 'protocol', 'worker', 'ipc'],
    packages: ['node', 'electron', 'esbuild', 'vite'],
  },
  renderer: {
    path: 'renderer',
    layers: [...model, 'ledger', 'criteria', 'drawing', 'protocol', 'ipc'],
    packages: ['svelte', 'pixi.js', 'uplot', /* typefaces */ '@fontsource'],
  },
};

/** The worker's entry is reached from the window by address, never by import: `new URL('…/sim/worker.ts', import.meta.url)`. */
export const byAddress = { renderer: ['worker'] };
