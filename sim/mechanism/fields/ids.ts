import type { Place, Problem } from '../../core/problem.js';
import { problem } from '../../core/problem.js';
import { isObject, own, step, type JsonObject } from '../json/value.js';
import type { Target } from './spec.js';

/** The lists of a document whose elements have ids, and what an element of each is called. */
export const collections = {
  bodies: 'body',
  tracks: 'track',
  joints: 'joint',
  springs: 'spring',
  dampers: 'damper',
  drives: 'drive',
  loads: 'load',
  latches: 'latch',
  stations: 'station',
  criteria: 'criterion',
} as const satisfies Record<string, Target>;

export type Collection = keyof typeof collections;
export type ElementType = (typeof collections)[Collection];

/** Words that stand for something else where an id is expected. */
export const reservedIds: ReadonlySet<string> = new Set(['ground', 'all', '*']);

/** Letters, digits, - and _. */
export const idPattern = /^[A-Za-z0-9_-]+$/;

export interface Named {
  id: string;
  type: ElementType;
  /** The element's own `kind`, where it has one. */
  kind: string;
  pointer: string;
}

export type IdTable = ReadonlyMap<string, Named>;

/** Every id of the document with what it names; an id given twice is a problem, and the first keeps it. */
export function collectIds(tree: JsonObject): { ids: IdTable; problems: Problem[] } {
  const ids = new Map<string, Named>();
  const problems: Problem[] = [];
  for (const [collection, type] of Object.entries(collections)) {
    const elements = own(tree, collection);
    if (!Array.isArray(elements)) continue;
    elements.forEach((element, index) => {
      const id = isObject(element) ? own(element, 'id') : undefined;
      if (!isObject(element) || typeof id !== 'string') return;
      const pointer = step(step('', collection), index);
      const first = ids.get(id);
      const kind = own(element, 'kind');
      if (first) problems.push(duplicate({ pointer: step(pointer, 'id'), of: [id] }, id, first));
      else ids.set(id, { id, type, kind: typeof kind === 'string' ? kind : '', pointer });
    });
  }
  return { ids, problems };
}

const duplicate = (place: Place, id: string, first: Named): Problem =>
  problem('duplicate-id', place, { found: `"${id}"`, first: first.pointer, accepted: 'an id of its own' });

/** True where the element is one of the targets. */
export const isTarget = (named: Named, to: readonly Target[]): boolean =>
  to.some((target) => target === named.type || (named.type === 'joint' && target === named.kind));

/** The ids that would do, for suggestions. */
export const idsOf = (ids: IdTable, to: readonly Target[]): string[] => [
  ...to.filter((target) => reservedIds.has(target)),
  ...[...ids.values()].filter((named) => isTarget(named, to)).map((named) => named.id),
];
