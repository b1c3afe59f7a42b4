import { mix, rotate, toBody, unit, type Vec } from '../../core/vec.js';
import type { Gear, Joint, Pin, Rack, Rope, Screw, Slide, Weld } from '../../mechanism/kinds/joint.js';
import { dashed, dashes } from '../dash.js';
import type { DrawingContext, Figure } from '../figure.js';
import { circle, inkFill, line, lineWidth, outline, paperFill, polygon, segments } from '../operations.js';
import type { DrawOperation } from '../operations.js';
import { toPaper } from '../paper.js';
import { carried, type Poses } from '../pose.js';
import { hatchSide } from '../hatch.js';
import { groundMark } from './ground-mark.js';
import { linkLine } from './link.js';
import { zigzag } from './spring.js';

type Symbols = { [K in Joint['kind']]: (joint: Extract<Joint, { kind: K }>, context: DrawingContext) => Drawn[] };
type Live = (now: Poses) => DrawOperation[];
/** Rigid on a part, or drawn anew for each instant. */
type Drawn = { on: string; operations: DrawOperation[] } | { live: Live };

const symbols: Symbols = { pin, slide, weld, rope, gear, rack, screw };

/** A joint in the symbols of kinematic diagrams (ISO 3952). */
export function jointFigures(joint: Joint, context: DrawingContext): Figure[] {
  const drawn = (symbols[joint.kind] as (joint: Joint, context: DrawingContext) => Drawn[])(joint, context);
  return drawn.map((each, i) => ({ key: `joint:${joint.id}:${i}`, layer: 'joints', item: joint.id, ...each }));
}

/** A sheet point in the paper coordinates of the part it is fixed to. */
function localTo(of: string, point: Vec, { drawn, pixels }: DrawingContext): Vec {
  const pose = drawn.get(of);
  return toPaper(pose ? toBody(pose.at, pose.angle, point) : point, pixels);
}

function pin({ between, at }: Pin, context: DrawingContext): Drawn[] {
  const grounded = between.includes('ground');
  const on = grounded ? 'ground' : between[0];
  return [{ on, operations: pinSymbol(localTo(on, at, context), grounded) }];
}

/** A small circle; on the fixed frame it stands on a bracket. */
export function pinSymbol(at: Vec, grounded: boolean): DrawOperation[] {
  const ring = circle(at, 3.6, { stroke: outline, fill: paperFill });
  if (!grounded) return [ring];
  const foot: Vec = [at[0], at[1] + 17];
  const bracket: Vec[] = [at, [at[0] + 8.5, foot[1]], [at[0] - 8.5, foot[1]]];
  return [...groundMark(foot, [0, 1], 14), polygon(bracket, { stroke: outline, fill: paperFill }), ring];
}

/** The box moves with the first part, the guide is fixed in the second. */
function slide({ between, at, axis, limits }: Slide, context: DrawingContext): Drawn[] {
  const [first, second] = between;
  const box = 20 / context.pixels;
  // The guide is as long as the travel its stops allow, or three boxes either way.
  const [low, high] = [(limits?.from ?? -2.5 * box) - box / 2, (limits?.to ?? 2.5 * box) + box / 2];
  const guide = (s: number): Vec => localTo(second, [at[0] + axis[0] * s, at[1] + axis[1] * s], context);
  const along = rotate(axis, -(context.drawn.get(first)?.angle ?? 0));
  return [
    { on: second, operations: guideSymbol(guide(low), guide(high), second === 'ground') },
    { on: first, operations: slideBox(localTo(first, at, context), [along[0], -along[1]]) },
  ];
}

/** The line a slide runs on; where it belongs to the fixed frame, its ends are hatched along it. */
export function guideSymbol(from: Vec, to: Vec, grounded: boolean): DrawOperation[] {
  if (!grounded) return [line([from, to])];
  const [ux, uy] = unit([to[0] - from[0], to[1] - from[1]]);
  const end = (at: Vec, sign: number): Vec[] => [at, [at[0] + sign * 13 * ux, at[1] + sign * 13 * uy]];
  const hatch = (path: Vec[]) =>
    segments(hatchSide(path, { side: ux < 0 || (ux === 0 && uy < 0) ? -1 : 1, spacing: 4.5, depth: 4.5 }));
  return [line([from, to]), hatch(end(from, 1)), hatch(end(to, -1).reverse())];
}

export function slideBox(at: Vec, along: Vec): DrawOperation[] {
  const [ux, uy] = unit(along);
  const corner = (s: number, n: number): Vec => [at[0] + ux * s - uy * n, at[1] + uy * s + ux * n];
  const box = [corner(-10, -5), corner(10, -5), corner(10, 5), corner(-10, 5)];
  return [polygon(box, { stroke: outline, fill: paperFill }), line([corner(-10, 0), corner(10, 0)])];
}

function weld({ between }: Weld, context: DrawingContext): Drawn[] {
  const [a, b] = between.map((id) => context.drawn.get(id)?.at);
  const on = between[0] === 'ground' ? between[1] : between[0];
  const [x, y] = localTo(on, a && b ? mix(a, b, 0.5) : (a ?? b ?? [0, 0]), context);
  const bead: Vec[] = [
    [x - 6, y + 5],
    [x + 6, y + 5],
    [x, y - 6],
  ];
  return [{ on, operations: [polygon(bead, { fill: inkFill })] }];
}

function rope({ through }: Rope, { drawn, pixels }: DrawingContext): Drawn[] {
  const live: Live = (now) => {
    const points = through.map((point) => toPaper(carried(point, drawn, now), pixels));
    const pulleys = points.slice(1, -1).map((at) => circle(at, 6, { stroke: outline, fill: paperFill }));
    return [...pulleys, line(points, { width: lineWidth.outline * 0.75, tone: 'ink' })];
  };
  return [{ live }];
}

/** Pitch circles in chain line: the radii share the distance of the pins as the ratio has it. */
function gear({ joints, ratio }: Gear, context: DrawingContext): Drawn[] {
  const [p, q] = joints.map((id) => pinPlace(id, context));
  if (!p || !q) return [];
  const live: Live = (now) => {
    const [a, b] = [p(now), q(now)];
    const distance = Math.hypot(b[0] - a[0], b[1] - a[1]);
    // |turn of q| = |ratio| |turn of p|, so the radii are as |ratio| : 1; an internal pair has the pins on one side.
    const k = Math.abs(ratio);
    const share = ratio < 0 ? 1 + k : Math.abs(1 - k);
    const [ra, rb] = share === 0 ? [0, 0] : [(distance * k) / share, distance / share];
    return [pitchCircle(a, ra), pitchCircle(b, rb)];
  };
  return [{ live }];
}

function rack({ pin, slide, radius }: Rack, context: DrawingContext): Drawn[] {
  const place = pinPlace(pin, context);
  const guide = context.mechanism.joints.find((joint) => joint.id === slide);
  if (!place || guide?.kind !== 'slide') return [];
  const r = Math.abs(radius) * context.pixels;
  const [ux, uy] = [guide.axis[0], -guide.axis[1]];
  const live: Live = (now) => {
    const [x, y] = place(now);
    // Travel along the axis is + for a counter-clockwise turn: the pitch line passes on the right of the axis.
    const side = radius > 0 ? 1 : -1;
    const touch: Vec = [x - uy * r * side, y + ux * r * side];
    const pitch: Vec[] = [
      [touch[0] - 1.6 * r * ux, touch[1] - 1.6 * r * uy],
      [touch[0] + 1.6 * r * ux, touch[1] + 1.6 * r * uy],
    ];
    return [pitchCircle([x, y], r), segments(dashed(pitch, dashes.chain))];
  };
  return [{ live }];
}

function screw({ slide }: Screw, context: DrawingContext): Drawn[] {
  const guide = context.mechanism.joints.find((joint) => joint.id === slide);
  if (guide?.kind !== 'slide') return [];
  const { at, axis, between } = guide;
  const half = 24 / context.pixels;
  const ends = [-half, half].map((s): Vec => [at[0] + axis[0] * s, at[1] + axis[1] * s]);
  const live: Live = (now) => {
    const [a, b] = ends.map((end) => toPaper(carried({ of: between[1], at: end }, context.drawn, now), context.pixels));
    return zigzag(linkLine(a, b), 8, 4);
  };
  return [{ live }];
}

function pitchCircle(at: Vec, radius: number): DrawOperation {
  const points = Array.from({ length: 73 }, (_, i): Vec => {
    const angle = (i * Math.PI) / 36;
    return [at[0] + radius * Math.cos(angle), at[1] + radius * Math.sin(angle)];
  });
  return segments(dashed(points, dashes.chain));
}

function pinPlace(id: string, { mechanism, drawn, pixels }: DrawingContext): ((now: Poses) => Vec) | undefined {
  const joint = mechanism.joints.find((each) => each.id === id);
  if (joint?.kind !== 'pin') return undefined;
  const of = joint.between[0] === 'ground' ? joint.between[1] : joint.between[0];
  return (now) => toPaper(carried({ of, at: joint.at }, drawn, now), pixels);
}
