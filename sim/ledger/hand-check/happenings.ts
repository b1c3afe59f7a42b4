import { refuse } from './refusal.js';
import type { Scene } from './scene.js';

/** A stretch of a run without an impact, a turning back or a change of what touches, as the recording tells it. */
export interface Leg {
  /** [s] */
  from: number;
  to: number;
  /** Rows to look at for what touches: those between its ends where there are enough. */
  rows: number[];
  /** It ends where the body turns back. */
  turns: boolean;
}

/** What was struck at one instant. `row` is the one before it. */
export interface Blow {
  row: number;
  time: number;
  pairs: [string, string][];
  joints: string[];
}

/** What happens to a body between two rows, in order. */
export type Happening = { kind: 'leg'; leg: Leg } | { kind: 'blow'; blow: Blow };

interface Cut {
  before: number;
  after: number;
  time: number;
  blow?: Blow;
  turns?: boolean;
}

/** Below this share of the greatest speed a body counts as standing, for telling where it turns back. */
const STANDING = 1e-4;
/** A body that could not have gone further than this share of the extent has not moved. */
const NOWHERE = 1e-6;

/** Legs and blows of a span of rows; cut at every event of the run, and where the body turns back. */
export function happenings(scene: Scene, body: string, fromRow: number, toRow: number): Happening[] {
  const turns = turningPoints(scene, body, fromRow, toRow);
  const cuts = [...eventCuts(scene, body, fromRow, toRow), ...turns].sort(
    (a, b) => a.time - b.time || a.before - b.before,
  );
  const list: Happening[] = [];
  let [row, time] = [fromRow, scene.time(fromRow)];
  const end: Cut = { before: toRow, after: toRow, time: scene.time(toRow) };
  for (const cut of [...cuts, end]) {
    if (cut.time > time)
      list.push({
        kind: 'leg',
        leg: { from: time, to: cut.time, rows: rowsBetween(row, cut.before), turns: cut.turns === true },
      });
    if (cut.blow) list.push({ kind: 'blow', blow: cut.blow });
    [row, time] = [cut.after, cut.time];
  }
  return list;
}

function rowsBetween(from: number, to: number): number[] {
  const rows = Array.from({ length: Math.max(1, to - from + 1) }, (_, i) => from + i);
  return rows.length > 2 ? rows.slice(1, -1) : rows;
}

/** The bodies that a body has to do with in a span, itself among them: those it touches, and those they touch. */
function company(scene: Scene, body: string, pairs: readonly (readonly string[])[], fromRow: number): Set<string> {
  const known = new Set([body]);
  for (const member of known) {
    for (const pair of pairs) if (pair.includes(member)) pair.forEach((id) => scene.isBody(id) && known.add(id));
    for (const pair of scene.pairsOf(member)) {
      if (scene.touches(pair, fromRow)) pair.between.forEach((id) => scene.isBody(id) && known.add(id));
    }
  }
  return known;
}

function eventCuts(scene: Scene, body: string, fromRow: number, toRow: number): Cut[] {
  const cuts = new Map<number, Cut>();
  const events = scene.recording.events.filter(({ kind, row }) => kind !== 'station' && row >= fromRow && row < toRow);
  const pairs = events.flatMap((event) => ('pair' in event ? [event.pair] : []));
  const concerned = company(scene, body, pairs, fromRow);
  for (const event of events) {
    if ('pair' in event && !event.pair.some((id) => concerned.has(id))) continue;
    const { row, time } = event;
    const cut = cuts.get(row) ?? { before: row, after: row, time };
    cuts.set(row, cut);
    if (event.kind !== 'touch' && event.kind !== 'limit') continue;
    cut.after = row + 1;
    cut.blow ??= { row, time, pairs: [], joints: [] };
    if (event.kind === 'limit') cut.blow.joints.push(event.joint);
    else if (!cut.blow.pairs.some((pair) => samePair(pair, event.pair))) cut.blow.pairs.push(event.pair);
  }
  return [...cuts.values()];
}

const samePair = (a: readonly string[], b: readonly string[]): boolean => a.every((id) => b.includes(id));

/** Where the motion of a body changes its sign smoothly, between two rows that are no two sides of a blow. */
function turningPoints(scene: Scene, body: string, fromRow: number, toRow: number): Cut[] {
  const { inertia, mass } = scene.body(body);
  const headings = Array.from({ length: toRow - fromRow + 1 }, (_, i) => scene.heading(body, fromRow + i));
  const product = (a: number, b: number): number => {
    const [p, q] = [headings[a], headings[b]];
    return p.vx * q.vx + p.vy * q.vy + (inertia / mass) * p.spin * q.spin;
  };
  const speeds = headings.map((_, i) => Math.sqrt(product(i, i)));
  const time = scene.time(toRow) - scene.time(fromRow);
  const greatest = speeds.reduce((most, speed) => Math.max(most, speed), 0);
  if (greatest * time <= NOWHERE * scene.mechanism.extent) return [];
  const least = STANDING * greatest;
  const cuts: Cut[] = [];
  let last = -1;
  for (let i = 0; i < headings.length; i += 1) {
    if (speeds[i] <= least) continue;
    const isBlow = last >= 0 && scene.time(fromRow + i) === scene.time(fromRow + last);
    if (last >= 0 && !isBlow && product(last, i) < 0) cuts.push(turnBetween(scene, fromRow, speeds, last, i));
    last = i;
  }
  return cuts;
}

function turnBetween(scene: Scene, fromRow: number, speeds: number[], a: number, b: number): Cut {
  const [start, end] = [scene.time(fromRow + a), scene.time(fromRow + b)];
  if (b === a + 1) {
    const time = start + ((end - start) * speeds[a]) / (speeds[a] + speeds[b]);
    return { before: fromRow + a, after: fromRow + b, time, turns: true };
  }
  let slowest = a + 1;
  for (let i = a + 1; i < b; i += 1) if (speeds[i] < speeds[slowest]) slowest = i;
  return { before: fromRow + slowest, after: fromRow + slowest, time: scene.time(fromRow + slowest), turns: true };
}

/** More blows and turnings back than anybody sums by hand. */
const MOST = 4;

/** Refuses a span in which a body is struck or turns back too often. */
export function limitTo(count: number, body: string, what: string): void {
  if (count > MOST) refuse(`${body} ${what} ${count} times in between, more than is summed by hand.`);
}
