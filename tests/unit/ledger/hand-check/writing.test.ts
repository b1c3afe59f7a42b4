import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fourFigures, printed, printedSum, quantity, sumScale } from '../../../../sim/ledger/hand-check/figures.js';
import {
  fraction,
  number,
  operator,
  plainText,
  root,
  symbol,
  words,
} from '../../../../sim/ledger/hand-check/tokens.js';

describe('a line in plain characters', () => {
  it('has letters with subscripts and powers, halves and roots', () => {
    const half = fraction([number('1')], [number('2')]);
    const line = [
      half,
      symbol('m'),
      symbol('v', { sub: '2', power: 2 }),
      operator('='),
      root([number('2'), operator('×'), number('8', 'J')]),
    ];
    expect(plainText(line)).toBe('½ m v₂² = √(2 × 8 J)');
  });

  it('writes a subscript that is no figure behind a low line, without its spaces', () => {
    expect(plainText([symbol('W', { sub: 'R 500' }), operator('+'), symbol('v', { sub: 'up-end' })])).toBe(
      'W_R500 + v_up-end',
    );
  });

  it('puts brackets and commas tight, and brackets round a fraction’s parts', () => {
    const line = [
      operator('('),
      symbol('a'),
      operator(')'),
      operator(','),
      fraction([symbol('I')], [symbol('m'), symbol('r')]),
      words('so'),
    ];
    expect(plainText(line)).toBe('(a), I / (m r) so');
  });

  it('puts the degree to its figure', () => {
    expect(plainText([operator('cos'), quantity(Math.PI / 9, 'slope')])).toBe('cos 20°');
  });
});

describe('figures', () => {
  it.each([
    [4.2, '4.2'],
    [1.13983, '1.140'],
    [0.00867264, '0.008673'],
    [12345.6, '12350'],
    [0, '0'],
    [-3.14159, '−3.142'],
    [20, '20'],
    [9.80665, '9.807'],
  ])('of %d are %s', (value, text) => expect(fourFigures(value)).toBe(text));

  it('are in the unit that suits them', () => {
    expect(plainText([quantity(0.42, 'length'), quantity(2400, 'rate'), quantity(0.05, 'mass')])).toBe(
      '420 mm 2.4 N/mm 50 g',
    );
  });
});

describe('a printed sum', () => {
  it('adds up as printed, whatever its amounts', () => {
    const amount = fc.double({ min: -1e4, max: 1e4, noNaN: true }).filter((value) => Math.abs(value) > 1e-6);
    fc.assert(
      fc.property(fc.array(amount, { minLength: 1, maxLength: 8 }), (amounts) => {
        const total = amounts.reduce((sum, value) => sum + value, 0);
        const scale = sumScale(amounts, total);
        const rounded = printedSum(amounts, scale);
        const parts = [...rounded.amounts, rounded.left].map((count) =>
          Number(printed(count, scale).replace('−', '-')),
        );
        const sum = parts.reduce((whole, part) => whole + part, 0);
        expect(Math.abs(sum - Number(printed(rounded.total, scale).replace('−', '-')))).toBeLessThan(
          0.1 / 10 ** scale.decimals,
        );
        rounded.amounts.forEach((count, i) => {
          const least = scale.joules / 10 ** scale.decimals;
          expect(Math.abs(count * least - amounts[i])).toBeLessThanOrEqual(least * 1.000001);
        });
      }),
      { seed: 20260, numRuns: 300 },
    );
  });

  it('gives the result four figures, and no amount more than five', () => {
    expect(sumScale([17.2988, -9.061], 8.2378)).toEqual({ unit: 'J', joules: 1, decimals: 3 });
    expect(sumScale([29.42, -29.4199], 0.0001).decimals).toBe(3);
    expect(sumScale([12000, -100], 11900)).toMatchObject({ unit: 'kJ', decimals: 2 });
  });
});
