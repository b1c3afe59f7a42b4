import { describe, expect, it } from 'vitest';
import type { RecordingLayout } from '../../../sim/recording/index.js';
import { buildLayout } from '../../../sim/recording/index.js';

function columnsOf(layout: RecordingLayout): number[] {
  const { bodies, accounts, contacts, joints, springs, dampers } = layout;
  const plain = [...bodies, ...contacts, ...joints, ...springs, ...dampers].flatMap((part) =>
    Object.values(part.columns),
  );
  return [0, ...plain, ...accounts.flatMap(({ columns }) => Object.values(columns).flat())];
}

describe('buildLayout', () => {
  const layout = buildLayout({
    bodies: [
      { id: 'block', mass: 2, inertia: 0.1 },
      { id: 'plate', mass: 1, inertia: 0 },
    ],
    accounts: [
      { account: 'gravity', of: 'block', bodies: ['block'], stored: true },
      { account: 'friction', of: ['block', 'plate'], bodies: ['block', 'plate'], heat: true },
      { account: 'drive', of: 'motor', bodies: ['plate'], input: true },
      { account: 'numerical', of: null, cause: 'clamp', bodies: ['block', 'plate'] },
    ],
    contacts: [{ between: ['block', 'plate'] }],
    joints: [{ id: 'pin' }],
    springs: [
      {
        id: 'spring',
        between: [
          { of: 'ground', at: [0, 1] },
          { of: 'block', at: [1, 1] },
        ],
      },
    ],
    dampers: [{ id: 'brake', between: ['ground', 'plate'] }],
  });

  it('gives every column from 0 to the width to exactly one quantity', () => {
    const columns = columnsOf(layout).sort((a, b) => a - b);
    expect(columns).toEqual(Array.from({ length: layout.width }, (_, column) => column));
  });

  it('gives an account one work column a body, and heat, stored and input only where asked', () => {
    expect(layout.accounts.map(({ columns }) => columns.work.length)).toEqual([1, 2, 1, 2]);
    expect(layout.accounts.map(({ columns }) => Object.keys(columns))).toEqual([
      ['work', 'stored'],
      ['work', 'heat'],
      ['work', 'input'],
      ['work'],
    ]);
  });

  it('keeps where the ends of a spring or damper are fixed', () => {
    expect(layout.springs[0].ends).toEqual([
      { of: 'ground', at: [0, 1] },
      { of: 'block', at: [1, 1] },
    ]);
    expect(layout.dampers[0].ends).toEqual([{ of: 'ground' }, { of: 'plate' }]);
  });
});
