import type { ContactPair } from '../../mechanism/kinds/contact.js';
import type { Account } from '../ledgers.js';
import { partOf, type System } from '../system.js';

/** A contact pair in the auditor's units, with its accounts and what the recorder shows of it. */
export interface Pair {
  index: number;
  between: [string, string];
  first: number;
  second: number;
  staticFriction: number;
  kineticFriction: number;
  restitution: number;
  restSpeed: number;
  rollingResistance: number;
  compliant: { stiffness: number; damping: number } | null;
  reaction: Account;
  friction: Account | null;
  rolling: Account | null;
  impact: Account;
  spring: Account | null;
  damper: Account | null;
}

export function buildPairs(system: System): Pair[] {
  return system.mechanism.contacts.map((pair, index) => buildPair(system, pair, index));
}

function buildPair(system: System, pair: ContactPair, index: number): Pair {
  const { ledgers } = system;
  const first = partOf(system, pair.between[0]);
  const second = partOf(system, pair.between[1]);
  const bodies = [first, second];
  const rubs = pair.staticFriction > 0 || pair.kineticFriction > 0;
  const lossy = { heat: true };
  return {
    index,
    between: pair.between,
    first,
    second,
    staticFriction: pair.staticFriction,
    kineticFriction: pair.kineticFriction,
    restitution: pair.restitution,
    restSpeed: pair.restSpeed,
    rollingResistance: pair.rollingResistance,
    compliant: pair.compliant ?? null,
    reaction: ledgers.open('reaction', pair.between, bodies),
    friction: rubs ? ledgers.open('friction', pair.between, bodies, lossy) : null,
    rolling: pair.rollingResistance > 0 ? ledgers.open('rolling-resistance', pair.between, bodies, lossy) : null,
    impact: ledgers.open('impact', pair.between, bodies, lossy),
    spring: pair.compliant ? ledgers.open('spring', pair.between, bodies, { stored: true }) : null,
    damper: pair.compliant ? ledgers.open('damper', pair.between, bodies, lossy) : null,
  };
}
