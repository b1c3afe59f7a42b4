import type { Vec } from '../../core/vec.js';
import type { Body, Shape } from '../../mechanism/kinds/body.js';
import { dashed, dashes } from '../dash.js';
import type { DrawingContext, Figure } from '../figure.js';
import { circle, inkFill, narrow, outline, paperFill, polygon, segments, type DrawOperation } from '../operations.js';
import { toPaper } from '../paper.js';
import { massCenterMark } from './mass-center.js';

type ShapeOf<K extends Shape['kind']> = Extract<Shape, { kind: K }>;

const round = (radius: number, from: number, to: number, center: Vec): Vec[] =>
  Array.from({ length: 25 }, (_, i): Vec => {
    const angle = from + (i / 24) * (to - from);
    return [center[0] + radius * Math.cos(angle), center[1] + radius * Math.sin(angle)];
  });

/** Outline of a shape in body coordinates [m]; empty where it has none. */
const outlines = {
  particle: () => [],
  none: () => [],
  disc: ({ radius }) => Array.from({ length: 72 }, (_, i) => round(radius, (i * Math.PI) / 36, 0, [0, 0])[0]),
  box: ({ width, height }) => [
    [-width / 2, -height / 2],
    [width / 2, -height / 2],
    [width / 2, height / 2],
    [-width / 2, height / 2],
  ],
  bar: ({ length, width }) => [
    ...round(width / 2, -Math.PI / 2, Math.PI / 2, [length / 2, 0]),
    ...round(width / 2, Math.PI / 2, (3 * Math.PI) / 2, [-length / 2, 0]),
  ],
  polygon: ({ points }) => [...points],
  cam: ({ baseRadius }) => Array.from({ length: 72 }, (_, i) => round(baseRadius, (i * Math.PI) / 36, 0, [0, 0])[0]),
} satisfies { [K in Shape['kind']]: (shape: ShapeOf<K>) => Vec[] };

export function shapeOutline(shape: Shape): Vec[] {
  return (outlines[shape.kind] as (shape: Shape) => Vec[])(shape);
}

/** A body: its outline in wide line and the mark of its centre of mass. */
export function bodyFigures(body: Body, context: DrawingContext): Figure[] {
  const operations = bodyOperations(body, context.pixels);
  if (body.shape.kind === 'none') operations.unshift(...links(body, context));
  return [{ key: `body:${body.id}`, layer: 'bodies', item: body.id, on: body.id, operations }];
}

export function bodyOperations(body: Pick<Body, 'shape' | 'centerOfMass'>, pixels: number): DrawOperation[] {
  const points = shapeOutline(body.shape).map((point) => toPaper(point, pixels));
  const center = toPaper(body.centerOfMass, pixels);
  if (body.shape.kind === 'particle') return [circle(center, 4, { fill: inkFill })];
  const mark = massCenterMark(center, markRadius(points));
  if (body.shape.kind === 'cam') return [segments(dashed(points, dashes.chain, true)), ...axes(points), ...mark];
  const shape = points.length === 0 ? [] : [polygon(points, { stroke: outline, fill: paperFill })];
  return [...shape, ...(body.shape.kind === 'disc' ? axes(points) : []), ...mark];
}

/** A small body gets a small mark. */
function markRadius(points: readonly Vec[]): number {
  if (points.length === 0) return 5.5;
  const [xs, ys] = [points.map(([x]) => x), points.map(([, y]) => y)];
  const least = Math.min(Math.max(...xs) - Math.min(...xs), Math.max(...ys) - Math.min(...ys));
  return Math.min(5.5, Math.max(2, least * 0.2));
}

/** Centre lines of a round body: they show how it turns. */
function axes(points: readonly Vec[]): DrawOperation[] {
  const radius = Math.max(...points.map(([x]) => x));
  const long = radius + Math.min(6, radius * 0.2);
  const cross: Vec[][] = [
    [
      [-long, 0],
      [long, 0],
    ],
    [
      [0, -long],
      [0, long],
    ],
  ];
  return radius < 8 ? [] : [segments(cross.flatMap((each) => dashed(each, dashes.chain)))];
}

/** A body without a shape is drawn as the kinematic diagrams have a link: from its joints to its centre of mass. */
function links(body: Body, { mechanism, pixels }: DrawingContext): DrawOperation[] {
  const center = body.centerOfMass;
  const [c, s] = [Math.cos(body.angle), Math.sin(body.angle)];
  const places = mechanism.joints.flatMap((joint) =>
    (joint.kind === 'pin' || joint.kind === 'slide') && joint.between.includes(body.id) ? [joint.at] : [],
  );
  return places.map(([x, y]) => {
    const [dx, dy] = [x - body.at[0], y - body.at[1]];
    const local: Vec = [c * dx + s * dy, c * dy - s * dx];
    return { kind: 'line', points: [toPaper(center, pixels), toPaper(local, pixels)], stroke: outline };
  });
}

/** Where a body was, in long dash double dot. */
export function phantomOperations(body: Body, pixels: number): DrawOperation[] {
  const points = shapeOutline(body.shape).map((point) => toPaper(point, pixels));
  if (points.length === 0) return [circle(toPaper(body.centerOfMass, pixels), 4, { stroke: narrow })];
  return [segments(dashed(points, dashes.phantom, true))];
}
