import { mix, rotate, unit, type Vec } from '../../core/vec.js';
import type { Gear, Joint, Pin, Rack, Rope, Screw, Slide, Weld } from '../../mechanism/kinds/joint.js';
import { dashed, dashes } from '../dash.js';
import type { DrawingContext, Figure } from '../figure.js';
import { circle, inkFill, line, lineWidth, outline, paperFill, polygon, segments } from '../operations.js';
import type { DrawOperation } from '../operations.js';
import { toPaper } from '../paper.js';
import { carried, turned, type Poses } from '../pose.js';
import { groundMark } from './ground-mark.js';
import { linkLine } from './link.js';
import { zigzag } from './spring.js';

type Symbols = { [K in Joint['kind']]: (joint: Extract<Joint, { kind: K }>, context: DrawingContext) => Draw };
type Draw = (now: Poses) => DrawOperation[];

const symbols: Symbols = { pin, slide, weld, rope, gear, rack, screw };

/** A joint in the symbols of kinematic diagrams (ISO 3952). */
export function jointFigures(joint: Joint, context: DrawingContext): Figure[] {
  const live = (symbols[joint.kind] as (joint: Joint, context: DrawingContext) => Draw)(joint, context);
  return [{ key: `joint:${joint.id}`, layer: 'joints', item: joint.id, live }];
}

function pin({ between, at }: Pin, { drawn, pixels }: DrawingContext): Draw {
  const moving = between[0] === 'ground' ? between[1] : between[0];
  return (now) => pinSymbol(toPaper(carried({ of: moving, at }, drawn, now), pixels), between.includes('ground'));
}

/** A small circle; on the fixed frame it stands on a bracket. */
export function pinSymbol(at: Vec, grounded: boolean): DrawOperation[] {
  const ring = circle(at, 3.6, { stroke: outline, fill: paperFill });
  if (!grounded) return [ring];
  const foot: Vec = [at[0], at[1] + 17];
  const bracket: Vec[] = [at, [at[0] + 8.5, foot[1]], [at[0] - 8.5, foot[1]]];
  return [...groundMark(foot, [0, 1], 14), polygon(bracket, { stroke: outline, fill: paperFill }), ring];
}

function slide({ between, at, axis, limits }: Slide, { drawn, pixels }: DrawingContext): Draw {
  const [first, second] = between;
  const box = 20 / pixels;
  // The guide is fixed in the second part: as long as the travel its stops allow, or three boxes either way.
  const [low, high] = [(limits?.from ?? -2.5 * box) - box / 2, (limits?.to ?? 2.5 * box) + box / 2];
  const guide = (s: number): Vec => [at[0] + axis[0] * s, at[1] + axis[1] * s];
  return (now) => {
    const ends = [guide(low), guide(high)].map((end) => toPaper(carried({ of: second, at: end }, drawn, now), pixels));
    const middle = toPaper(carried({ of: first, at }, drawn, now), pixels);
    const along = rotate(axis, turned(second, drawn, now));
    return slideSymbol(middle, [along[0], -along[1]], ends as [Vec, Vec], second === 'ground');
  };
}

/** A box on a line; the line is hatched at its ends where it is the fixed frame. */
export function slideSymbol(at: Vec, along: Vec, guide: readonly [Vec, Vec], grounded: boolean): DrawOperation[] {
  const [ux, uy] = unit(along);
  const corner = (s: number, n: number): Vec => [at[0] + ux * s - uy * n, at[1] + uy * s + ux * n];
  const box = [corner(-10, -5), corner(10, -5), corner(10, 5), corner(-10, 5)];
  const marks = grounded ? [...groundMark(guide[0], [-ux, -uy], 7), ...groundMark(guide[1], [ux, uy], 7)] : [];
  return [line(guide), ...marks, polygon(box, { stroke: outline, fill: paperFill }), line([corner(-10, 0), corner(10, 0)])];
}

function weld({ between }: Weld, { drawn, pixels }: DrawingContext): Draw {
  const at = (id: string) => drawn.get(id)?.at;
  const [a, b] = [at(between[0]), at(between[1])];
  const seam = a && b ? mix(a, b, 0.5) : (a ?? b ?? ([0, 0] as const));
  const on = between[0] === 'ground' ? between[1] : between[0];
  return (now) => {
    const [x, y] = toPaper(carried({ of: on, at: seam }, drawn, now), pixels);
    const bead: Vec[] = [
      [x - 6, y + 5],
      [x + 6, y + 5],
      [x, y - 6],
    ];
    return [polygon(bead, { fill: inkFill })];
  };
}

function rope({ through }: Rope, { drawn, pixels }: DrawingContext): Draw {
  return (now) => {
    const points = through.map((point) => toPaper(carried(point, drawn, now), pixels));
    const pulleys = points.slice(1, -1).map((at) => circle(at, 6, { stroke: outline, fill: paperFill }));
    return [...pulleys, line(points, { width: lineWidth.outline * 0.75, tone: 'ink' })];
  };
}

/** Pitch circles in chain line: the radii share the distance of the pins as the ratio has it. */
function gear({ joints, ratio }: Gear, context: DrawingContext): Draw {
  const [p, q] = joints.map((id) => pinPlace(id, context));
  if (!p || !q) return () => [];
  return (now) => {
    const [a, b] = [p(now), q(now)];
    const distance = Math.hypot(b[0] - a[0], b[1] - a[1]);
    // |turn of q| = |ratio| |turn of p|, so the radii are as |ratio| : 1; an internal pair has the pins on one side.
    const k = Math.abs(ratio);
    const share = ratio < 0 ? 1 + k : Math.abs(1 - k);
    const [ra, rb] = share === 0 ? [0, 0] : [(distance * k) / share, distance / share];
    return [pitchCircle(a, ra), pitchCircle(b, rb)];
  };
}

function rack({ pin, slide, radius }: Rack, context: DrawingContext): Draw {
  const place = pinPlace(pin, context);
  const guide = context.mechanism.joints.find((joint) => joint.id === slide);
  if (!place || guide?.kind !== 'slide') return () => [];
  const r = Math.abs(radius) * context.pixels;
  const [ux, uy] = [guide.axis[0], -guide.axis[1]];
  return (now) => {
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
}

function screw({ slide }: Screw, context: DrawingContext): Draw {
  const guide = context.mechanism.joints.find((joint) => joint.id === slide);
  if (guide?.kind !== 'slide') return () => [];
  const { at, axis, between } = guide;
  const half = 24 / context.pixels;
  const ends = [-half, half].map((s): Vec => [at[0] + axis[0] * s, at[1] + axis[1] * s]);
  return (now) => {
    const [a, b] = ends.map((end) => toPaper(carried({ of: between[1], at: end }, context.drawn, now), context.pixels));
    return zigzag(linkLine(a, b), 8, 4);
  };
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
