import type { ContactPair } from '../../mechanism/kinds/contact.js';
import type { AccountName } from '../../recording/recording.js';
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

/** The accounts of a pair; null where the pair has no such thing. */
export interface PairAccounts {
  reaction: PairAccount;
  friction: PairAccount | null;
  rolling: PairAccount | null;
  impact: PairAccount;
  spring: PairAccount | null;
  damper: PairAccount | null;
}

/** A contact pair in engine units, with its accounts and what was last seen of it. */
export class Pair {
  readonly between: [string, string];
  /** Body indices in the document's order; −1 for a track. */
  readonly first: number;
  readonly second: number;
  /** The ground, or else the body listed first, is the low part: A of the accounts. */
  readonly low: number;
  readonly high: number;
  readonly staticFriction: number;
  readonly kineticFriction: number;
  readonly restitution: number;
  readonly restSpeed: number;
  readonly rollingResistance: number;
  readonly stiffness: number;
  readonly damping: number;
  readonly isSoft: boolean;
  readonly rubs: boolean;
  readonly reading: PairReading = { points: 0, normal: 0, friction: 0, slip: 0, x: 0, y: 0, nx: 0, ny: 0, segment: -1 };
  /** It has columns in the recording. */
  isMet = false;
  /** It carried force over the last step. */
  isLasting = false;
  wasSliding = false;
  private opened: PairAccounts | null = null;

  constructor(
    private readonly scene: Scene,
    pair: ContactPair,
    readonly index: number,
  ) {
    const { scale } = scene;
    this.between = pair.between;
    [this.first, this.second] = pair.between.map((id) => partIndex(scene, id)) as [number, number];
    [this.low, this.high] = this.second < 0 ? [this.second, this.first] : [this.first, this.second];
    this.staticFriction = pair.staticFriction;
    this.kineticFriction = pair.kineticFriction;
    this.rubs = pair.staticFriction > 0 || pair.kineticFriction > 0;
    this.restitution = pair.restitution;
    this.restSpeed = pair.restSpeed / scale.speed;
    this.rollingResistance = pair.rollingResistance / scale.length;
    this.stiffness = (pair.compliant?.stiffness ?? 0) / scale.rate;
    this.damping = (pair.compliant?.damping ?? 0) / scale.damping;
    this.isSoft = pair.compliant !== undefined;
  }

  /** Opened when first asked for: of the many pairs that a wildcard makes, most never meet. */
  get accounts(): PairAccounts {
    return this.opened ?? this.openAccounts();
  }

  openAccounts(): PairAccounts {
    this.opened ??= {
      reaction: this.open('reaction', {}),
      friction: this.rubs ? this.open('friction', { heat: true }) : null,
      rolling: this.rollingResistance > 0 ? this.open('rolling-resistance', { heat: true }) : null,
      impact: this.open('impact', { heat: true }),
      spring: this.isSoft ? this.open('spring', { stored: true }) : null,
      damper: this.isSoft ? this.open('damper', { heat: true }) : null,
    };
    return this.opened;
  }

  private open(account: AccountName, columns: { heat?: boolean; stored?: boolean }): PairAccount {
    const bodies = PairAccount.bodies(this.scene.ids, this.low, this.high);
    return new PairAccount(this.scene.books.open(account, this.between, bodies, columns), this.low, this.high);
  }
}

/** Adds work of an account by planck's order of the bodies (A, B), whichever way the pair has them. */
export function addWork(account: PairAccount | null, pair: Pair, bodyA: number, onA: number, onB: number): void {
  if (bodyA === pair.low) account?.add(onA, onB);
  else account?.add(onB, onA);
}
