import type { Vec } from '../core/vec.js';
import type { AccountName } from '../recording/recording.js';
import { hatchPolygon } from './hatch.js';
import { lineWidth, polygon, segments, type DrawOperation } from './operations.js';
import type { Tone } from './palette.js';

/** Looks of the causes and stores: a fill and a hatch, so that colour never carries a meaning alone. */
export const patternNames = [
  'gravity', 'motion', 'spring', 'friction', 'friction-other', 'impact', 'damper', 'drive', 'load', 'numerical', 'unbooked',
] as const; // prettier-ignore
export type PatternName = (typeof patternNames)[number];

/** Straight hatch lines, or marks repeated on a lattice. */
export interface Pattern {
  fill: { tone: Tone; tint: number } | null;
  tone: Tone;
  width: number;
  lines: readonly { angle: number; spacing: number }[];
  mark?: 'zigzag' | 'dots' | 'stipple' | 'stroke';
}

const quarter = Math.PI / 2;
const half = Math.PI / 4;

export const patterns: Readonly<Record<PatternName, Pattern>> = {
  gravity: look('gravity', 0.22, [{ angle: quarter, spacing: 6 }], 1.6),
  motion: look('motion', 0.42, []),
  spring: { ...look('spring', 0.22, [], 1.3), mark: 'zigzag' },
  friction: look('friction', 0.2, [{ angle: -half, spacing: 6.4 }], 1.5),
  'friction-other': look('friction', 0.2, [{ angle: half, spacing: 8 }, { angle: half, spacing: 8 }], 1.2), // prettier-ignore
  impact: look('impact', 0.26, [{ angle: half, spacing: 6.4 }, { angle: -half, spacing: 6.4 }], 1), // prettier-ignore
  damper: { ...look('damper', 0.42, []), tone: 'ink', mark: 'dots' },
  drive: { ...look('ink', 0, [{ angle: 0, spacing: 5 }], 1), fill: null },
  load: { ...look('ink', 0, [{ angle: 0, spacing: 5 }, { angle: quarter, spacing: 5 }], 0.8), fill: null }, // prettier-ignore
  numerical: { ...look('ink', 0.1, []), mark: 'stipple' },
  unbooked: { ...look('ink', 0, []), fill: null, mark: 'stroke' },
};

function look(tone: Tone, tint: number, lines: Pattern['lines'], width = 1): Pattern {
  return { fill: { tone, tint }, tone, width, lines };
}

/** Which look an account has; contacts after the first friction account take the opposite, double hatch by turns. */
export function patternOf(account: AccountName, frictionIndex = 0): PatternName {
  const byAccount: Record<AccountName, PatternName> = {
    gravity: 'gravity',
    spring: 'spring',
    friction: frictionIndex % 2 === 0 ? 'friction' : 'friction-other',
    'joint-friction': frictionIndex % 2 === 0 ? 'friction' : 'friction-other',
    'rolling-resistance': frictionIndex % 2 === 0 ? 'friction' : 'friction-other',
    reaction: 'load',
    damper: 'damper',
    load: 'load',
    drive: 'drive',
    impact: 'impact',
    rope: 'impact',
    numerical: 'numerical',
  };
  return byAccount[account];
}

/** A polygon filled with a straight-line pattern and edged in ink. */
export function patternFill(points: readonly Vec[], name: PatternName): DrawOperation[] {
  const { fill, tone, width, lines } = patterns[name];
  const ground: DrawOperation[] = [polygon(points, { fill: { tone: 'paper' } })];
  if (fill) ground.push(polygon(points, { fill }));
  const hatch = lines.map((each, i) => segments(hatchPolygon(points, { ...each, shift: i === 1 && isDouble(lines) ? 2.6 : 0 }), { tone, width })); // prettier-ignore
  return [...ground, ...hatch, polygon(points, { stroke: { width: lineWidth.narrow, tone: 'ink' } })];
}

/** Two sets of lines in one direction are a double hatch: pairs of lines. */
export function isDouble(lines: Pattern['lines']): boolean {
  return lines.length === 2 && lines[0].angle === lines[1].angle;
}
