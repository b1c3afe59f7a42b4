import { describe, expect, it } from 'vitest';
import { accountLook } from '../../../renderer/account/look.js';
import { mergeEntries } from '../../../renderer/account/merge-entries.js';
import { lineName } from '../../../renderer/account/names.js';
import { shownLines } from '../../../renderer/account/account-rows.js';
import { energy, figures, fixed } from '../../../renderer/format/quantity.js';
import { itemFields } from '../../../renderer/item-card/item-fields.js';
import { itemData } from '../../../renderer/parts-list/item-data.js';
import { symbolsOf } from '../../../renderer/key/symbols.js';
import { numberItems } from '../../../sim/drawing/items.js';
import type { Ledger, PageLine } from '../../../sim/ledger/index.js';
import type { AccountName } from '../../../sim/recording/recording.js';
import { everyKind } from '../drawing/every-kind.js';

const items = numberItems(everyKind);
const line = (more: Partial<PageLine>): PageLine => ({ role: 'entry', account: 'friction', of: ['box', 'chute'], amount: 1, printed: '1.000', ...more }); // prettier-ignore

describe('figures', () => {
  it('have a true minus, no minus nil, and no zeros that say nothing', () => {
    expect(fixed(-1.5, 2)).toBe('−1.50');
    expect(fixed(-0.0004, 3)).toBe('0.000');
    expect(figures(2.4)).toBe('2.4');
    expect(figures(184.83)).toBe('184.8');
    expect(figures(1200)).toBe('1200');
    expect(figures(0)).toBe('0');
    expect(figures(-0.05)).toBe('−0.05');
    expect(figures(Number.NaN)).toBe('–');
  });

  it('of energy are printed in the unit of their size', () => {
    expect(energy(17.305)).toEqual({ value: '17.305', unit: 'J' });
    expect(energy(0.0123)).toEqual({ value: '12.300', unit: 'mJ' });
    expect(energy(4200)).toEqual({ value: '4.200', unit: 'kJ' });
  });
});

describe('the lines of the account', () => {
  it('are named by cause and item numbers, with the segment’s name or its place in the track', () => {
    expect(lineName(line({}), items, everyKind)).toBe('Friction 1/8');
    expect(lineName(line({ on: 'chute', segment: 1 }), items, everyKind)).toBe('Friction 1/8 part 2');
    expect(lineName(line({ on: 'chute', segment: 1 }), items, everyKind, true)).toBe('1/8 part 2');
    expect(lineName(line({ role: 'brought', account: null, of: null }), items, everyKind)).toBe('Brought forward');
    expect(lineName(line({ role: 'carried', account: null, of: null }), items, everyKind, true)).toBe('Balance c/f');
    expect(lineName(line({ account: 'gravity', of: 'box' }), items, everyKind)).toBe('Gravity');
  });

  it('that are nil go first when there is no room, but never what opens, closes, or is the method’s', () => {
    const nil = line({ printed: '0.000' });
    const lines = [line({}), nil, line({ account: 'numerical', of: null, printed: '0.000' }), line({ role: 'unbooked', account: null, of: null, printed: '0.000' })]; // prettier-ignore
    expect(shownLines(lines, 4)).toHaveLength(4);
    expect(shownLines(lines, 3)).toEqual(lines.filter((each) => each !== nil));
  });

  it('show gravity and the causes of numerical as one each, without losing a joule or a body', () => {
    const entry = (account: AccountName, of: string | null, body: string, work: number) => ({ account, of, kind: 'stored' as const, work, byBody: { [body]: work }, heat: 0, places: [] }); // prettier-ignore
    const ledger = { entries: [entry('numerical', null, 'box', 0.25), entry('gravity', 'box', 'box', 3), entry('spring', 'coil', 'box', 1), entry('gravity', 'disc', 'disc', 2), entry('numerical', null, 'box', -0.5)] } as unknown as Ledger; // prettier-ignore
    const merged = mergeEntries(ledger).entries;
    expect(merged.map(({ account, of, work }) => [account, of, work])).toEqual([['gravity', null, 5], ['spring', 'coil', 1], ['numerical', null, -0.25]]); // prettier-ignore
    expect(merged[0].byBody).toEqual({ box: 3, disc: 2 });
    expect(lineName(line({ account: 'gravity', of: null }), items, everyKind)).toBe('Gravity');
  });

  it('have a look without a run, too', () => {
    expect(accountLook(null, 'friction', ['box', 'chute'])).toBe('friction');
    expect(accountLook(null, 'spring', 'coil')).toBe('spring');
  });
});

describe('the parts list, the item cards and the key', () => {
  it('say something of every item', () => {
    for (const item of items) {
      expect(itemData(item, everyKind), item.id).not.toBe('');
      for (const { name, value } of itemFields(item, everyKind, items)) {
        expect(name).not.toBe('');
        expect(value, `${item.id}: ${name}`).not.toMatch(/NaN|undefined|Infinity/);
      }
    }
  });

  it('give a spring’s fitted length and force as the sheet has them', () => {
    const coil = items.find(({ id }) => id === 'coil')!;
    const fields = itemFields(coil, everyKind, items);
    expect(fields.find(({ name }) => name === 'Fitted length')).toMatchObject({ value: '180', unit: 'mm' });
    expect(fields.find(({ name }) => name === 'Fitted force')).toMatchObject({ value: '−2', unit: 'N' });
    expect(fields.find(({ name }) => name === 'End A on')?.value).toBe('1 Box');
  });

  it('explain the symbols that the drawing has, and no others', () => {
    const names = (mechanism: typeof everyKind) => symbolsOf(mechanism).flatMap(({ symbols }) => symbols.map(({ name }) => name)); // prettier-ignore
    expect(names(everyKind)).toEqual(expect.arrayContaining(['Body', 'Track', 'Pin', 'Slide', 'Gear', 'Spring', 'Damper', 'Drive', 'Load'])); // prettier-ignore
    const bare = { ...everyKind, joints: [], springs: [], dampers: [], drives: [], loads: [] };
    expect(names(bare)).toEqual(['Body', 'Point mass', 'Track']);
  });
});
