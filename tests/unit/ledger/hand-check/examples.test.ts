import { readdirSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { handCheck, speedByHand, stationRows, type HandCheck } from '../../../../sim/ledger/index.js';
import { readMechanism } from '../../../../sim/mechanism/index.js';
import type { Mechanism } from '../../../../sim/mechanism/model.js';
import { bodyAtRow, type Recording } from '../../../../sim/recording/index.js';
import { runStepper } from '../../../../sim/stepper/index.js';
import { checkOf, speedOf } from './by-hand.js';

const folder = resolve(import.meta.dirname, '../../../../assets/examples');
const names = readdirSync(folder).filter((name) => name.endsWith('.json'));

interface Example {
  mechanism: Mechanism;
  recording: Recording;
  checks: HandCheck[];
}

const examples = new Map<string, Example>();

/** One run of each example serves all tests. */
function example(name: string): Example {
  const known = examples.get(name);
  if (known) return known;
  const { mechanism } = readMechanism(readFileSync(resolve(folder, name), 'utf8'));
  if (!mechanism) throw new Error(`${name} has errors`);
  const recording = runStepper(mechanism);
  const fresh = { mechanism, recording, checks: handCheck(mechanism, recording) };
  examples.set(name, fresh);
  return fresh;
}

/** Greatest speed of any body in a run. */
function greatestSpeed({ layout, rowCount, ...rest }: Recording): number {
  const recording = { layout, rowCount, ...rest };
  let greatest = 0;
  for (const body of layout.bodies) {
    for (let row = 0; row < rowCount; row += 1) {
      const { vx, vy } = bodyAtRow(recording, body, row);
      greatest = Math.max(greatest, Math.hypot(vx, vy));
    }
  }
  return greatest;
}

describe.each(names)('the example %s', (name) => {
  it('has a hand check of every body between every two stations in turn', () => {
    const { mechanism, recording, checks } = example(name);
    const stations = stationRows(recording).map(({ id }) => id);
    for (const { id } of mechanism.bodies) {
      const spans = checks.filter(({ of }) => of === id).map(({ from, to }) => `${from} ${to}`);
      for (const [i, to] of stations.slice(1).entries()) expect(spans).toContain(`${stations[i]} ${to}`);
    }
  });

  it('agrees with its run within a thousandth of the greatest speed, or says in a sentence why not', () => {
    const { recording, checks } = example(name);
    const scale = greatestSpeed(recording);
    for (const { speed, difference, reason, lines, equation, spin, spinDifference } of checks) {
      if (speed === null) {
        expect(reason).toMatch(/^[A-Za-z].{15,}\.$/);
        expect(lines).toEqual([]);
      } else {
        expect(reason).toBeUndefined();
        expect(equation).toContain('=');
        expect(Math.abs(difference ?? NaN)).toBeLessThanOrEqual(1e-3 * scale);
        if (spinDifference !== undefined) expect(Math.abs(spinDifference)).toBeLessThanOrEqual(1e-3 * (spin ?? 0));
      }
    }
  });

  it('leaves nothing of a sum that ends at rest, to a thousandth of what it moves', () => {
    const { checks } = example(name);
    for (const { left, lines } of checks) {
      if (left === undefined) continue;
      const numbers = lines.at(-2) ?? '';
      const amounts = (numbers.split('=')[1] ?? '').match(/\d+(\.\d+)?/g)?.map(Number) ?? [];
      expect(Math.abs(left)).toBeLessThanOrEqual(1e-3 * Math.max(...amounts));
    }
  });
});

describe('figures known beforehand', () => {
  it('of the gravity feed are those of its drawing: 8.238 J and 1.981 m/s at the plate', () => {
    const { checks } = example('gravity-feed.json');
    const check = checkOf({ checks }, 'crate', '1', '2');
    expect(check.equation).toBe('½ m v₂² = m g h − μ₁ m g cos α₁ L₁ − W_R500 − μ₂ m g L₂');
    expect(check.lines.slice(-2)).toEqual([
      '8.238 J = 17.299 − 4.853 − 2.614 − 1.594',
      'v₂ = √(2 × 8.238 J / 4.2 kg) = 1.981 m/s',
    ]);
    expect(Math.abs(speedOf(check) - Math.sqrt((2 * 8.237808) / 4.2))).toBeLessThan(1e-5);
  });

  it('of the feed’s stop have the loss of the touch, the spring and the friction in one sum', () => {
    const { checks } = example('gravity-feed.json');
    const check = checkOf({ checks }, 'crate', '2', '3');
    expect(check.with).toEqual(['plate']);
    expect(check.equation).toBe('0 = ½ m₁ v₂² − ½ (m₁ m₂) / (m₁ + m₂) u² − ½ k (δ₂² − δ₃²) − μ m₁ g L');
    expect(check.lines.at(-1)).toBe('v₃ = 0, crate and plate turning back');
  });

  it('of the hammer are 32.1 rad/s at the blow', () => {
    const { checks } = example('hammer-latch.json');
    const check = checkOf({ checks }, 'hammer', '2', '3');
    expect(check.equation).toBe('½ I_O ω₃² = m g h + ½ k (φ₂² − φ₃²) − M φ');
    expect(Math.abs((check.spin ?? 0) / Math.sqrt((2 * 4.466932) / 0.0086726) - 1)).toBeLessThan(1e-4);
  });

  it('of the carriage have the dashpot’s share, −1.4077 J by an integration in time', () => {
    const { checks } = example('spring-return-carriage.json');
    const { lines } = checkOf({ checks }, 'carriage', '1', '2');
    expect(lines).toContain('0.8388 J = 4.1760 − 0.7637 − 1.4077 − 1.1658');
  });

  it('of the two crates are of both as one down to the stop, and of each alone after it', () => {
    const { checks } = example('stacked-crates.json');
    expect(checkOf({ checks }, 'lower', '1', '2').with).toEqual(['upper']);
    expect(checkOf({ checks }, 'upper', '2', '3').equation).toBe('0 = ½ m v₂² + m g h − μ m g cos α L');
    expect(checkOf({ checks }, 'lower', '2', '3').equation).toBe('0 = ½ m v₂² − ½ m u²');
  });

  it('are found by body and station, and are nothing where there is no number', () => {
    const { checks } = example('gravity-feed.json');
    expect(speedByHand(checks, 'crate', '2')).toBeCloseTo(1.9806, 4);
    expect(speedByHand(checks, 'crate', '1')).toBeNull();
    expect(speedByHand(example('slider-crank-press.json').checks, 'ram', '2')).toBeNull();
  });
});

describe('what is no hand sum', () => {
  it.each([
    ['slider-crank-press.json', 'flywheel', '1', '2', 'several links'],
    ['belt-feed.json', 'crate', '2', '3', 'belt and table share the load of crate'],
    ['belt-feed.json', 'crate', '3', '4', 'The speed of crate at station 3 is not known by hand: belt and table share'],
    ['spring-return-carriage.json', 'carriage', '2', '3', 'carriage/stop gives way and damps'],
    ['hammer-latch.json', 'hammer', '3', '4', 'hammer is struck 8 times'],
    ['return-roller.json', 'roller', '3', '4', 'turns back'],
  ])('of %s: %s from %s to %s: %s', (name, of, from, to, sentence) => {
    const check = checkOf(example(name), of, from, to);
    expect(check.speed).toBeNull();
    expect(check.reason).toContain(sentence);
  });
});
