import type { Vec } from '../../core/vec.js';
import type { GasSpring, LinearSpring, Spring, TorsionSpring } from '../../mechanism/kinds/spring.js';
import type { DrawingContext, Figure } from '../figure.js';
import { line, lineWidth, narrow, outline, polygon, type DrawOperation, type Stroke } from '../operations.js';
import { groundEnds, linkEnds, pivotOf, type LinkLine } from './link.js';

const wire: Stroke = { width: lineWidth.outline * 0.8, tone: 'ink', cap: 'round' };

/** A spring: zigzag (ISO 2162-1, simplified), spiral for torsion, cylinder and rod for gas. */
export function springFigures(spring: Spring, context: DrawingContext): Figure[] {
  const draw = {
    linear: () => linear(spring as LinearSpring, context),
    torsion: () => torsion(spring as TorsionSpring, context),
    gas: () => gas(spring as GasSpring, context),
  } satisfies Record<Spring['kind'], () => (now: Parameters<typeof linkEnds>[2]) => DrawOperation[]>;
  return [{ key: `spring:${spring.id}`, layer: 'links', item: spring.id, live: draw[spring.kind]() }];
}

function linear(spring: LinearSpring, context: DrawingContext) {
  const coils = Math.min(12, Math.max(4, Math.round(spring.wire?.activeCoils ?? 7)));
  const drawnWidth = ((spring.wire?.meanDiameter ?? 0) / 2) * context.pixels;
  const half = drawnWidth === 0 ? 8 : Math.min(14, Math.max(5, drawnWidth));
  return (now: Parameters<typeof linkEnds>[2]) => {
    const ends = linkEnds(spring.between, context, now);
    return [...zigzag(ends, coils, half), ...groundEnds(spring.between, ends)];
  };
}

/** Zigzag between straight leads; a short spring keeps its number of coils. */
export function zigzag(ends: LinkLine, coils: number, half: number): DrawOperation[] {
  const lead = Math.min(0.12, 12 / Math.max(ends.length, 1));
  const pitch = (1 - 2 * lead) / coils;
  const peaks = Array.from({ length: 2 * coils }, (_, i) =>
    ends.at(lead + ((i + 0.5) * pitch) / 2, i % 2 === 0 ? half : -half),
  );
  return [line([ends.a, ends.at(lead), ...peaks, ends.at(1 - lead), ends.b], wire)];
}

function torsion(spring: TorsionSpring, context: DrawingContext) {
  return (now: Parameters<typeof linkEnds>[2]) => {
    const [x, y] = pivotOf(spring.between, context, now);
    const spiral = Array.from({ length: 61 }, (_, i): Vec => {
      const [angle, radius] = [(i / 60) * 5 * Math.PI, 6 + (i / 60) * 10];
      return [x + radius * Math.cos(angle), y + radius * Math.sin(angle)];
    });
    return [line(spiral, wire)];
  };
}

function gas(spring: GasSpring, context: DrawingContext) {
  return (now: Parameters<typeof linkEnds>[2]) => {
    const ends = linkEnds(spring.between, context, now);
    const cylinder = [ends.at(0.08, -6), ends.at(0.6, -6), ends.at(0.6, 6), ends.at(0.08, 6)];
    const rod = [line([ends.a, ends.at(0.08)], outline), line([ends.at(0.6), ends.b], outline)];
    const piston = line([ends.at(0.5, -6), ends.at(0.5, 6)], narrow);
    return [
      polygon(cylinder, { stroke: outline, fill: { tone: 'paper' } }),
      ...rod,
      piston,
      ...groundEnds(spring.between, ends),
    ];
  };
}
