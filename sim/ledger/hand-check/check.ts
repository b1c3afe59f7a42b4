import type { Expression } from './tokens.js';

/** The work–energy equation of one body between two stations, as on paper. */
export interface HandCheck {
  from: string;
  to: string;
  /** The body. */
  of: string;
  /** Bodies that move with it as one when it arrives. */
  with: string[];
  /** The equation in symbols, in plain characters; empty where there is none. */
  equation: string;
  /** Symbols, their values, the sum in numbers, the answer. */
  lines: string[];
  /** The same lines for typesetting. */
  typeset: Expression[];
  /** Of the centre of mass on arrival [m/s]; nothing where no hand sum can be made, with the reason. */
  speed: number | null;
  /** Of a body that turns about a fixed pin [rad/s], without sign. */
  spin?: number;
  /** Where the body is at rest on arrival by the station's own meaning: what the sum leaves [J]; nil but for rounding. */
  left?: number;
  /** One sentence: which assumption of a hand sum fails. */
  reason?: string;
  /** This speed less the run's [m/s]. */
  difference?: number;
  /** This spin less the run's [rad/s]. */
  spinDifference?: number;
}

/** The speed [m/s] that the hand checks give a body at a station; nothing where none does. */
export function speedByHand(
  checks: readonly Pick<HandCheck, 'of' | 'to' | 'speed'>[],
  body: string,
  station: string,
): number | null {
  return checks.find(({ of, to, speed }) => of === body && to === station && speed !== null)?.speed ?? null;
}
