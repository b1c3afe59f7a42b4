import type { Recording } from '../../../sim/recording/index.js';
import { startRun } from '../recording/synthetic.js';

/**
 * Two crates on a chute, the upper sliding on the lower, over three rows (0 s, 1 s, 2 s); the lower is on segment 0 at
 * first and on segment 1 at last. Works are round numbers, and the speeds are what those works make of rest.
 */
export function twoCrates(): Recording {
  const { writer, row } = startRun({
    bodies: [
      { id: 'upper', mass: 2, inertia: 0 },
      { id: 'lower', mass: 2, inertia: 0 },
    ],
    accounts: [
      { account: 'gravity', of: 'upper', bodies: ['upper'], stored: true },
      { account: 'gravity', of: 'lower', bodies: ['lower'], stored: true },
      { account: 'friction', of: ['upper', 'lower'], bodies: ['upper', 'lower'], heat: true },
      { account: 'friction', of: ['lower', 'chute'], bodies: ['lower'], heat: true },
      { account: 'reaction', of: ['lower', 'chute'], bodies: ['lower'] },
      { account: 'numerical', of: null, cause: 'clamp', bodies: ['upper', 'lower'] },
    ],
    contacts: [{ between: ['lower', 'upper'] }, { between: ['lower', 'chute'] }],
  });
  const [upper, lower] = writer.layout.bodies.map(({ columns }) => columns);
  const [gravityUpper, gravityLower, between, chute] = writer.layout.accounts.map(({ columns }) => columns);
  const [stack, slide] = writer.layout.contacts.map(({ columns }) => columns);
  row(0, [
    ...contactAt(stack, 0, 2, -1),
    ...contactAt(slide, 0, 1, 0),
    ...([
      [gravityUpper.stored!, 100],
      [gravityLower.stored!, 50],
    ] as const),
  ]);
  for (const time of [1, 2]) {
    const drop = time * 12;
    row(time, [
      ...contactAt(stack, time * 4, 2 - time, -1),
      ...contactAt(slide, time * 4, 1 - time, time - 1),
      ...([
        [gravityUpper.work[0], drop],
        [gravityUpper.stored!, 100 - drop],
      ] as const),
      ...([
        [gravityLower.work[0], drop],
        [gravityLower.stored!, 50 - drop],
      ] as const),
      ...([
        [between.work[0], -3 * time],
        [between.work[1], 2 * time],
        [between.heat!, time],
      ] as const),
      ...([
        [chute.work[0], -5 * time],
        [chute.heat!, 5 * time],
      ] as const),
      [upper.vx, Math.sqrt(drop - 3 * time)],
      [lower.vx, Math.sqrt(drop - 3 * time)],
    ]);
  }
  writer.event({ kind: 'station', station: '1', time: 0, row: 0 });
  writer.event({ kind: 'station', station: '2', time: 2, row: 2 });
  return writer.finish('reachedEnd');
}

type ContactColumns = Recording['layout']['contacts'][0]['columns'];

export function contactAt(columns: ContactColumns, x: number, y: number, segment: number): [number, number][] {
  return [
    [columns.points, 1],
    [columns.x, x],
    [columns.y, y],
    [columns.segment, segment],
  ];
}
