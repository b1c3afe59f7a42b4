import type { AccountSpec, Recording } from '../recording/recording.js';
import { valueAt } from '../recording/reader.js';
import { patternOf, type PatternName } from './patterns.js';

/** One layer of the energy chart, from the bottom up. */
export interface StripLayer {
  key: string;
  kind: 'loss' | 'stored' | 'motion' | 'height';
  /** What it is the account of; nobody's where it stands for many of one name. */
  account: Pick<AccountSpec, 'account' | 'of'> | null;
  pattern: PatternName;
  /** Thickness at each sample [J], not below zero. */
  values: Float64Array;
}

export interface Strip {
  /** Row and time [s] of each sample. */
  rows: Int32Array;
  times: Float64Array;
  layers: StripLayer[];
  /** Greatest total [J]. */
  top: number;
}

/**
 * The energy of the bodies inside the boundary over a run, as layers that stand on each other: what was lost or given
 * away, by account; what springs store; motion; height above the lowest point reached. What drives and loads put in makes
 * the whole grow.
 *
 * @param samples about how many instants; every event's rows are among them
 */
export function energyStrip(recording: Recording, system: readonly string[], samples = 1200): Strip {
  const rows = sampleRows(recording, samples);
  const over = (value: (row: number) => number) => Float64Array.from(rows, value);
  const mine = recording.layout.accounts.filter(({ bodies }) => bodies.some((body) => system.includes(body)));
  const frictions = recording.layout.accounts.filter(({ account }) => isFriction(account));
  const look = (spec: AccountSpec) => patternOf(spec.account, frictions.indexOf(spec));
  const losses = mine
    .filter(({ account, columns }) => account !== 'numerical' && columns.stored === undefined)
    .map((spec): StripLayer => ({
      key: accountKey(spec),
      kind: 'loss',
      account: spec,
      pattern: look(spec),
      values: over((row) => Math.max(0, -workOn(recording, spec, system, row))),
    }));
  const stored = mine
    .flatMap((spec) =>
      spec.account === 'gravity' || spec.columns.stored === undefined ? [] : [{ spec, column: spec.columns.stored }],
    )
    .map(({ spec, column }): StripLayer => ({
      key: accountKey(spec),
      kind: 'stored',
      account: spec,
      pattern: 'spring',
      values: over((row) => Math.max(0, valueAt(recording, row, column))),
    }));
  const layers = [
    ...fewLayers(losses),
    ...fewLayers(stored),
    {
      key: 'motion',
      kind: 'motion',
      account: null,
      pattern: 'motion',
      values: over((row) => kinetic(recording, system, row)),
    },
    { key: 'height', kind: 'height', account: null, pattern: 'gravity', values: height(recording, mine, over) },
  ] satisfies StripLayer[];
  const times = over((row) => valueAt(recording, row, 0));
  return { rows, times, layers: layers.filter(isSeen), top: topOf(layers, rows.length) };
}

/** Accounts of one name beyond this many are one layer: their edges would hide what they hold. */
const most = 4;

function fewLayers(layers: readonly StripLayer[]): StripLayer[] {
  const seen = layers.filter(isSeen);
  return seen.flatMap((layer, i): StripLayer[] => {
    const name = layer.account?.account;
    const alike = seen.filter(({ account }) => account?.account === name);
    if (name === undefined || alike.length <= most) return [layer];
    if (seen.findIndex(({ account }) => account?.account === name) < i) return [];
    const values = layer.values.map((_, k) => alike.reduce((sum, each) => sum + each.values[k], 0));
    return [{ ...layer, key: name, account: { account: name, of: null }, values }];
  });
}

const isFriction = (account: string) => ['friction', 'joint-friction', 'rolling-resistance'].includes(account);
const isSeen = ({ values, kind }: StripLayer) => kind === 'motion' || values.some((value) => value > 0);

/** An account's name in a list: what it is and what it belongs to. */
export function accountKey({ account, of, cause }: Pick<AccountSpec, 'account' | 'of' | 'cause'>): string {
  return [account, ...(of === null ? [] : [of].flat()), ...(cause === undefined ? [] : [cause])].join(':');
}

/** Rows evenly through the run, and the rows at and after each event. */
function sampleRows({ rowCount, events }: Recording, samples: number): Int32Array {
  const stride = Math.max(1, Math.floor(rowCount / samples));
  const chosen = new Set<number>();
  for (let row = 0; row < rowCount; row += stride) chosen.add(row);
  if (events.length < samples) for (const { row } of events) chosen.add(row).add(Math.min(row + 1, rowCount - 1));
  if (rowCount > 0) chosen.add(rowCount - 1);
  return Int32Array.from(chosen).sort();
}

function workOn(
  recording: Recording,
  { bodies, columns }: AccountSpec,
  system: readonly string[],
  row: number,
): number {
  return columns.work.reduce(
    (sum, column, i) => (system.includes(bodies[i]) ? sum + valueAt(recording, row, column) : sum),
    0,
  );
}

function kinetic(recording: Recording, system: readonly string[], row: number): number {
  let sum = 0;
  for (const { id, mass, inertia, columns } of recording.layout.bodies) {
    if (!system.includes(id)) continue;
    const [vx, vy, spin] = [columns.vx, columns.vy, columns.spin].map((column) => valueAt(recording, row, column));
    sum += 0.5 * (mass * (vx * vx + vy * vy) + inertia * spin * spin);
  }
  return sum;
}

/** Potential energy of gravity above the least of the run. */
function height(
  recording: Recording,
  accounts: readonly AccountSpec[],
  over: (value: (row: number) => number) => Float64Array,
) {
  const columns = accounts.flatMap(({ account, columns: { stored } }) => account === 'gravity' && stored !== undefined ? [stored] : []); // prettier-ignore
  const values = over((row) => columns.reduce((sum, column) => sum + valueAt(recording, row, column), 0));
  const least = values.reduce((low, value) => Math.min(low, value), Infinity);
  return values.map((value) => value - least);
}

function topOf(layers: readonly StripLayer[], count: number): number {
  let top = 0;
  for (let i = 0; i < count; i++) top = Math.max(top, layers.reduce((sum, { values }) => sum + values[i], 0)); // prettier-ignore
  return top;
}
