import { describe, expect, it } from 'vitest';
import { formatQuantity, inUnit, displayUnit, readQuantity } from '../../../sim/mechanism/index.js';
import { dimensionText, fits, quantityKinds } from '../../../sim/mechanism/units/dimension.js';
import { unitRows } from '../../../sim/mechanism/units/table.js';

function valueOf(text: string): number {
  const result = readQuantity(text);
  if (!result.ok) throw new Error(`${text}: ${result.fault.code} ${result.fault.found}`);
  return result.quantity.value;
}

function faultOf(text: string): string {
  const result = readQuantity(text);
  return result.ok ? `read as ${result.quantity.value}` : result.fault.code;
}

describe('Reading a quantity', () => {
  it.each([
    ['25 mm', 0.025],
    ['35 mm', 0.035],
    ['12.5 N/mm', 12500],
    ['7850 kg/m^3', 7850],
    ['7850 kg/m³', 7850],
    ['7850 kg/m3', 7850],
    ['2 N m', 2],
    ['2 Nm', 2],
    ['2 N·m', 2],
    ['40 N s/m', 40],
    ['40 N*s/m', 40],
    ['0.02 kg*m^2', 0.02],
    ['9.80665 m/s^2', 9.80665],
    ['9.80665 m s^-2', 9.80665],
    ['9.80665 m s⁻²', 9.80665],
    ['3 m/s/s', 3],
    ['4 J/(kg m)', 4],
    ['5 kJ', 5000],
    ['81.5 GPa', 81.5e9],
    ['10 µm', 1e-5],
    ['10 μm', 1e-5],
    ['10 um', 1e-5],
    ['36 km/h', 10],
    ['30 %', 0.3],
    ['.5 mm', 0.0005],
    ['5. mm', 0.005],
    ['1e3 mm', 1],
    ['1E-3 m', 0.001],
    ['+5 mm', 0.005],
    ['-5 mm', -0.005],
    ['−5 mm', -0.005],
    ['10 000 N', 10000],
    ['1 t', 1000],
    ['0.3', 0.3],
  ])('takes %s as %d in SI', (text, value) => {
    expect(valueOf(text)).toBe(value);
  });

  it.each([
    ['30 deg', Math.PI / 6],
    ['180 deg', Math.PI],
    ['180°', Math.PI],
    ['1 rev', 2 * Math.PI],
    ['60 rpm', 2 * Math.PI],
    ['60 rev/min', 2 * Math.PI],
    ['1 N m/deg', 180 / Math.PI],
  ])('takes %s as the double nearest to its multiple of pi', (text, value) => {
    expect(Math.abs(valueOf(text) - value)).toBeLessThanOrEqual(2 ** -53 * value * 2);
  });

  it('takes 180 deg as pi itself, to the last bit', () => {
    expect(valueOf('180 deg')).toBe(Math.PI);
  });

  // Defined factors, NIST SP 811 (2008), appendix B; section 8 of the check values.
  it.each([
    ['1 in', 0.0254],
    ['1 ft', 0.3048],
    ['1 yd', 0.9144],
    ['1 mil', 0.0000254],
    ['1 lb', 0.45359237],
    ['1 lbf', 4.4482216152605],
    ['1 kgf', 9.80665],
    ['1 slug', 14.593902937206364],
    ['1 lbf/in', 175.12683524647636],
    ['1 in lbf', 0.1129848290276167],
    ['1 in-lbf', 0.1129848290276167],
    ['1 ft lbf', 1.3558179483314004],
    ['1 hp', 745.6998715822702],
    ['1 PS', 735.49875],
    ['1 psi', 6894.757293168361],
    ['0.5 lbf/in', 87.56341762323818],
  ])('takes %s as the defined %d', (text, value) => {
    expect(Math.abs(valueOf(text) / value - 1)).toBeLessThan(4e-16);
  });

  it.each([
    ['1/4 in', 0.00635],
    ['1 1/2 in', 0.0381],
    ['1-1/2 in', 0.0381],
    ['1 1/2"', 0.0381],
    ['5 ft 3 in', 1.6002],
    ['-5 ft 3 in', -1.6002],
    [`5' 3"`, 1.6002],
    [`5'3"`, 1.6002],
    [`5'-3"`, 1.6002],
    ['5′ 3″', 1.6002],
    ['5 ft 3 1/2 in', 1.6129],
    ['2 min 30 s', 150],
    ['3,5 mm', 0.0035],
    ['0,125 mm', 0.000125],
    ['12,5 N/mm', 12500],
  ])('takes the workshop’s %s as %d', (text, value) => {
    expect(valueOf(text)).toBe(value);
  });

  it.each([
    ['', 'quantity-syntax'],
    ['mm', 'quantity-syntax'],
    ['25 mm mm-', 'quantity-syntax'],
    ['5..3 mm', 'quantity-syntax'],
    ['1.234,5 mm', 'quantity-syntax'],
    ['5 mm -3 mm', 'quantity-syntax'],
    ['5 ft 3', 'quantity-syntax'],
    ['5 ft 3 N', 'quantity-syntax'],
    ['1/0 in', 'quantity-syntax'],
    ['3 (N m', 'quantity-syntax'],
    ['3 N m)', 'quantity-syntax'],
    ['0x10 mm', 'unknown-unit'],
    ['NaN mm', 'quantity-syntax'],
    ['Infinity m', 'quantity-syntax'],
    [`${'9'.repeat(200)} mm`, 'quantity-syntax'],
    ['3 foo', 'unknown-unit'],
    ['3 MM', 'unknown-unit'],
    ['5 N/m s', 'ambiguous-unit'],
    ['1,500 mm', 'ambiguous-number'],
    ['1e400 m', 'number-range'],
    ['1e-400 m', 'number-range'],
  ])('refuses "%s" with %s', (text, code) => {
    expect(faultOf(text)).toBe(code);
  });

  it('suggests the unit that was meant', () => {
    const result = readQuantity('3 lbs');
    expect(result).toMatchObject({
      ok: false,
      fault: { accepted: expect.stringContaining('did you mean lb?') as string },
    });
  });

  it('keeps zero apart from what is too small to be told from it', () => {
    expect(valueOf('0e-500 m')).toBe(0);
  });
});

describe('The table of units', () => {
  it('has each symbol once', () => {
    const symbols = unitRows.map((row) => row.symbol);
    expect(new Set(symbols).size).toBe(symbols.length);
  });

  it('shows every quantity in units of its own dimension', () => {
    for (const kind of Object.values(quantityKinds)) {
      for (const unit of [kind.si, ...kind.display]) {
        const read = readQuantity(`1 ${unit}`);
        expect(read.ok && fits(read.quantity.dimension, kind.dimension), unit).toBe(true);
      }
      expect(valueOf(`1 ${kind.si}`), kind.si).toBe(1);
    }
  });
});

describe('Dimensions', () => {
  it('let a radian be left out of a compound unit, and only there', () => {
    const { torque, torsionRate, angle, number, spin } = quantityKinds;
    expect(fits(torque.dimension, torsionRate.dimension)).toBe(true);
    expect(fits([0, 0, -1, 0], spin.dimension)).toBe(true);
    expect(fits(torsionRate.dimension, torque.dimension)).toBe(false);
    expect(fits(number.dimension, angle.dimension)).toBe(false);
  });

  it('are written as products of base units', () => {
    expect(dimensionText(quantityKinds.torque.dimension)).toBe('kg m^2/s^2');
    expect(dimensionText(quantityKinds.torsionRate.dimension)).toBe('kg m^2/(s^2 rad)');
    expect(dimensionText(quantityKinds.spin.dimension)).toBe('rad/s');
    expect(dimensionText([0, 0, -1, 0])).toBe('1/s');
    expect(dimensionText(quantityKinds.number.dimension)).toBe('no unit');
  });
});

describe('Showing a quantity', () => {
  it.each([
    [0.025, 'length', '25 mm'],
    [2.5, 'length', '2.5 m'],
    [0, 'length', '0 mm'],
    [0.000004, 'length', '4 um'],
    [12500, 'rate', '12.5 N/mm'],
    [Math.PI / 6, 'angle', '30 deg'],
    [Math.PI, 'spin', '30 rpm'],
    [0.3, 'number', '0.3'],
    [-1500, 'force', '-1.5 kN'],
    [1 / 3, 'mass', '333.333 g'],
  ] as const)('writes %d as a %s: %s', (value, kind, text) => {
    expect(formatQuantity(value, kind)).toBe(text);
  });

  it('takes the unit and the digits it is told', () => {
    expect(formatQuantity(1 / 3, 'mass', { unit: 'kg', digits: 3 })).toBe('0.333 kg');
    expect(formatQuantity(4.4482216152605, 'force', { unit: 'lbf' })).toBe('1 lbf');
  });

  it('chooses the greatest unit in which the value is at least one', () => {
    expect(displayUnit(0.001, 'length')).toBe('mm');
    expect(displayUnit(0.9994, 'length')).toBe('mm');
    expect(displayUnit(-1, 'length')).toBe('m');
  });

  it('refuses a unit that is none', () => {
    expect(() => inUnit(1, 'foo')).toThrow(RangeError);
  });
});
