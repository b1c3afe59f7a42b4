import type { ContactPair } from '../../mechanism/kinds/contact.js';
import { PairAccount } from '../books.js';
import { partIndex, type Scene } from '../scene.js';

/** What the recorder shows of a pair at a row, in engine units. */
export interface PairReading {
  points: number;
  normal: number;
  friction: number;
  slip: number;
  x: number;
  y: number;
  nx: number;
  ny: number;
  segment: number;
}

/** A contact pair in engine units, with its accounts and what was last seen of it. */
export interface Pair {
  index: number;
  between: [string, string];
  /** Body indices in the document's order; −1 for a track. */
  first: number;
  second: number;
  /** Lower indices: the order of the accounts' slots. */
  low: number;
  high: number;
  staticFriction: number;
  kineticFriction: number;
  restitution: number;
  restSpeed: number;
  rollingResistance: number;
  stiffness: number;
  damping: number;
  isSoft: boolean;
  reaction: PairAccount;
  friction: PairAccount | null;
  rolling: PairAccount | null;
  impact: PairAccount;
  spring: PairAccount | null;
  damper: PairAccount | null;
  reading: PairReading;
  /** It carried force over the last step. */
  isLasting: boolean;
  wasSliding: boolean;
}

export function buildPair(scene: Scene, pair: ContactPair, index: number): Pair {
  const { scale, books, ids } = scene;
  const [first, second] = pair.between.map((id) => partIndex(scene, id)) as [number, number];
  // The ground, and then the body listed first, is A of the accounts.
  const [low, high] = second < 0 ? [second, first] : first < 0 ? [first, second] : [first, second];
  const bodies = PairAccount.bodies(ids, low, high);
  const open = (account: 'reaction' | 'friction' | 'rolling-resistance' | 'impact' | 'spring' | 'damper') =>
    new PairAccount(
      books.open(account, pair.between, bodies, {
        heat: account !== 'reaction' && account !== 'spring',
        stored: account === 'spring',
      }),
      low,
      high,
    );
  const rubs = pair.staticFriction > 0 || pair.kineticFriction > 0;
  return {
    index,
    between: pair.between,
    first,
    second,
    low,
    high,
    staticFriction: pair.staticFriction,
    kineticFriction: pair.kineticFriction,
    restitution: pair.restitution,
    restSpeed: pair.restSpeed / scale.speed,
    rollingResistance: pair.rollingResistance / scale.length,
    stiffness: (pair.compliant?.stiffness ?? 0) / scale.rate,
    damping: (pair.compliant?.damping ?? 0) / scale.damping,
    isSoft: pair.compliant !== undefined,
    reaction: open('reaction'),
    friction: rubs ? open('friction') : null,
    rolling: pair.rollingResistance > 0 ? open('rolling-resistance') : null,
    impact: open('impact'),
    spring: pair.compliant ? open('spring') : null,
    damper: pair.compliant ? open('damper') : null,
    reading: { points: 0, normal: 0, friction: 0, slip: 0, x: 0, y: 0, nx: 0, ny: 0, segment: -1 },
    isLasting: false,
    wasSliding: false,
  };
}

/** Adds work of an account by planck's order of the bodies (A, B), whichever way the pair has them. */
export function addWork(account: PairAccount | null, pair: Pair, bodyA: number, onA: number, onB: number): void {
  if (bodyA === pair.low) account?.add(onA, onB);
  else account?.add(onB, onA);
}
