import { describe, expect, it } from 'vitest';
import { startRun } from './synthetic.js';

const oneBody = { bodies: [{ id: 'block', mass: 1, inertia: 0 }], accounts: [] };

describe('RecordingWriter', () => {
  it('keeps rows as written while it grows, whatever their number', () => {
    const { writer, row } = startRun(oneBody);
    for (let i = 0; i < 3000; i++) row(i, [[1, i * i]]);
    const { rows, rowCount, layout } = writer.view();
    expect(rowCount).toBe(3000);
    expect(rows.length).toBe(3000 * layout.width);
    expect(rows[2999 * layout.width + 1]).toBe(2999 * 2999);
    expect(rows[17 * layout.width]).toBe(17);
  });

  it('starts a row with zeros', () => {
    const { writer, row } = startRun(oneBody);
    row(0, [[3, 9]]);
    row(1);
    expect([...writer.view().rows.slice(writer.layout.width)]).toEqual([1, 0, 0, 0, 0, 0, 0]);
  });

  it('takes two rows at one time, as an impact has', () => {
    const { row } = startRun(oneBody);
    row(1);
    expect(row(1)).toBe(1);
  });

  it('refuses a row that goes back in time or has none', () => {
    const { row } = startRun(oneBody);
    row(1);
    expect(() => row(0.5)).toThrow('cannot follow');
    expect(() => row(NaN)).toThrow('cannot follow');
  });

  it('refuses an event at a row that is not there', () => {
    const { writer, row } = startRun(oneBody);
    row(0);
    expect(() => writer.event({ kind: 'station', station: '1', time: 0, row: 1 })).toThrow('no such row');
  });

  it('gives views that do not change when the run goes on', () => {
    const { writer, row } = startRun(oneBody);
    row(0, [[1, 5]]);
    writer.event({ kind: 'station', station: '1', time: 0, row: 0 });
    const early = writer.view();
    for (let i = 1; i < 1000; i++) row(i, [[1, -1]]);
    writer.event({ kind: 'station', station: '2', time: 1, row: 1 });
    writer.finding({ severity: 'note', code: 'x', text: 'x', of: [] });
    expect(early.rowCount).toBe(1);
    expect(early.rows[1]).toBe(5);
    expect(early.rows.length).toBe(writer.layout.width);
    expect(early.events).toHaveLength(1);
    expect(early.findings).toHaveLength(0);
  });

  it('reads as cancelled until it is finished, and then as it ended', () => {
    const { writer, row } = startRun(oneBody);
    row(0);
    expect(writer.view().end).toBe('cancelled');
    expect(writer.finish('reachedEnd', { steps: 4 })).toMatchObject({ end: 'reachedEnd', counters: { steps: 4 } });
  });
});
