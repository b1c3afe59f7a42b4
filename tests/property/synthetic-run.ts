import fc from 'fast-check';
import type { AccountRequest, Recording } from '../../sim/recording/index.js';
import { buildLayout, RecordingWriter } from '../../sim/recording/index.js';

/** Three bodies, a track, and one account of each kind between them. */
export const BODIES = ['a', 'b', 'c'] as const;

export const ACCOUNTS: AccountRequest[] = [
  ...BODIES.map((body): AccountRequest => ({ account: 'gravity', of: body, bodies: [body], stored: true })),
  { account: 'spring', of: 'buffer', bodies: ['a'], stored: true },
  { account: 'spring', of: 'coupling', bodies: ['a', 'b'], stored: true },
  { account: 'friction', of: ['a', 'ramp'], bodies: ['a'], heat: true },
  { account: 'friction', of: ['a', 'b'], bodies: ['a', 'b'], heat: true },
  { account: 'reaction', of: ['b', 'c'], bodies: ['b', 'c'] },
  { account: 'impact', of: ['c', 'ramp'], bodies: ['c'], heat: true },
  { account: 'drive', of: 'motor', bodies: ['c'], input: true },
  { account: 'numerical', of: null, cause: 'force-truncation', bodies: [...BODIES] },
  { account: 'numerical', of: null, cause: 'clamp', bodies: [...BODIES] },
];

/** Work of each account on each of its bodies from one row to the next [J]. */
export type Increments = number[][][];

const joules = fc.double({ min: -100, max: 100, noNaN: true, noDefaultInfinity: true });

/** Runs of 2 to 12 rows in which every account does what it likes, in sizes from nothing to 100 J a row. */
export const increments: fc.Arbitrary<Increments> = fc.array(
  fc.tuple(...ACCOUNTS.map(({ bodies }) => fc.array(joules, { minLength: bodies.length, maxLength: bodies.length }))),
  { minLength: 1, maxLength: 11 },
);

/**
 * A run in which each body's kinetic energy is exactly what was there at the start plus all the work done on it. Stores
 * hold what they have not given. `unbookedCause` drops one numerical cause's booking, as a solver with a defect would.
 */
export function closedRun(steps: Increments, options: { unbookedCause?: string } = {}): Recording {
  const masses = [1, 2.5, 0.3];
  const bodies = BODIES.map((id, i) => ({ id, mass: masses[i], inertia: 0 }));
  const contacts: { between: [string, string] }[] = [
    { between: ['a', 'ramp'] },
    { between: ['a', 'b'] },
    { between: ['c', 'ramp'] },
  ];
  const layout = buildLayout({ bodies, accounts: ACCOUNTS, contacts });
  const writer = new RecordingWriter({ solver: 'stepper', layout, step: 1e-3 });
  const atStart = 1 + steps.flat(2).reduce((sum, work) => sum + Math.abs(work), 0);
  const totals = ACCOUNTS.map(({ bodies }) => bodies.map(() => 0));
  for (let row = 0; row <= steps.length; row++) {
    if (row > 0) totals.forEach((sums, i) => sums.forEach((_, j) => (sums[j] += steps[row - 1][i][j])));
    const offset = writer.offset(writer.addRow(row));
    const set = (column: number, value: number): void => void (writer.buffer[offset + column] = value);
    layout.bodies.forEach(({ id, mass, columns }) => {
      set(columns.vx, Math.sqrt((2 * (atStart + workOn(id, totals))) / mass));
    });
    layout.accounts.forEach(({ columns, cause }, i) => {
      const sum = totals[i].reduce((a, b) => a + b, 0);
      if (cause === undefined || cause !== options.unbookedCause) columns.work.forEach((c, j) => set(c, totals[i][j]));
      if (columns.stored !== undefined) set(columns.stored, -sum);
      if (columns.heat !== undefined) set(columns.heat, Math.abs(sum));
    });
  }
  return writer.finish('reachedEnd');
}

function workOn(body: string, totals: number[][]): number {
  return ACCOUNTS.reduce(
    (sum, { bodies }, i) => sum + (bodies.includes(body) ? totals[i][bodies.indexOf(body)] : 0),
    0,
  );
}
