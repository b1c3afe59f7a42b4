import { mix, norm, subtract, unit, type Vec } from '../../core/vec.js';
import type { PointOn } from '../../mechanism/kinds/joint.js';
import type { DrawingContext } from '../figure.js';
import type { DrawOperation } from '../operations.js';
import { toPaper } from '../paper.js';
import { carried, type Poses } from '../pose.js';
import { groundMark } from './ground-mark.js';

/** The line between two ends on paper, with a frame along it. */
export interface LinkLine {
  a: Vec;
  b: Vec;
  length: number;
  /** Unit vector from a to b; along x where they coincide. */
  along: Vec;
  /** A point at the share `t` of the length, `offset` pixels to the side. */
  at: (t: number, offset?: number) => Vec;
}

export function linkLine(a: Vec, b: Vec): LinkLine {
  const length = norm(subtract(b, a));
  const along: Vec = length === 0 ? [1, 0] : unit(subtract(b, a));
  const at = (t: number, offset = 0): Vec => {
    const [x, y] = mix(a, b, t);
    return [x - along[1] * offset, y + along[0] * offset];
  };
  return { a, b, length, along, at };
}

/** Ends of a spring or damper where its parts are now, on paper. */
export function linkEnds(between: readonly [PointOn, PointOn], context: DrawingContext, now: Poses): LinkLine {
  const [a, b] = between.map((end) => toPaper(carried(end, context.drawn, now), context.pixels));
  return linkLine(a, b);
}

/** Marks of the fixed frame at the ends that are on the ground. */
export function groundEnds(between: readonly [PointOn, PointOn], { a, b, along }: LinkLine): DrawOperation[] {
  const back: Vec = [-along[0], -along[1]];
  return [
    ...(between[0].of === 'ground' ? groundMark(a, back) : []),
    ...(between[1].of === 'ground' ? groundMark(b, along) : []),
  ];
}

/** Where a rotary element between two parts sits: on the pin they share, else on the first part's origin. */
export function pivotOf(between: readonly [string, string], context: DrawingContext, now: Poses): Vec {
  const { mechanism, drawn, pixels } = context;
  const shares = (ids: readonly string[]) => between.every((id) => ids.includes(id));
  const pin = mechanism.joints.find((joint) => joint.kind === 'pin' && shares(joint.between));
  if (pin?.kind === 'pin') return toPaper(carried({ of: pin.between[0], at: pin.at }, drawn, now), pixels);
  const body = now.get(between[0]) ?? now.get(between[1]);
  return toPaper(body?.at ?? [0, 0], pixels);
}
