import type { Vec } from '../../sim/core/vec.js';
import { dashed, dashes } from '../../sim/drawing/dash.js';
import { forceArrow, turningArrow } from '../../sim/drawing/kinds/arrow.js';
import { bodyOperations } from '../../sim/drawing/kinds/body.js';
import { cupAndPiston } from '../../sim/drawing/kinds/damper.js';
import { groundMark } from '../../sim/drawing/kinds/ground-mark.js';
import { guideSymbol, pinSymbol, slideBox } from '../../sim/drawing/kinds/joint.js';
import { linkLine } from '../../sim/drawing/kinds/link.js';
import { pennant } from '../../sim/drawing/kinds/station.js';
import { zigzag } from '../../sim/drawing/kinds/spring.js';
import { trackOperations } from '../../sim/drawing/kinds/track.js';
import { circle, inkFill, line, outline, segments, type DrawOperation } from '../../sim/drawing/operations.js';
import type { Mechanism } from '../../sim/mechanism/model.js';

/** A symbol of the drawing and its name. */
export interface KeySymbol {
  name: string;
  operations: DrawOperation[];
}

const across: [Vec, Vec] = [
  [-24, 0],
  [24, 0],
];
const span = linkLine(...across);
const hill: Vec[] = Array.from({ length: 25 }, (_, i) => [-24 + 2 * i, -4 + 7 / (1 + Math.exp(-(i - 12) / 2.5)) - 2]);

const bodies: Record<'body' | 'particle' | 'track' | 'ground', KeySymbol> = {
  body: {
    name: 'Body',
    operations: bodyOperations({ shape: { kind: 'box', width: 30, height: 18 }, centerOfMass: [0, 0] }, 1),
  },
  particle: { name: 'Point mass', operations: [circle([0, 0], 4, { fill: inkFill })] },
  track: { name: 'Track', operations: trackOperations(hill, 'left') },
  ground: { name: 'Ground', operations: groundMark([0, -2], [0, 1], 22) },
};

const joints: Record<Mechanism['joints'][number]['kind'], KeySymbol> = {
  pin: { name: 'Pin', operations: [line([[-22, 5], [0, 0]], outline), line([[0, 0], [22, -5]], outline), ...pinSymbol([0, 0], false)] }, // prettier-ignore
  slide: { name: 'Slide', operations: [...guideSymbol(...across, false), ...slideBox([0, 0], [1, 0])] },
  weld: { name: 'Weld', operations: [line(across), line([[-5, 0], [0, -9], [5, 0]], outline)] }, // prettier-ignore
  rope: { name: 'Rope', operations: [line([[-22, -8], [0, 8], [22, -8]], outline)] }, // prettier-ignore
  gear: { name: 'Gear', operations: [pitch([-10, 0], 8), pitch([8, 0], 10)] },
  rack: { name: 'Rack', operations: [pitch([0, -3], 8), segments(dashed([[-24, 5], [24, 5]], dashes.chain))] }, // prettier-ignore
  screw: { name: 'Screw', operations: zigzag(span, 8, 4) },
};

const forces = {
  springs: { name: 'Spring', operations: zigzag(span, 5, 7) },
  dampers: { name: 'Damper', operations: cupAndPiston(span, 6) },
  drives: { name: 'Drive', operations: [circle([0, 0], 6, { stroke: outline }), ...turningArrow([0, 0], 10, 1)] },
  loads: { name: 'Load', operations: forceArrow([-20, 0], [40, 0]) },
} satisfies Partial<Record<keyof Mechanism, KeySymbol>>;

const station: KeySymbol = { name: 'Station', operations: pennant([-10, -9], '', true) };

function pitch([x, y]: Vec, radius: number): DrawOperation {
  const points = Array.from({ length: 49 }, (_, i): Vec => {
    const angle = (i * Math.PI) / 24;
    return [x + radius * Math.cos(angle), y + radius * Math.sin(angle)];
  });
  return segments(dashed(points, dashes.chain));
}

/** The symbols that a drawing uses, in the groups of the Key. */
export function symbolsOf(mechanism: Mechanism): { title: string; symbols: KeySymbol[] }[] {
  const { bodies: parts, tracks, springs, dampers, joints: links } = mechanism;
  const ends = [...springs, ...dampers].flatMap(({ between }) =>
    between.map((end) => (typeof end === 'string' ? end : end.of)),
  );
  const hasGround =
    ends.includes('ground') || links.some((joint) => 'between' in joint && joint.between.includes('ground'));
  const groups = [
    {
      title: 'Bodies',
      symbols: [
        ...(parts.some(({ shape }) => shape.kind !== 'particle') ? [bodies.body] : []),
        ...(parts.some(({ shape }) => shape.kind === 'particle') ? [bodies.particle] : []),
        ...(tracks.length > 0 ? [bodies.track] : []),
        ...(hasGround ? [bodies.ground] : []),
      ],
    },
    { title: 'Joints', symbols: [...new Set(links.map(({ kind }) => kind))].map((kind) => joints[kind]) },
    {
      title: 'Force makers',
      symbols: (Object.keys(forces) as (keyof typeof forces)[]).filter((list) => mechanism[list].length > 0).map((list) => forces[list]), // prettier-ignore
    },
    { title: 'Marks', symbols: mechanism.stations.length > 0 ? [station] : [] },
  ];
  return groups.filter(({ symbols }) => symbols.length > 0);
}
