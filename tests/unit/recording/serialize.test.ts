import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Recording } from '../../../sim/recording/index.js';
import { hashRecording, packRecording, unpackRecording } from '../../../sim/recording/index.js';
import { startRun } from './synthetic.js';

function shortRun(values: number[]): Recording {
  const { writer, row } = startRun({ bodies: [{ id: 'block', mass: 1, inertia: 0 }], accounts: [] });
  values.forEach((value, time) => row(time, [[1, value]]));
  writer.event({ kind: 'station', station: '1', time: 0, row: 0 });
  return writer.finish('reachedEnd');
}

describe('packRecording', () => {
  it('brings a recording through a transfer unchanged, and leaves the sender its own', () => {
    const run = shortRun([1, 2, 3]);
    const before = hashRecording(run);
    const { packed, transfer } = packRecording(run);
    const received = unpackRecording(structuredClone(packed, { transfer }));
    expect(packed.rows.byteLength).toBe(0);
    expect(received).toEqual({ ...run, rows: run.rows.slice() });
    expect(hashRecording(received)).toBe(before);
    expect(hashRecording(run)).toBe(before);
  });

  it('sends no more than the rows that were written', () => {
    const { packed } = packRecording(shortRun([1, 2, 3]));
    expect(packed.rows.byteLength).toBe(3 * 7 * 8);
  });
});

describe('hashRecording', () => {
  it('is the same on every machine and in every version of the program', () => {
    expect(hashRecording(shortRun([1, 2, 3]))).toMatchInlineSnapshot(`"62866213c47d36f9"`);
  });

  it('differs when any number differs in its last bit', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ noNaN: true }), { minLength: 1, maxLength: 20 }),
        fc.nat(),
        fc.nat(63),
        (values, at, bit) => {
          const changed = Float64Array.from(values);
          const words = new BigUint64Array(changed.buffer);
          words[at % values.length] ^= 1n << BigInt(bit);
          const [before, after] = [shortRun(values), shortRun([...changed])];
          expect(hashRecording(before)).not.toBe(hashRecording(after));
        },
      ),
    );
  });

  it('differs when an event, the end or the step differs', () => {
    const run = shortRun([1, 2, 3]);
    const others = [
      { ...run, events: [] },
      { ...run, end: 'cancelled' as const },
      { ...run, step: 1 },
    ];
    expect(new Set([run, ...others].map(hashRecording)).size).toBe(4);
  });

  it('tells zero from minus zero, and takes every NaN for the same', () => {
    expect(hashRecording(shortRun([0]))).not.toBe(hashRecording(shortRun([-0])));
    const odd = new Float64Array(new BigUint64Array([0xfff8000000000123n]).buffer)[0];
    expect(hashRecording(shortRun([NaN]))).toBe(hashRecording(shortRun([odd])));
  });

  it('does not look at the counters, which count work and not motion', () => {
    const run = shortRun([1]);
    expect(hashRecording({ ...run, counters: { steps: 9 } })).toBe(hashRecording(run));
  });
});
