import { readFileSync, readdirSync } from 'node:fs';
import { resolve } from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { handCheck } from '../../../../sim/ledger/index.js';
import { readMechanism } from '../../../../sim/mechanism/index.js';
import type { Recording } from '../../../../sim/recording/index.js';
import { runStepper } from '../../../../sim/stepper/index.js';
import { box, degrees, onRamp, ramp } from '../../../support/parts.js';
import { run } from '../../../support/run.js';

const root = resolve(import.meta.dirname, '../../../../');

/** A copy of a recording in which every account, force and torque is another number. */
function withoutBooks(recording: Recording, filler: number): Recording {
  const { accounts, contacts, joints, springs, dampers } = recording.layout;
  const columns = [
    ...accounts.flatMap(({ columns: { work, heat = -1, stored = -1, input = -1 } }) => [...work, heat, stored, input]),
    ...contacts.flatMap(({ columns: { normal, friction } }) => [normal, friction]),
    ...joints.flatMap(({ columns: { fx, fy, torque } }) => [fx, fy, torque]),
    ...[...springs, ...dampers].map(({ columns: { force } }) => force),
  ].filter((column) => column > 0);
  const rows = recording.rows.slice();
  for (let row = 0; row < recording.rowCount; row += 1) {
    for (const column of columns) rows[row * recording.layout.width + column] = filler;
  }
  return { ...recording, rows };
}

describe('the hand check reads no account', () => {
  it.each(['gravity-feed', 'stacked-crates', 'hammer-latch', 'buffer-drop-test', 'spring-return-carriage'])(
    'of the example %s: with all accounts and forces nil it says the same',
    (name) => {
      const { mechanism } = readMechanism(readFileSync(resolve(root, `assets/examples/${name}.json`), 'utf8'));
      if (!mechanism) throw new Error(name);
      const recording = runStepper(mechanism);
      expect(handCheck(mechanism, withoutBooks(recording, 0))).toEqual(handCheck(mechanism, recording));
    },
  );

  it('of any block on any ramp: whatever stands in the accounts, it says the same', () => {
    const slope = fc.double({ min: 10, max: 60, noNaN: true });
    const friction = fc.double({ min: 0.001, max: 0.15, noNaN: true });
    const filler = fc.double({ noNaN: true });
    fc.assert(
      fc.property(slope, friction, filler, (angle, mu, wrong) => {
        const { mechanism, recording } = run({
          bodies: [box('block', onRamp(angle, 0.5, 0.1), [0.3, 0.2], 5, { angle: -degrees(angle) })],
          tracks: [ramp(angle, 10)],
          contacts: [{ between: ['block', 'ramp'], friction: mu }],
          run: { until: 0.3 },
        });
        const checks = handCheck(mechanism, recording);
        expect(checks[0].speed).toBeGreaterThan(0);
        expect(handCheck(mechanism, withoutBooks(recording, wrong))).toEqual(checks);
      }),
      { numRuns: 20, seed: 20260 },
    );
  });

  it('names no account column anywhere in its source', () => {
    const folder = resolve(root, 'sim/ledger/hand-check');
    const files = readdirSync(folder, { recursive: true, encoding: 'utf8' }).filter((file) => file.endsWith('.ts'));
    for (const file of files) {
      const text = readFileSync(resolve(folder, file), 'utf8');
      expect(text, file).not.toMatch(/layout\.accounts|workAtRow|storedAtRow|kineticEnergyOf|bookLedger/);
      expect(text, file).not.toMatch(/columns\.(normal|friction|force|torque|fx|fy)\b/);
    }
  });
});
