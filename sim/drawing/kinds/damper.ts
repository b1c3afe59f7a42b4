import type { Damper } from '../../mechanism/kinds/damper.js';
import type { DrawingContext, Figure } from '../figure.js';
import { circle, line, narrow, outline, type DrawOperation } from '../operations.js';
import { groundEnds, linkEnds, pivotOf, type LinkLine } from './link.js';

/** A damper: cup and piston; a rotary one as two rings about its pin. */
export function damperFigures(damper: Damper, context: DrawingContext): Figure[] {
  const key = { key: `damper:${damper.id}`, layer: 'links', item: damper.id } as const;
  if (damper.kind === 'rotary') {
    return [{ ...key, live: (now) => rings(pivotOf(damper.between, context, now)) }];
  }
  const { between } = damper;
  const live = (now: Parameters<typeof linkEnds>[2]) => {
    const ends = linkEnds(between, context, now);
    return [...cupAndPiston(ends), ...groundEnds(between, ends)];
  };
  return [{ ...key, live }];
}

export function cupAndPiston(ends: LinkLine, half = 7): DrawOperation[] {
  // The cup keeps its length on paper where the line is long enough, so that it reads as one part.
  const cup = Math.min(0.6, 34 / Math.max(ends.length, 1));
  const [open, bottom] = [0.5 - cup / 2, 0.5 + cup / 2];
  return [
    line([ends.at(open, half), ends.at(bottom, half), ends.at(bottom, -half), ends.at(open, -half)], outline),
    line([ends.at(bottom), ends.b], outline),
    line([ends.a, ends.at(0.5)], outline),
    line([ends.at(0.5, half - 1.8), ends.at(0.5, 1.8 - half)], outline),
  ];
}

function rings(at: readonly [number, number]): DrawOperation[] {
  return [circle(at, 9, { stroke: outline }), circle(at, 13, { stroke: narrow })];
}
