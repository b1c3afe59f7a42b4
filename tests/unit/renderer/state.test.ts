import { describe, expect, it, vi } from 'vitest';
import { rates } from '../../../renderer/state/playback.svelte.js';
import { Playback } from '../../../renderer/state/playback.svelte.js';
import { Account } from '../../../renderer/state/account.svelte.js';
import { Drawing } from '../../../renderer/state/drawing.svelte.js';
import { Run } from '../../../renderer/state/run.svelte.js';
import { pickedSpan } from '../../../renderer/account/picked-span.js';
import { connect, portPair, serve, type Handlers, type SolverMethods } from '../../../sim/protocol/index.js';
import { readMechanism } from '../../../sim/mechanism/index.js';
import { runAuditor } from '../../../sim/auditor/index.js';
import { runStepper } from '../../../sim/stepper/index.js';
import { solver } from '../../../sim/worker.js';
import { disc, floor } from '../../support/parts.js';
import { mechanismOf } from '../../support/run.js';

const mechanism = mechanismOf({
  bodies: [disc('ball', [0, 1], 0.1, 1)],
  tracks: [floor],
  contacts: [{ between: ['ball', 'floor'], restitution: 0.5 }],
  stations: [
    { id: '1', when: { start: true } },
    { id: '2', when: { touch: ['ball', 'floor'] } },
    { id: '3', when: { turns: { of: 'ball', along: [0, 1] } }, after: '2' },
    { id: '4', when: { touch: ['ball', 'floor'], count: 50 } },
  ],
  run: { until: 1 },
});
const recording = runStepper(mechanism);

describe('playback', () => {
  const playback = () => new Playback(() => recording);

  it('keeps within the run', () => {
    const player = playback();
    player.moveTo(99);
    expect(player.time).toBe(player.end);
    player.moveTo(-1);
    expect(player.time).toBe(0);
  });

  it('ticks from row to row, over both rows of an impact at once, and stops at the ends', () => {
    const player = playback();
    const times = [0];
    for (let i = 0; i < recording.rowCount + 5; i++) {
      player.tick(1);
      times.push(player.time);
    }
    expect(player.time).toBe(player.end);
    const distinct = new Set(times).size;
    const rows = new Set(Array.from({ length: recording.rowCount }, (_, row) => recording.rows[row * recording.layout.width])).size; // prettier-ignore
    expect(distinct).toBe(rows);
    for (let i = 0; i < recording.rowCount + 5; i++) player.tick(-1);
    expect(player.time).toBe(0);
  });

  it('feeds at the paper’s rate, ends at the end, and starts over from there', () => {
    const player = playback();
    player.rateIndex = rates.indexOf(0.5);
    expect(player.paper).toBe('1:2');
    player.toggle();
    player.feed(0.4);
    expect(player.time).toBeCloseTo(0.2, 12);
    player.feed(100);
    expect([player.time, player.feeding]).toEqual([player.end, false]);
    player.toggle();
    expect([player.time, player.feeding]).toEqual([0, true]);
  });

  it('chooses a rate at which a short run can be followed', () => {
    const player = playback();
    player.fitRate();
    expect(player.end / player.rate).toBeGreaterThan(2);
    expect(player.end / player.rate).toBeLessThan(13);
  });

  it('does nothing without a run', () => {
    const empty = new Playback(() => null);
    empty.toggle();
    empty.tick(1);
    expect([empty.time, empty.feeding, empty.end]).toEqual([0, false, 0]);
  });
});

describe('the account', () => {
  const account = () =>
    new Account(
      () => recording,
      () => mechanism,
      () => new Map(),
    );

  it('has a page for each pair of reached stations and one for the whole', () => {
    const pages = account().pages.map(({ from, to }) => `${from.id}→${to.id}`);
    expect(pages).toEqual(['1→2', '2→3', '1→3']);
  });

  it('opens the page of two stations whichever is named first, and keeps it when both are one', () => {
    const book = account();
    book.open('3', '2');
    expect([book.page?.from.id, book.page?.to.id]).toEqual(['2', '3']);
    book.open('3', '3');
    expect([book.page?.from.id, book.page?.to.id]).toEqual(['2', '3']);
  });

  it('prints sides that add up, in one unit over all pages', () => {
    const book = account();
    for (const { from, to } of book.pages) {
      book.open(from.id, to.id);
      const { received, paidOut, total, scale } = book.printed!;
      const sum = (lines: typeof received) => lines.reduce((all, { printed }) => all + Math.round(1000 * Number(printed)), 0); // prettier-ignore
      expect([sum(received), sum(paidOut)]).toEqual([
        Math.round(1000 * Number(total)),
        Math.round(1000 * Number(total)),
      ]);
      expect(scale.unit).toBe('J');
    }
  });

  it('finds when a picked entry’s work was done: the impact at the second station’s instant', () => {
    const book = account();
    book.open('2', '3');
    const impact = book.printed!.paidOut.find(({ account: cause }) => cause === 'impact')!;
    book.pick(impact);
    expect(book.picked).toEqual(impact);
    const [from, to] = pickedSpan(recording, book.page!, impact)!;
    expect(from).toBeCloseTo(book.page!.from.time, 6);
    expect(to - from).toBeLessThan(1e-6);
    book.pick(impact);
    expect(book.picked).toBeNull();
  });

  it('takes start and end where a document has no stations', () => {
    const plain = { ...mechanism, stations: [] };
    const bare = runStepper(plain);
    const book = new Account(
      () => bare,
      () => plain,
      () => new Map(),
    );
    expect(book.pages.map(({ from, to }) => `${book.mark(from.id)}→${book.mark(to.id)}`)).toEqual(['1→2']);
    expect(book.word('end')).toBe('end');
    expect(book.ledger).not.toBeNull();
  });
});

describe('a run in the window', () => {
  function client(handlers: Handlers<SolverMethods> = solver) {
    const [near, far] = portPair();
    serve<SolverMethods>(far, handlers);
    return connect<SolverMethods>(near);
  }

  it('ends as the solver’s own recording, and counts', async () => {
    const run = new Run();
    await run.start(client(), mechanism);
    expect([run.status, run.number, run.recording?.rowCount]).toEqual(['ended', 1, recording.rowCount]);
    await run.start(client(), mechanism);
    expect(run.number).toBe(2);
  });

  it('keeps what was recorded when it is halted', async () => {
    const run = new Run();
    const long = mechanismOf({ bodies: [disc('ball', [0, 1], 0.1, 1)], run: { until: 400, step: 1e-4 } });
    const ended = run.start(client(), long);
    await vi.waitFor(() => expect(run.recording?.rowCount ?? 0).toBeGreaterThan(0));
    run.halt();
    await ended;
    expect(run.status).toBe('halted');
    expect(run.recording?.rowCount).toBeGreaterThan(0);
  });

  it('of the auditor is recorded in the same way, and ends as its own recording', async () => {
    const run = new Run('audit');
    await run.start(client(), mechanism);
    expect([run.status, run.recording?.solver, run.recording?.end]).toEqual(['ended', 'auditor', 'reachedEnd']);
    expect(run.recording?.rowCount).toBe(runAuditor(mechanism).rowCount);
  });

  it('that a solver does not take is refused, with the findings that say why', async () => {
    const run = new Run('audit');
    const limited = { ...mechanism, bodies: mechanism.bodies.map((body) => ({ ...body, shape: { kind: 'cam' } as typeof body.shape })) }; // prettier-ignore
    await run.start(client(), limited);
    expect([run.status, run.recording]).toEqual(['refused', null]);
    expect(run.refusals.map(({ code, of }) => [code, of])).toEqual([['not-audited', ['ball']]]);
    await run.start(client(), mechanism);
    expect([run.status, run.refusals]).toEqual(['ended', []]);
  });

  it('goes on when the other solver’s thread breaks down', async () => {
    let crash: (reason: string) => void = () => undefined;
    const dead = connect<SolverMethods>({ post: () => undefined, listen: (_, crashed) => (crash = crashed) });
    const [stepper, auditor] = [new Run('run'), new Run('audit')];
    const ended = Promise.all([stepper.start(client(), mechanism), auditor.start(dead, mechanism)]);
    crash('out of memory');
    await ended;
    expect([stepper.status, auditor.status]).toEqual(['ended', 'failed']);
    expect(auditor.failure).toContain('out of memory');
  });

  it('of a document that is no longer on the sheet leaves no trace', async () => {
    const run = new Run();
    const ended = run.start(client(), mechanism);
    run.reset();
    await ended;
    expect([run.status, run.number, run.recording]).toEqual(['none', 0, null]);
  });

  it('says why, when the solver fails', async () => {
    const run = new Run();
    const failing: Handlers<SolverMethods> = {
      ...solver,
      run: () => {
        throw new Error('No solution for the contacts.');
      },
    };
    await run.start(client(failing), mechanism);
    expect([run.status, run.failure]).toEqual(['failed', 'No solution for the contacts.']);
  });
});

describe('a drawing in the window', () => {
  const text = JSON.stringify({
    format: 'joulewright/1',
    title: 'Feed',
    sheet: { drawingNumber: 'NW 1' },
    notes: '1 First.\nSecond.',
    bodies: [{ id: 'crate', name: 'Crate', shape: { kind: 'particle' }, mass: 1, at: [0, 0] }],
    tracks: [{ id: 'long-chute', name: 'Chute', from: [0, 0], to: [{ to: [1, 0] }] }],
    run: { until: 1 },
  });

  it('has the title block’s fields, its notes and the names of its parts', () => {
    const drawing = new Drawing();
    drawing.show('feed.json', readMechanism(text));
    expect([drawing.title, drawing.sheetField('drawingNumber'), drawing.sheetField('owner')]).toEqual([
      'Feed',
      'NW 1',
      '',
    ]);
    expect(drawing.notes).toEqual([
      { number: '1', text: 'First.' },
      { number: '', text: 'Second.' },
    ]);
    expect(drawing.items.map(({ name }) => name)).toEqual(['Crate', 'Chute']);
    expect(drawing.item?.id).toBe('crate');
  });

  it('lists errors before warnings and notes, and steps around them', () => {
    const drawing = new Drawing();
    drawing.show('bad.json', readMechanism(text.replace('"mass":1', '"mass":-1,"colour":"red"')));
    const order = ['error', 'warning', 'note'];
    const ranks = drawing.problems.map(({ severity }) => order.indexOf(severity));
    expect(ranks).toEqual([...ranks].sort((a, b) => a - b));
    expect(drawing.problems.length).toBeGreaterThan(1);
    drawing.stepProblem(-1);
    expect(drawing.shown).toBe(drawing.problems.length - 1);
    drawing.stepProblem(1);
    expect(drawing.problem).toBe(drawing.problems[0]);
    expect(drawing.mechanism).toBeNull();
  });
});
