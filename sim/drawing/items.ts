import type { Mechanism } from '../mechanism/model.js';

export type ItemKind = 'body' | 'track' | 'spring' | 'damper' | 'drive' | 'joint';

/** An element with a number in the parts list. */
export interface Item {
  number: number;
  id: string;
  kind: ItemKind;
  name: string;
}

/**
 * Numbers the elements as the parts list has them: bodies, tracks, springs, dampers, drives, joints.
 *
 * @param names as the document gives them, by id; an element without one is called by its id, read as words
 */
export function numberItems(mechanism: Mechanism, names: ReadonlyMap<string, string> = new Map()): Item[] {
  const named = (kind: ItemKind, list: readonly { id: string }[]) =>
    list.map(({ id }) => ({ id, kind, name: names.get(id) ?? wordsOf(id) }));
  return [
    ...named('body', mechanism.bodies),
    ...named('track', mechanism.tracks),
    ...named('spring', mechanism.springs),
    ...named('damper', mechanism.dampers),
    ...named('drive', mechanism.drives),
    ...named('joint', mechanism.joints),
  ].map((item, index) => ({ number: index + 1, ...item }));
}

/** An id read as words: `buffer-plate` is "Buffer plate". */
export function wordsOf(id: string): string {
  const words = id.replace(/[-_]+/g, ' ').trim();
  return words === '' ? id : words[0].toUpperCase() + words.slice(1);
}

/** "1/2" for a pair, "4" for an element; an id without a number stands for itself. */
export function itemNumbers(items: readonly Item[], of: string | readonly [string, string] | null): string {
  if (of === null) return '';
  const numberOf = (id: string) => items.find((item) => item.id === id)?.number.toString() ?? id;
  return typeof of === 'string' ? numberOf(of) : of.map(numberOf).join('/');
}
