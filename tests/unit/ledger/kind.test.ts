import { describe, expect, it } from 'vitest';
import { entryKind } from '../../../sim/ledger/index.js';
import type { AccountName, AccountSpec } from '../../../sim/recording/index.js';

function account(name: AccountName, bodies: string[], stores = false): AccountSpec {
  return {
    account: name,
    of: 'x',
    bodies,
    columns: { work: bodies.map((_, i) => i), ...(stores ? { stored: 9 } : {}) },
  };
}

const inside = new Set(['a', 'b']);

describe('the kind of an entry', () => {
  it.each([
    ['gravity of a body inside', account('gravity', ['a'], true), 'stored'],
    ['a spring from ground to a body inside', account('spring', ['a'], true), 'stored'],
    ['a spring between two bodies inside', account('spring', ['a', 'b'], true), 'stored'],
    ['a spring to a moving body outside', account('spring', ['a', 'out'], true), 'external'],
    ['friction on a track', account('friction', ['a']), 'external'],
    ['friction between two bodies inside', account('friction', ['a', 'b']), 'internal'],
    ['friction on a body outside', account('friction', ['a', 'out']), 'external'],
    ['a load', account('load', ['a']), 'external'],
    ['a drive between two bodies inside', account('drive', ['a', 'b']), 'internal'],
    ['a pin between two bodies inside', account('reaction', ['a', 'b']), 'internal'],
    ['an impact on a body outside', account('impact', ['a', 'out']), 'impact'],
    ['an impact between bodies inside', account('impact', ['a', 'b']), 'impact'],
    ['what the method made', account('numerical', ['a', 'b', 'out']), 'numerical'],
  ] as const)('of %s', (_, spec, kind) => {
    expect(entryKind(spec, inside)).toBe(kind);
  });
});
