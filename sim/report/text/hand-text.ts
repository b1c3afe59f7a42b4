import type { CheckResult } from '../result.js';
import { hanging, spread } from './layout.js';
import { short } from './quantities.js';

type Check = CheckResult['handCheck'][number];

/** The hand checks, span by span: the equation, its numbers and its answer, or why there is none. */
export function handText({ handCheck }: CheckResult, width: number): string[] {
  const spans = new Map<string, Check[]>();
  for (const check of handCheck) {
    const span = `Hand check ${check.from} to ${check.to}`;
    const checks = spans.get(span) ?? [];
    if (!isTold(check, checks)) spans.set(span, [...checks, check]);
  }
  return [...spans].flatMap(([span, checks]) => [
    '',
    span,
    '─'.repeat(width),
    ...checks.flatMap((check) => checkLines(check, width)),
  ]);
}

/** Bodies that arrive as one are told of once. */
function isTold({ of, speed }: Check, earlier: readonly Check[]): boolean {
  return speed !== null && earlier.some((other) => other.speed !== null && other.with.includes(of));
}

function checkLines(
  { of, with: others, lines, speed, reason, difference, spinDifference, left }: Check,
  width: number,
): string[] {
  const name = [of, ...others].join(' and ');
  if (speed === null) return hanging(`${name}: `, reason ?? '', width);
  const gap =
    left !== undefined
      ? `left ${short(left)} J`
      : spinDifference !== undefined
        ? `difference ${short(spinDifference)} rad/s`
        : `difference ${short(difference ?? 0)} m/s`;
  const isMoving = lines.length > 1;
  if (!isMoving) return [`${name}: ${lines.join(' ')}`];
  return [spread(name, gap, width), ...lines.flatMap((line) => hangingItems(line, width))];
}

/** Stands for a space that no line is broken at. */
const TIED = '\u0001';

/** A line broken between its values where it lists them, so that no value is parted from its letter or unit. */
function hangingItems(line: string, width: number): string[] {
  const tied = /^where |with /.test(line)
    ? line
        .split(', ')
        .map((item) => item.replaceAll(' ', TIED))
        .join(', ')
    : line;
  return hanging('  ', tied, width).map((row) => row.replaceAll(TIED, ' '));
}
