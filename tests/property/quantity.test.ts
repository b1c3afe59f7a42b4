import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { formatQuantity, inUnit, quantityKinds, readQuantity, type QuantityName } from '../../sim/mechanism/index.js';
import { decimal, over, toDouble, type Exact } from '../../sim/mechanism/units/exact.js';

const valueOf = (text: string): number => {
  const result = readQuantity(text);
  if (!result.ok) throw new Error(`${text}: ${result.fault.code}`);
  return result.quantity.value;
};

const finite = fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e100, max: 1e100 });
const decimals = fc.tuple(fc.integer({ min: -999_999, max: 999_999 }), fc.integer({ min: -6, max: 6 }));
const kinds = fc.constantFrom(...(Object.keys(quantityKinds) as QuantityName[]));

describe('Quantities, for any number', () => {
  it('in SI units are the number itself', () => {
    fc.assert(
      fc.property(finite, kinds, (value, kind) => {
        expect(valueOf(`${value} ${quantityKinds[kind].si}`)).toBe(value === 0 ? 0 : value);
      }),
    );
  });

  it('in millimetres are the double nearest to the number with its exponent less by three', () => {
    fc.assert(
      fc.property(decimals, ([digits, exponent]) => {
        expect(valueOf(`${digits}e${exponent} mm`)).toBe(Number(`${digits}e${exponent - 3}`) + 0);
      }),
    );
  });

  it('do not mind a decimal comma, where it cannot group thousands', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 9999 }), fc.integer({ min: 0, max: 99 }), (whole, part) => {
        expect(valueOf(`${whole},${part} mm`)).toBe(valueOf(`${whole}.${part} mm`));
      }),
    );
  });

  it('as mixed numbers in inches are sixty-fourths of 25.4 mm', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 500 }), fc.integer({ min: 1, max: 63 }), (whole, part) => {
        const exact: Exact = over(decimal(String((64 * whole + part) * 254)), decimal('640000'));
        expect(valueOf(`${whole} ${part}/64 in`)).toBe(toDouble(exact));
      }),
    );
  });

  it('in feet and inches are all inches', () => {
    fc.assert(
      fc.property(fc.nat(500), fc.nat(11), (feet, inches) => {
        expect(valueOf(`${feet} ft ${inches} in`)).toBe(valueOf(`${12 * feet + inches} in`));
      }),
    );
  });

  it('come back from the text they are shown as, to the digits shown', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-12, max: 1e12, noNaN: true }), kinds, (value, kind) => {
        expect(Math.abs(valueOf(formatQuantity(value, kind, { digits: 12 })) / value - 1)).toBeLessThan(1e-11);
      }),
    );
  });

  it('are the same through any unit of their kind, to rounding', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-6, max: 1e6, noNaN: true }), kinds, (value, kind) => {
        for (const unit of quantityKinds[kind].display) {
          expect(Math.abs(valueOf(`${inUnit(value, unit)} ${unit}`) / value - 1)).toBeLessThan(1e-15);
        }
      }),
    );
  });

  it('never throw, whatever the text', () => {
    const pieces = fc.constantFrom(
      '1',
      '2.5',
      ',5',
      '1/2',
      ' ',
      '-',
      '−',
      'mm',
      'ft',
      "'",
      '"',
      '/',
      '^2',
      '(',
      ')',
      '·',
      '²',
      'e3',
      '%',
      'µm',
      'x',
    );
    const texts = fc.oneof(
      fc.string(),
      fc.array(pieces, { maxLength: 12 }).map((parts) => parts.join('')),
    );
    fc.assert(
      fc.property(texts, (text) => {
        const result = readQuantity(text);
        expect(result.ok ? Number.isFinite(result.quantity.value) : result.fault.code.length > 0).toBe(true);
      }),
      { numRuns: 2000 },
    );
  });
});

describe('Exact decimals', () => {
  it('round to the double that JavaScript reads from the same digits', () => {
    fc.assert(
      fc.property(
        fc.bigInt({ min: -(10n ** 30n), max: 10n ** 30n }),
        fc.integer({ min: -330, max: 290 }),
        (digits, exponent) => {
          const text = `${digits}e${exponent}`;
          const nearest = Number(text);
          // Below the normal range, two roundings may fall one unit apart.
          fc.pre(nearest === 0 || Math.abs(nearest) > 1e-307);
          expect(toDouble(decimal(text)) + 0).toBe(nearest + 0);
        },
      ),
    );
  });
});
