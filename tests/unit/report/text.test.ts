import { describe, expect, it } from 'vitest';
import { fit, hanging, left, right, spread, table, wrap } from '../../../sim/report/text/layout.js';
import { figure, lengthUnit, massUnit, short, speedUnit, time } from '../../../sim/report/text/quantities.js';

describe('setting text', () => {
  it('keeps a field to its width', () => {
    expect([left('ab', 4), right('ab', 4), fit('abcdef', 4)]).toEqual(['ab  ', '  ab', 'abc…']);
    expect(spread('left side', 'right', 10)).toBe('left…right');
    expect(spread('left', 'right', 12)).toBe('left   right');
  });

  it('wraps at spaces and breaks a word that is longer than a line', () => {
    expect(wrap('one two three', 7)).toEqual(['one two', 'three']);
    expect(wrap('abcdefgh', 3)).toEqual(['abc', 'def', 'gh']);
    expect(hanging('Nil: ', 'one two', 9)).toEqual(['Nil: one', '     two']);
  });

  it('puts columns that do not fit into a block below, with the first columns again', () => {
    const column = (head: string): { head: string; cells: string[]; align: 'right' } => ({
      head,
      cells: ['1'],
      align: 'right',
    });
    expect(table([column('id'), column('aaaa'), column('bbbb')], 1, 9)).toEqual([
      'id  aaaa',
      '─'.repeat(9),
      ' 1     1',
      '',
      'id  bbbb',
      '─'.repeat(9),
      ' 1     1',
    ]);
  });
});

describe('printing quantities', () => {
  it('chooses one unit for all figures of a column', () => {
    expect([[12], [0.42, 3], [2e-4], [0], []].map((values) => lengthUnit(values).symbol)).toEqual([
      'm',
      'mm',
      'µm',
      'm',
      'm',
    ]);
    expect([[0.01, -2], [0.1]].map((values) => speedUnit(values).symbol)).toEqual(['m/s', 'mm/s']);
    expect([[4.2], [0.02]].map((values) => massUnit(values).symbol)).toEqual(['kg', 'g']);
  });

  it('prints a minus sign, and none before nil', () => {
    const metres = lengthUnit([12]);
    expect([-1.5, 0, -0, -1e-9].map((value) => figure(value, metres))).toEqual(['−1.500', '0.000', '0.000', '0.000']);
  });

  it('prints a time in the unit that suits it', () => {
    expect([2.5e-4, 0.031, 1.2345, 0].map(time)).toEqual(['250 µs', '31 ms', '1.23 s', '0 s']);
  });

  it('prints three significant digits', () => {
    expect([1234.5, -0.0012345, 2].map(short)).toEqual(['1230', '−0.00123', '2']);
  });
});
