import {
  map,
  number,
  optional,
  pair,
  quantity,
  record,
  ref,
  required,
  type Alternative,
  type Read,
} from '../fields/spec.js';

/**
 * One contact pair after wildcards and materials are resolved: exactly two element ids (body–body or body–track).
 * Each pair is an account of its own.
 */
export interface ContactPair {
  /** In the order of the document's entry; where a wildcard expanded: body first, then the other. */
  between: [string, string];
  staticFriction: number;
  kineticFriction: number;
  restitution: number;
  /** Lever arm of rolling resistance [m]. */
  rollingResistance: number;
  /** Below this approach speed the pair does not rebound [m/s]. */
  restSpeed: number;
  /** Present for a compliant pair: [N/m], [N s/m], the pair's value shared among the points of a face. */
  compliant?: { stiffness: number; damping: number };
  /** JSON pointer of the entry that set it. */
  pointer: string;
}

const coefficient = number({ atLeast: 0 });
const restitution = optional(number({ atLeast: 0, atMost: 1 }), 'Ratio of the speeds of separation and approach.');

/** What one material on another does; the same keys as a contact's. */
export const surfaceEntries = {
  friction: optional(coefficient, 'Coefficient of friction, static and kinetic alike.'),
  staticFriction: optional(coefficient, 'Coefficient of static friction.'),
  kineticFriction: optional(coefficient, 'Coefficient of kinetic friction.'),
  restitution,
  rollingResistance: optional(quantity('length', 'mm', { atLeast: 0 }), 'Lever arm of rolling resistance.'),
};

const oneFriction: Alternative[] = [
  { groups: [['friction'], ['staticFriction']], optional: true },
  { groups: [['friction'], ['kineticFriction']], optional: true },
];

/** Table of material pairs: materials[a][b], in either order. */
export const materialFields = map(
  'a table such as {"steel": {"nylon": {"friction": 0.2}}}',
  map(
    'a row of the table: {"nylon": {"friction": 0.2}}',
    record('a pair of materials', surfaceEntries, { alternatives: oneFriction }),
  ),
);

/** Field table of a contact entry. */
export const contactFields = record(
  'a contact',
  {
    between: required(pair(ref('body', 'track', '*')), 'Two bodies, or a body and a track; "*" stands for any.'),
    ...surfaceEntries,
    stiffness: optional(quantity('rate', 'N/mm', { above: 0 }), 'Makes it compliant: stiffness of the pair.'),
    damping: optional(quantity('damping', 'N s/m', { atLeast: 0 }), 'Damping of a compliant pair; default 0.'),
    restSpeed: optional(quantity('speed', 'mm/s', { atLeast: 0 }), 'Below this approach speed there is no rebound.'),
  },
  { alternatives: oneFriction },
);

export type ContactDocument = Read<typeof contactFields>;
export type SurfaceDocument = Partial<Pick<ContactDocument, keyof typeof surfaceEntries>>;
export type MaterialTable = Record<string, Record<string, SurfaceDocument>>;
