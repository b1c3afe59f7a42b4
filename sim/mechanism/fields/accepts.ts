import { quantityKinds } from '../units/dimension.js';
import type { Range, Spec, Target } from './spec.js';

/** What a description accepts, in words: "a length above 0, such as "25 mm"". */
export function accepts(spec: Spec): string {
  switch (spec.type) {
    case 'text':
      return 'a text';
    case 'flag':
      return 'true or false';
    case 'id':
      return 'an id of letters, digits, - and _';
    case 'ref':
      return refWords(spec.to);
    case 'choice':
      return spec.options.length === 1 ? `"${spec.options[0]}"` : `one of ${spec.options.join(', ')}`;
    case 'quantity':
      return `${quantityKinds[spec.kind].says}${rangeWords(spec.range)}${example(spec.kind)}`;
    case 'measure':
      return 'a quantity';
    case 'vector':
      return vectorWords(spec.kind, spec.size);
    case 'table':
      return `pairs of ${quantityKinds[spec.x].says} and ${quantityKinds[spec.y].says}, the first rising`;
    case 'list':
      return 'a list';
    case 'tuple':
      return `a list of ${spec.items.length}: ${accepts(spec.items[0])} each`;
    case 'record':
    case 'tagged':
    case 'either':
    case 'map':
      return spec.says;
  }
}

const example = (kind: keyof typeof quantityKinds): string =>
  kind === 'number' ? '' : `, such as "${quantityKinds[kind].example}"`;

const vectorWords = (kind: keyof typeof quantityKinds, size: number): string =>
  kind === 'number'
    ? `${size} numbers`
    : `${size} numbers each ${quantityKinds[kind].says}, such as ["${quantityKinds[kind].example}", 0]`;

/** " above 0", " from 0 to 1", " other than 0". */
export function rangeWords({ above, atLeast, below, atMost, notZero, whole }: Range): string {
  const words = [
    above === undefined ? '' : ` above ${above}`,
    atLeast === undefined ? '' : ` of at least ${atLeast}`,
    below === undefined ? '' : ` below ${below}`,
    atMost === undefined ? '' : ` of at most ${atMost}`,
    notZero ? ' other than 0' : '',
    whole ? ' without a fraction' : '',
  ].filter((word) => word !== '');
  return words.join(' and');
}

const targetWords: Record<Target, string> = {
  body: 'a body',
  track: 'a track',
  joint: 'a joint',
  pin: 'a pin',
  slide: 'a slide',
  spring: 'a spring',
  damper: 'a damper',
  drive: 'a drive',
  load: 'a load',
  latch: 'a latch',
  station: 'a station',
  criterion: 'a criterion',
  ground: '"ground"',
  all: '"all"',
  '*': '"*"',
};

/** "the id of a body or a track, or "*"" */
export function refWords(to: readonly Target[]): string {
  return `the id of ${to.map((target) => targetWords[target]).join(' or ')}`.replace('the id of "', '"');
}
