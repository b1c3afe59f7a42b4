import {
  joinTracks,
  nearestOnRun,
  newFoot,
  pointAt,
  TOUCHING,
  type Foot,
  type RunLink,
  type SmoothRun,
} from '../../geometry/index.js';
import type { Track } from '../../mechanism/kinds/track.js';

/** One smooth run of a track in a chain. `along` is +1 where the chain runs with the track's path, −1 against it. */
export interface Link {
  run: SmoothRun;
  track: number;
  along: 1 | -1;
  /** Sign of the free side relative to the run's path: +1 left, −1 right, 0 both. */
  free: 1 | -1 | 0;
  /** Lines only. */
  isStraight: boolean;
}

/** Bounding box in engine units. */
export interface Bounds {
  lowX: number;
  lowY: number;
  highX: number;
  highY: number;
}

/**
 * Runs that pass smoothly into each other, from one track to the next too. A body that slides from link to link stays on
 * one contact, so that no impact is seen where there is no corner.
 */
export interface Chain {
  links: Link[];
  closed: boolean;
  /** One straight line: every point of a face meets it along one normal. */
  straight: boolean;
  /** Open ends, corners included [engine length]. */
  ends: ChainEnd[];
  bounds: Bounds;
}

export interface ChainEnd {
  x: number;
  y: number;
  link: number;
  segment: number;
  /** Direction of the link's path there. */
  tx: number;
  ty: number;
  /** Another track lies against it, so that nothing flat can reach it: the inside of a corner. */
  isHidden: boolean;
  /** The same corner is an end of an earlier chain of the same track, which stands for it. */
  isRepeated: boolean;
}

export interface ChainFoot {
  foot: Foot;
  link: number;
  /** Held at an end that nothing continues. */
  held: boolean;
}

/** Joins the runs of all tracks (in engine units) into chains. */
export function buildChains(tracks: readonly Track[], extent: number): Chain[] {
  const paths = joinTracks(tracks, extent);
  const used = new Set<SmoothRun>();
  const chains: Chain[] = [];
  const owner = new Map<SmoothRun, number>();
  paths.forEach((path, track) => path.runs.forEach((run) => owner.set(run, track)));
  for (const path of paths) {
    for (const run of path.runs) {
      if (used.has(run)) continue;
      chains.push(chainFrom(run, used, owner, tracks));
    }
  }
  for (const chain of chains) hideInsideCorners(chain, chains, TOUCHING * extent);
  markRepeated(chains, TOUCHING * extent);
  return chains;
}

function chainFrom(
  seed: SmoothRun,
  used: Set<SmoothRun>,
  owner: Map<SmoothRun, number>,
  tracks: readonly Track[],
): Chain {
  const before = walk(seed, -1, used);
  const isRing = before.some(([run]) => run === seed);
  const steps: [SmoothRun, 1 | -1][] = isRing ? [[seed, 1]] : [...before.reverse(), [seed, 1]];
  used.add(seed);
  steps.push(...walk(seed, 1, used).filter(([run]) => !steps.some(([known]) => known === run)));
  for (const [run] of steps) used.add(run);
  const links = steps.map(([run, along]): Link => {
    const track = owner.get(run) ?? 0;
    const side = tracks[track].side;
    const isStraight = run.pieces.every((piece) => piece.kind === 'line');
    return { run, track, along, free: side === 'both' ? 0 : side === 'left' ? 1 : -1, isStraight };
  });
  const closed = isRing || (links.length === 1 && seed.closed);
  const single = links[0].run;
  return {
    links,
    closed,
    straight: links.length === 1 && single.pieces.length === 1 && single.pieces[0].kind === 'line',
    ends: closed ? [] : openEnds(links),
    bounds: boundsOf(links),
  };
}

/** Runs met going from `seed` in a direction, each with its sense relative to the seed's own. */
function walk(seed: SmoothRun, direction: 1 | -1, used: ReadonlySet<SmoothRun>): [SmoothRun, 1 | -1][] {
  const met: [SmoothRun, 1 | -1][] = [];
  const isMet = (candidate: SmoothRun): boolean => met.some(([run]) => run === candidate);
  let link: RunLink | null = direction === 1 ? seed.next : seed.previous;
  while (link && !used.has(link.run) && !isMet(link.run)) {
    const entersAtStart = link.at === 'start';
    const along: 1 | -1 = entersAtStart === (direction === 1) ? 1 : -1;
    met.push([link.run, along]);
    if (link.run === seed) break;
    link = entersAtStart ? link.run.next : link.run.previous;
  }
  return met;
}

function openEnds(links: Link[]): ChainEnd[] {
  const last = links.length - 1;
  const end = (link: number, atStart: boolean): ChainEnd => {
    const { run, along } = links[link];
    const { x, y, tx, ty, segment } = pointAt(run, atStart === (along === 1) ? 0 : run.length);
    return { x, y, link, segment, tx, ty, isHidden: false, isRepeated: false };
  };
  return [end(0, true), end(last, false)];
}

const other: ChainFoot = { foot: newFoot(), link: 0, held: false };

/** Marks the ends of a chain that another track (or its own far end) stands against, on the free side. */
function hideInsideCorners(chain: Chain, chains: readonly Chain[], near: number): void {
  chain.ends.forEach((end, index) => {
    const { free } = chain.links[end.link];
    if (free === 0) return;
    const [nx, ny] = [-end.ty * free, end.tx * free];
    end.isHidden = chains.some((candidate) => {
      if (candidate === chain && chain.ends.length === 0) return false;
      const met = candidate === chain ? ownFarEnd(chain, index, near) : nearestOnChain(candidate, end.x, end.y, other);
      if (!met || Math.abs(met.foot.distance) > near) return false;
      if (candidate !== chain && !met.held && !isAtEnd(candidate, met, near)) return true;
      // Where two ends meet, the other path leads away from here, into our free side or out of it.
      const away = met.foot.s <= near ? 1 : -1;
      return away * (met.foot.tx * nx + met.foot.ty * ny) > 1e-9;
    });
  });
}

function markRepeated(chains: readonly Chain[], near: number): void {
  const seen: { end: ChainEnd; track: number }[] = [];
  for (const { ends, links } of chains) {
    for (const end of ends) {
      const { track } = links[end.link];
      end.isRepeated = seen.some(
        (known) => known.track === track && Math.hypot(known.end.x - end.x, known.end.y - end.y) <= near,
      );
      if (!end.isHidden) seen.push({ end, track });
    }
  }
}

function ownFarEnd(chain: Chain, index: number, near: number): ChainFoot | null {
  const [here, there] = [chain.ends[index], chain.ends[1 - index]];
  if (Math.hypot(here.x - there.x, here.y - there.y) > near) return null;
  const { run } = chain.links[there.link];
  const atStart = Math.hypot(run.start[0] - there.x, run.start[1] - there.y) <= near;
  pointAt(run, atStart ? 0 : run.length, other.foot);
  return other;
}

function isAtEnd({ links }: Chain, { foot, link }: ChainFoot, near: number): boolean {
  return foot.s <= near || foot.s >= links[link].run.length - near;
}

function boundsOf(links: Link[]): Bounds {
  const boxes = links.map((link) => link.run.box);
  return {
    lowX: Math.min(...boxes.map((box) => box.minX)),
    lowY: Math.min(...boxes.map((box) => box.minY)),
    highX: Math.max(...boxes.map((box) => box.maxX)),
    highY: Math.max(...boxes.map((box) => box.maxY)),
  };
}

const trial = newFoot();

/** Nearest point of a chain; `out` is overwritten and returned. `hint` is the link to try first. */
export function nearestOnChain(chain: Chain, x: number, y: number, out: ChainFoot): ChainFoot {
  const { links } = chain;
  if (links.length === 1) {
    nearestOnRun(links[0].run, x, y, out.foot, out.foot.piece);
    out.link = 0;
  } else {
    let best = Infinity;
    for (let i = 0; i < links.length; i += 1) {
      nearestOnRun(links[i].run, x, y, trial, 0);
      const away = Math.abs(trial.distance);
      if (away >= best) continue;
      best = away;
      out.link = i;
      Object.assign(out.foot, trial);
    }
  }
  out.held = isHeld(chain, out);
  return out;
}

function isHeld(chain: Chain, { foot, link }: ChainFoot): boolean {
  if (chain.closed || !(foot.atStart || foot.atEnd)) return false;
  const { along } = chain.links[link];
  const atChainStart = along === 1 ? foot.atStart : foot.atEnd;
  return atChainStart ? link === 0 : link === chain.links.length - 1;
}
