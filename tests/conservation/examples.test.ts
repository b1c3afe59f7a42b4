import { readdirSync, readFileSync } from 'node:fs';
import * as v from 'valibot';
import { describe, expect, it } from 'vitest';
import { accountPage, bookLedger, closes } from '../../sim/ledger/index.js';
import { readMechanism } from '../../sim/mechanism/index.js';
import { checkResult } from '../../sim/report/index.js';
import { resultSchema } from '../../sim/report/result.js';
import { runStepper } from '../../sim/stepper/index.js';

const folder = new URL('../../assets/examples/', import.meta.url);
const files = readdirSync(folder).filter((name) => name.endsWith('.json'));

describe.each(files)('the account of %s', (file) => {
  const { mechanism, problems } = readMechanism(readFileSync(new URL(file, folder), 'utf8'));
  if (!mechanism) throw new Error(problems.map(({ text }) => text).join('\n'));
  const recording = runStepper(mechanism);
  const result = checkResult({ file, title: mechanism.title, mechanism, stepper: recording, problems });
  const ledgers = result.stepper?.ledgers ?? [];
  const whole = { from: '', to: '', fromRow: 0, toRow: recording.rowCount - 1 };

  it('closes from the first row to the last to 1e-12 of the turnover, for each body alone and for all', () => {
    const bodies = recording.layout.bodies.map(({ id }) => id);
    const run = bookLedger(recording, whole, bodies).turnover;
    for (const system of [bodies, ...bodies.map((body) => [body])]) {
      const ledger = bookLedger(recording, whole, system);
      expect(closes(ledger)).toBe(true);
      expect(Math.abs(ledger.unbooked)).toBeLessThanOrEqual(1e-12 * run);
    }
  });

  it('gives as work of every store what the store has lost', () => {
    const { entries, turnover } = bookLedger(recording, whole, mechanism.system);
    for (const { kind, work, stored } of entries) {
      if (kind !== 'stored' || !stored) continue;
      expect(Math.abs(stored.from - stored.to - work)).toBeLessThanOrEqual(1e-12 * (Math.abs(stored.from) + turnover));
    }
  });

  it('puts all that was lost at places that add up', () => {
    for (const { work, heat, places } of ledgers.flatMap(({ entries }) => entries)) {
      if (places.length === 0) continue;
      const size = places.reduce((sum, place) => sum + Math.abs(place.work) + Math.abs(place.heat), 0);
      expect(Math.abs(places.reduce((sum, place) => sum + place.work, -work))).toBeLessThanOrEqual(1e-9 * size);
      expect(Math.abs(places.reduce((sum, place) => sum + place.heat, -heat))).toBeLessThanOrEqual(1e-9 * size);
    }
  });

  it('adds up in print', () => {
    for (const page of ledgers.map((ledger) => accountPage(ledger))) {
      for (const side of [page.received, page.paidOut]) {
        const units = side.map(({ printed }) => Math.round(1000 * Number(printed.replace('−', '-'))));
        expect(units.reduce((sum, unit) => sum + unit, 0)).toBe(Math.round(1000 * Number(page.total)));
      }
    }
  });

  it('is a result as the schema says, with an error for nothing', () => {
    expect(v.parse(resultSchema, JSON.parse(JSON.stringify(result)))).toEqual(result);
    expect(result.findings.filter(({ severity }) => severity === 'error')).toEqual([]);
  });
});
