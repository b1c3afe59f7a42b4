import { joinTerms, type Term } from './cause.js';
import { refuse } from './refusal.js';
import type { Expression } from './tokens.js';

/** What moves, and how its kinetic energy goes with its speed: T = ½ M v² or, about a pin, ½ I_O ω². */
export interface Mover {
  kind: 'mass' | 'roll' | 'pin';
  members: string[];
  /** Of the members, in their order [kg]. */
  masses: number[];
  /** M [kg], or I_O [kg m²]. */
  measure: number;
  /** Of a rolling disc [m], [kg m²]. */
  rolling?: { radius: number; inertia: number };
  /** The pin, and how far the centre of mass is from it [m]. */
  pin?: { id: string; arm: number };
}

/** One work–energy equation: from a known speed over a list of amounts to a speed. */
export interface Stage {
  /** Labels of its ends: a station's id, or ′ within a span. */
  from: string;
  to: string;
  start: Mover;
  end: Mover;
  /** Speed [m/s] or spin [rad/s] at its start. */
  rate: number;
  terms: Term[];
  /** Printed before it, such as the speeds after an impact. */
  before: Expression[];
  /** The body stands at its end, by what the station means or as it is found; so the sum must leave nothing. */
  rests?: string;
}

export const kinetic = ({ measure }: Mover, rate: number): number => 0.5 * measure * rate ** 2;

/** Kinetic energy that the sum leaves [J]. */
export function leftOf({ start, rate, terms }: Stage): number {
  return terms.reduce((sum, { value }) => sum + value, kinetic(start, rate));
}

/** The greatest amount of a stage [J], which what is left is judged by. */
function greatestOf({ start, rate, terms }: Stage): number {
  return Math.max(kinetic(start, rate), ...joinTerms(terms).map(({ value }) => Math.abs(value)), 0);
}

/** Below this share of the greatest amount, four figures of each leave none of the rest. */
const LEAST = 1e-3;
/** What a sum may leave of its greatest amount where the body is at rest. */
const MOST_LEFT = 0.01;

/** Speed or spin at the end of a stage. */
export function endRate(stage: Stage): number {
  const [left, greatest] = [leftOf(stage), greatestOf(stage)];
  if (stage.rests !== undefined) {
    if (Math.abs(left) > MOST_LEFT * greatest)
      refuse(`The sum leaves ${left.toPrecision(3)} J where ${stage.end.members[0]} is at rest.`);
    return 0;
  }
  if (greatest === 0) return 0;
  if (left < -LEAST * greatest)
    refuse(
      `The sum leaves ${left.toPrecision(3)} J for the motion: by these figures ${stage.end.members[0]} does not get there.`,
    );
  if (left < LEAST * greatest)
    refuse('What is left is less than a thousandth of what came and went, too little for a sum.');
  return Math.sqrt((2 * left) / stage.end.measure);
}

/** Whether two movers are the same bodies, moving in the same way. */
export function sameMover(a: Mover, b: Mover): boolean {
  return (
    a.kind === b.kind &&
    a.measure === b.measure &&
    a.members.length === b.members.length &&
    a.members.every((id) => b.members.includes(id))
  );
}
