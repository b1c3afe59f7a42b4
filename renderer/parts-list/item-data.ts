import type { Item } from '../../sim/drawing/items.js';
import type { Body } from '../../sim/mechanism/kinds/body.js';
import type { Damper } from '../../sim/mechanism/kinds/damper.js';
import type { Drive } from '../../sim/mechanism/kinds/drive.js';
import type { Joint } from '../../sim/mechanism/kinds/joint.js';
import type { Spring } from '../../sim/mechanism/kinds/spring.js';
import type { Track } from '../../sim/mechanism/kinds/track.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import { figures } from '../format/quantity.js';

const mm = (metres: number) => figures(metres * 1e3);

/** What the parts list says of an item, lengths in mm. */
export function itemData(item: Item, mechanism: Mechanism): string {
  const of = <T extends { id: string }>(list: readonly T[], say: (element: T) => string) => {
    const element = list.find(({ id }) => id === item.id);
    return element ? say(element) : '';
  };
  const data: Record<Item['kind'], () => string> = {
    body: () => of(mechanism.bodies, bodyData),
    track: () => of(mechanism.tracks, trackData),
    spring: () => of(mechanism.springs, springData),
    damper: () => of(mechanism.dampers, damperData),
    drive: () => of(mechanism.drives, (drive) => driveData(drive, mechanism)),
    joint: () => of(mechanism.joints, jointData),
  };
  return data[item.kind]();
}

function bodyData({ shape }: Body): string {
  switch (shape.kind) {
    case 'particle':
      return 'point mass';
    case 'none':
      return 'mass and inertia';
    case 'disc':
      return `⌀ ${mm(2 * shape.radius)}`;
    case 'box':
      return `${mm(shape.width)} × ${mm(shape.height)}`;
    case 'bar':
      return `${mm(shape.length)} × ${mm(shape.width)}`;
    case 'polygon':
      return `${shape.points.length} corners`;
    case 'cam':
      return `base ⌀ ${mm(2 * shape.baseRadius)}`;
  }
}

function trackData({ segments, closed, surfaceSpeed }: Track): string {
  const names = segments.flatMap(({ name }) => (name === undefined ? [] : [name]));
  const parts = names.length > 0 ? names.join(', ') : segments.length === 1 ? 'one part' : `${segments.length} parts`;
  const belt =
    surfaceSpeed === 0 ? '' : typeof surfaceSpeed === 'number' ? `, moves at ${figures(surfaceSpeed)} m/s` : ', moves';
  return `${parts}${closed ? ', closed' : ''}${belt}`;
}

function springData(spring: Spring): string {
  if (spring.kind === 'linear') return `${figures(spring.rate / 1e3)} N/mm, free ${mm(spring.freeLength)}`;
  if (spring.kind === 'torsion') return `${figures(spring.rate)} N m/rad`;
  return `gas ${figures(spring.force)} N, stroke ${mm(spring.stroke)}`;
}

function damperData({ kind, coefficient, exponent }: Damper): string {
  const unit = kind === 'linear' ? 'N s/m' : 'N m s';
  return exponent === 1 ? `${figures(coefficient)} ${unit}` : `${figures(coefficient)}, exponent ${figures(exponent)}`;
}

function driveData({ on, law }: Drive, { joints }: Mechanism): string {
  const turns = joints.find(({ id }) => id === on)?.kind === 'pin';
  const [effort, speed] = turns ? ['N m', 'rad/s'] : ['N', 'm/s'];
  switch (law.kind) {
    case 'effort':
      return `${figures(law.value)} ${effort}`;
    case 'effortCurve':
      return `by ${law.over}`;
    case 'speed':
      return typeof law.value === 'number' ? `held at ${figures(law.value)} ${speed}` : 'speed over time';
    case 'motor':
      return `motor, stalls at ${figures(law.stallTorque)} ${effort}`;
  }
}

function jointData(joint: Joint): string {
  const words: Record<Joint['kind'], string> = {
    pin: 'pin',
    slide: 'slide',
    weld: 'weld',
    rope: 'rope',
    gear: 'gear pair',
    rack: 'rack and pinion',
    screw: 'screw',
  };
  const limits = (joint.kind === 'pin' || joint.kind === 'slide') && joint.limits ? ', with stops' : '';
  const friction = 'friction' in joint && joint.friction !== undefined ? ', with friction' : '';
  return `${words[joint.kind]}${limits}${friction}`;
}
