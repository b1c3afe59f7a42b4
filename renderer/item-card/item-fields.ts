import type { Vec } from '../../sim/core/vec.js';
import { itemNumbers, type Item } from '../../sim/drawing/items.js';
import { buildTrack } from '../../sim/geometry/index.js';
import type { Body } from '../../sim/mechanism/kinds/body.js';
import type { Damper } from '../../sim/mechanism/kinds/damper.js';
import type { Drive } from '../../sim/mechanism/kinds/drive.js';
import type { Joint } from '../../sim/mechanism/kinds/joint.js';
import type { Spring } from '../../sim/mechanism/kinds/spring.js';
import type { Track } from '../../sim/mechanism/kinds/track.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import { degrees, figures, fixed, millimetres, type Shown } from '../format/quantity.js';
import { itemData } from '../parts-list/item-data.js';

/** A field of an item card: its name, the letter of its quantity, its value and unit. */
export interface CardField extends Shown {
  name: string;
  symbol?: string;
}

/** Says how a part is called on the sheet: its number, or the ground. */
type NameOf = (id: string) => string;

/** What is known of an item, in the units of the trade. */
export function itemFields(item: Item, mechanism: Mechanism, items: readonly Item[]): CardField[] {
  const nameOf: NameOf = (id) => {
    const found = items.find((each) => each.id === id);
    return found ? `${found.number} ${found.name}` : id;
  };
  const of = <T extends { id: string }>(list: readonly T[], say: (element: T) => CardField[]) => {
    const element = list.find(({ id }) => id === item.id);
    return element ? say(element) : [];
  };
  const fields: Record<Item['kind'], () => CardField[]> = {
    body: () => of(mechanism.bodies, (body) => bodyFields(body, nameOf)),
    track: () => of(mechanism.tracks, trackFields),
    spring: () => of(mechanism.springs, (spring) => springFields(spring, nameOf)),
    damper: () => of(mechanism.dampers, (damper) => damperFields(damper, nameOf)),
    drive: () => of(mechanism.drives, (drive) => driveFields(drive, nameOf)),
    joint: () => of(mechanism.joints, (joint) => jointFields(joint, nameOf)),
  };
  const shape = { name: item.kind === 'joint' ? 'Kind' : 'Data, mm', value: itemData(item, mechanism), unit: '' };
  return [shape, ...fields[item.kind](), ...contactFields(item, mechanism, items)];
}

const field = (name: string, shown: Shown, symbol?: string): CardField => ({
  name,
  ...shown,
  ...(symbol === undefined ? {} : { symbol }),
});
const plain = (name: string, value: string): CardField => ({ name, value, unit: '' });
const number = (name: string, value: number, unit: string, symbol?: string) =>
  field(name, { value: figures(value), unit }, symbol);
/** Tenths of a millimetre, without zeros that say nothing. */
const tidy = (millimetres: number) => fixed(millimetres, 1).replace(/\.0$/, '');
const place = ([x, y]: Vec): Shown => ({ value: `${tidy(x * 1e3)}, ${tidy(y * 1e3)}`, unit: 'mm' });

function bodyFields({ mass, inertia, at, angle, velocity, spin, rest }: Body, nameOf: NameOf): CardField[] {
  return [
    number('Mass', mass, 'kg', 'm'),
    ...(inertia === 0 ? [] : [number('Inertia', inertia, 'kg m²', 'J')]),
    field('At', place(at)),
    field('Angle', degrees(angle), 'φ'),
    number('Speed at start', Math.hypot(...velocity), 'm/s', 'v₀'),
    ...(spin === 0 ? [] : [number('Spin at start', spin, 'rad/s', 'ω₀')]),
    ...(rest ? [plain('Laid on', nameOf(rest.on))] : []),
  ];
}

function trackFields(track: Track): CardField[] {
  return [
    field('Length', millimetres(buildTrack(track).length), 'L'),
    field('From', place(track.from)),
    plain('Free side', track.side),
  ];
}

function springFields(spring: Spring, nameOf: NameOf): CardField[] {
  const ends = spring.between.map((end) => (typeof end === 'string' ? end : end.of));
  const on = [plain('End A on', nameOf(ends[0])), plain('End B on', nameOf(ends[1]))];
  if (spring.kind === 'torsion')
    return [number('Rate', spring.rate, 'N m/rad', 'k'), field('Free angle', degrees(spring.freeAngle)), ...on];
  const fitted = lengthBetween(spring.between);
  if (spring.kind === 'gas')
    return [number('Force', spring.force, 'N', 'F'), field('Stroke', millimetres(spring.stroke)), field('Fitted length', millimetres(fitted), 'L'), ...on]; // prettier-ignore
  return [
    number('Rate', spring.rate / 1e3, 'N/mm', 'k'),
    field('Free length', millimetres(spring.freeLength), 'L₀'),
    field('Fitted length', millimetres(fitted), 'L₁'),
    ...(spring.curve ? [] : [number('Fitted force', spring.rate * (fitted - spring.freeLength), 'N', 'F₁')]),
    plain('Acts in', spring.acts),
    ...(spring.solidLength === undefined ? [] : [field('Solid length', millimetres(spring.solidLength), 'L')]),
    ...(spring.wire ? [field('Wire', millimetres(spring.wire.diameter), 'd'), field('Mean diameter', millimetres(spring.wire.meanDiameter), 'D'), number('Active coils', spring.wire.activeCoils, '', 'n')] : []), // prettier-ignore
    ...on,
  ];
}

function lengthBetween([a, b]: readonly [{ at: Vec }, { at: Vec }]): number {
  return Math.hypot(b.at[0] - a.at[0], b.at[1] - a.at[1]);
}

function damperFields(damper: Damper, nameOf: NameOf): CardField[] {
  const ends = damper.between.map((end) => (typeof end === 'string' ? end : end.of));
  return [plain('Acts in', damper.acts), plain('End A on', nameOf(ends[0])), plain('End B on', nameOf(ends[1]))];
}

function driveFields({ on, efficiency }: Drive, nameOf: NameOf): CardField[] {
  return [plain('On', nameOf(on)), number('Efficiency', efficiency * 100, '%', 'η')];
}

function jointFields(joint: Joint, nameOf: NameOf): CardField[] {
  if (!('between' in joint)) return [];
  const at = 'at' in joint ? [field('At', place(joint.at))] : [];
  const limits = (joint.kind === 'pin' || joint.kind === 'slide') && joint.limits;
  const stop = (value: number) => (joint.kind === 'pin' ? degrees(value) : millimetres(value));
  return [
    plain('First part', nameOf(joint.between[0])),
    plain('Second part', nameOf(joint.between[1])),
    ...at,
    ...(limits ? [field('Stop from', stop(limits.from)), field('Stop to', stop(limits.to))] : []),
  ];
}

/** Friction and rebound of the pairs an item is in; a card has room for a few. */
function contactFields({ id }: Item, { contacts }: Mechanism, items: readonly Item[]): CardField[] {
  return contacts
    .filter(({ between }) => between.includes(id))
    .slice(0, 3)
    .flatMap(({ between, kineticFriction, restitution, compliant }) => {
      const pair = itemNumbers(items, between);
      const rebound = compliant
        ? number(`Stiffness ${pair}`, compliant.stiffness / 1e3, 'N/mm')
        : number(`Restitution ${pair}`, restitution, '', 'e');
      return [number(`Friction ${pair}`, kineticFriction, '', 'μ'), rebound];
    });
}
