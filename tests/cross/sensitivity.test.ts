import { describe, expect, it } from 'vitest';
import { nudge, sensitivityOf, type Sensitivity } from '../../sim/ledger/index.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import { runStepper } from '../../sim/stepper/index.js';
import { degrees, disc } from '../support/parts.js';
import { mechanismOf, type Parts } from '../support/run.js';
import { brakedBlock, rollingDisc, sprungCarriage } from './machines.js';

const run = (mechanism: Mechanism) => runStepper(mechanism, { step: 1e-3 });

function sensitivity(parts: Parts): Sensitivity {
  const mechanism = mechanismOf(parts);
  return sensitivityOf(mechanism, run(mechanism), run);
}

/** The carriage runs against its spring and comes back, but not as far as the wall, which it would meet flat. */
const returning: Parts = {
  ...sprungCarriage,
  stations: (sprungCarriage.stations as Parts[]).filter(({ id }) => id !== 'struck'),
  run: { until: 0.8 },
};

/** Discs that fall through a grid of pins: each bounce turns a small angle into a greater one. */
const pinBoard: Parts = {
  bodies: [
    disc('ball', [0.013, 2], 0.05, 1),
    ...[0, 1, 2, 3, 4, 5].flatMap((line) =>
      [-2, -1, 0, 1, 2].map((place) =>
        disc(`pin-${line}-${place + 2}`, [0.3 * (place + (line % 2) / 2), 1.6 - 0.3 * line], 0.06, 1e3),
      ),
    ),
  ],
  joints: [0, 1, 2, 3, 4, 5].flatMap((line) =>
    [0, 1, 2, 3, 4].map((place) => ({
      id: `nail-${line}-${place}`,
      kind: 'weld',
      between: [`pin-${line}-${place}`, 'ground'],
    })),
  ),
  contacts: [{ between: ['ball', '*'], restitution: 0.9 }],
  run: { until: 3 },
};

/** Three weights on massless links, let go from high up: it swings over, and small angles grow. */
const triplePendulum: Parts = {
  bodies: [1, 2, 3].map((n) => disc(`weight-${n}`, [n * Math.cos(degrees(70)), n * Math.sin(degrees(70))], 0.1, 1)),
  joints: [1, 2, 3].map((n) => ({
    id: `pin-${n}`,
    kind: 'pin',
    between: [`weight-${n}`, n === 1 ? 'ground' : `weight-${n - 1}`],
    at: [(n - 1) * Math.cos(degrees(70)), (n - 1) * Math.sin(degrees(70))],
  })),
  run: { until: 30 },
};

describe('sensitivityOf', () => {
  it.each([
    ['a ball through a board of pins', pinBoard],
    ['three weights that swing over', triplePendulum],
  ])('reports %s', (_, parts) => {
    const { sensitive, findings } = sensitivity(parts);
    console.log(findings[0]?.text);
    expect(sensitive).toBe(true);
    expect(findings).toMatchObject([{ severity: 'warning', code: 'sensitive', of: ['end'] }]);
  });

  it.each([
    ['a disc that rolls', rollingDisc],
    ['a carriage that a spring sends back', returning],
    ['a block that friction brakes', brakedBlock],
  ])('has nothing to say of %s', (_, parts) => {
    expect(sensitivity(parts)).toEqual({ sensitive: false, findings: [] });
  });
});

describe('nudge', () => {
  const mechanism = mechanismOf(sprungCarriage);
  const moved = nudge(mechanism, 2);

  it('moves each body by at most 1e-9 of the extent, and its velocity by at most 1e-9 of the greatest speed', () => {
    const [before, after] = [mechanism.bodies[0], moved.bodies[0]];
    for (const axis of [0, 1] as const) {
      const way = Math.abs(after.at[axis] - before.at[axis]);
      expect(way).toBeGreaterThan(0);
      expect(way).toBeLessThanOrEqual(1.001e-9 * mechanism.extent);
      expect(Math.abs(after.velocity[axis] - before.velocity[axis])).toBeLessThanOrEqual(2.001e-9);
    }
  });

  it('is the same every time and leaves all else as it is', () => {
    expect(nudge(mechanism, 2)).toEqual(moved);
    expect({ ...moved, bodies: [] }).toEqual({ ...mechanism, bodies: [] });
  });
});
