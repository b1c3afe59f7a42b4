import { describe, expect, it } from 'vitest';
import type { JsonObject } from '../../../sim/mechanism/json/value.js';
import { altered, changed, ramp, readDocument, told } from './samples.js';

/** A disc of 20 mm at a place, with the ramp's document's track replaced. */
function disc(at: [string, string], track: JsonObject, between: [string, string] = ['block', 'ramp']): JsonObject {
  const placed = changed(ramp(), 'bodies', 0, { shape: { kind: 'disc', radius: '20 mm' }, rest: null, at });
  return altered(placed, { tracks: [{ id: 'ramp', ...track }], contacts: [{ between }] });
}

const floor = { from: [0, 0], to: [{ to: ['1 m', 0] }] };
const square = [{ to: ['1 m', 0] }, { to: ['1 m', '1 m'] }, { to: [0, '1 m'] }];
/** Counter-clockwise: the inside is on the left. */
const room = { from: [0, 0], to: square, closed: true, side: 'left' };
const block = { ...room, side: 'right' };

describe('A body that starts at a track', () => {
  it('may touch it, to within 1e-6 of the extent', () => {
    expect(told(readDocument(disc(['500 mm', '20 mm'], floor)))).toEqual([]);
    expect(told(readDocument(disc(['500 mm', '19.9995 mm'], floor)))).toEqual([]);
    expect(told(readDocument(disc(['500 mm', '19.99 mm'], floor)))).toEqual(['starts-inside /bodies/0']);
  });

  it('is told how deep it is, and where', () => {
    const [problem] = readDocument(disc(['500 mm', '15 mm'], floor)).problems;
    expect(problem).toMatchObject({ found: '"block" 5 mm inside "ramp" at [500 mm, 0 mm]', of: ['block', 'ramp'] });
  });

  it('may be beside and beyond its ends', () => {
    expect(told(readDocument(disc(['1.1 m', '-10 mm'], floor)))).toEqual([]);
    expect(told(readDocument(disc(['1.01 m', '0 mm'], floor)))).toEqual(['starts-inside /bodies/0']);
  });

  it('is behind it, wrongly where near and named, perhaps where far or meant by "*"', () => {
    expect(told(readDocument(disc(['500 mm', '-35 mm'], floor)))).toEqual(['starts-inside /bodies/0']);
    expect(told(readDocument(disc(['500 mm', '-200 mm'], floor)))).toEqual(['starts-behind /bodies/0']);
    expect(told(readDocument(disc(['500 mm', '-35 mm'], floor, ['*', '*'])))).toEqual(['starts-behind /bodies/0']);
    expect(told(readDocument(disc(['500 mm', '-200 mm'], floor, ['*', '*'])))).toEqual([]);
  });

  it('is in the solid of a closed track wherever it is within it', () => {
    expect(told(readDocument(disc(['500 mm', '500 mm'], block, ['*', '*'])))).toEqual(['starts-inside /bodies/0']);
    expect(told(readDocument(disc(['500 mm', '-500 mm'], block, ['*', '*'])))).toEqual([]);
  });

  it('may be in or out of a closed track that is hollow', () => {
    expect(told(readDocument(disc(['500 mm', '500 mm'], room, ['*', '*'])))).toEqual([]);
    expect(told(readDocument(disc(['500 mm', '-500 mm'], room, ['*', '*'])))).toEqual([]);
  });

  it('may be on either side of a track that is free on both', () => {
    const both = { ...floor, side: 'both' };
    expect(told(readDocument(disc(['500 mm', '-20 mm'], both)))).toEqual([]);
    expect(told(readDocument(disc(['500 mm', '-10 mm'], both)))).toEqual(['starts-inside /bodies/0']);
  });

  it('is not looked at where nothing lets the two touch', () => {
    expect(told(readDocument(altered(disc(['500 mm', '0 mm'], floor), { contacts: [] })))).toEqual([]);
  });
});
