import { readdirSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { evaluateCriteria, type CriterionResult } from '../../sim/criteria/index.js';
import { readMechanism } from '../../sim/mechanism/index.js';
import { runStepper } from '../../sim/stepper/index.js';

const folder = resolve(import.meta.dirname, '../../assets/examples');
const names = readdirSync(folder).filter((name) => name.endsWith('.json'));

const gravity = 9.80665;
const sin3 = Math.sin(Math.PI / 60);
const cos3 = Math.cos(Math.PI / 60);

/** Values worked out by hand in the notes of each example, within a part in a thousand, or two. */
const byHand: Record<string, Record<string, [value: number, within?: number]>> = {
  'belt-feed.json': { Q1: [0.5 * 8 * 0.6 ** 2] },
  'gravity-feed.json': { Q1: [1.981], Q2: [184.8], Q3: [0.0713] },
  // 4.467 J and 5.14 m/s at the crown.
  'hammer-latch.json': { Q1: [4.467], Q2: [5.14, 2e-3] },
  'return-roller.json': { Q2: [-2.056] },
  // Of 8 mm × 60 N/mm = 480 N the spring's share; the damper adds some before.
  'slider-crank-press.json': { Q2: [480, 2e-2] },
  'spring-return-carriage.json': {
    Q2: [
      (0.5 * 60 * (0.41 ** 2 - 0.17 ** 2)) /
        (6.2 * gravity * 0.24 * sin3 + 0.08 * 6.2 * gravity * cos3 * 0.24 + /* dashpot, integrated */ 1.407748),
    ],
  },
  'stacked-crates.json': { Q1: [0.894], Q2: [0.1754], Q3: [4.543] },
};

function judge(name: string): { criteria: CriterionResult[]; findings: string[] } {
  const { mechanism } = readMechanism(readFileSync(resolve(folder, name), 'utf8'));
  if (!mechanism) throw new Error(`${name} cannot be read`);
  const { criteria, findings } = evaluateCriteria(mechanism, runStepper(mechanism));
  return { criteria, findings: findings.map(({ code }) => code) };
}

describe.each(names)('the criteria of %s', (name) => {
  const { criteria, findings } = judge(name);

  it('all pass, as the machine of its notes is meant to, each on the run of the stepper', () => {
    expect(criteria.length).toBeGreaterThan(0);
    expect(criteria.map(({ id, passes, by }) => [id, passes, by])).toEqual(
      criteria.map(({ id }) => [id, true, 'stepper']),
    );
    expect(findings).toEqual([]);
  });
});

it.each(Object.entries(byHand))('the criteria of %s have the values that its notes give by hand', (name, values) => {
  const { criteria } = judge(name);
  for (const [id, [value, within = 1e-3]] of Object.entries(values)) {
    const found = criteria.find((criterion) => criterion.id === id)?.value ?? NaN;
    console.log(`${name} ${id}: ${found.toPrecision(5)}, by hand ${value.toPrecision(5)}`);
    expect(Math.abs(found / value - 1)).toBeLessThanOrEqual(within);
  }
});

it('the buffer of the drop test stays below what its spring alone would reach, for the oil takes the rest', () => {
  const { criteria } = judge('buffer-drop-test.json');
  const [force, stroke] = criteria.map(({ value }) => value ?? NaN);
  // By the notes: 942 N and 73.5 mm with the damper shut off.
  expect(force).toBeLessThan(942);
  expect(stroke).toBeLessThan(0.0735);
  // Both are of one spring: 60 N fitted, 12 N/mm.
  expect(Math.abs(force - (60 + 12e3 * stroke))).toBeLessThan(1e-3 * force);
});
