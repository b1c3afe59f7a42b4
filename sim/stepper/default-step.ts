import type { Body } from '../mechanism/kinds/body.js';
import type { Mechanism } from '../mechanism/model.js';
import type { Spring } from '../mechanism/kinds/spring.js';
import { steepest } from './kinds/spring.js';
import { shapeReach } from './scale.js';

/** Steps in the time in which something falls the extent of the mechanism. */
const PER_FALL = 1000;
/** Steps in a period of the stiffest spring: the rule's relative energy error is then about (2π/200)²/24. */
const PER_PERIOD = 200;
/** Steps in a turn at the greatest starting spin. */
const PER_TURN = 2000;
/** Steps in a passage of the whole mechanism at the greatest starting speed. */
const PER_PASSAGE = 1000;
const PER_RUN = 400;

/**
 * The step the stepper takes when nobody fixes one [s], and what decided it: the size of the mechanism under gravity,
 * its starting speeds and spins, its stiffest spring or compliant contact, the length of the run.
 */
export function defaultStep(mechanism: Mechanism): { step: number; why: string } {
  const candidates: { step: number; why: string }[] = [];
  const g = Math.hypot(...mechanism.gravity);
  if (g > 0) candidates.push({ step: Math.sqrt(mechanism.extent / g) / PER_FALL, why: 'its size under gravity' });
  const speed = Math.max(0, ...mechanism.bodies.map(startSpeed));
  if (speed > 0) candidates.push({ step: mechanism.extent / speed / PER_PASSAGE, why: 'its starting speed' });
  const spin = Math.max(0, ...mechanism.bodies.map((body) => Math.abs(body.spin)));
  if (spin > 0) candidates.push({ step: (2 * Math.PI) / spin / PER_TURN, why: 'its starting spin' });
  const stiffest = Math.max(0, ...mechanism.springs.map((spring) => springFrequency(spring, mechanism)));
  if (stiffest > 0) candidates.push({ step: (2 * Math.PI) / stiffest / PER_PERIOD, why: 'its stiffest spring' });
  const hardest = Math.max(0, ...mechanism.contacts.map((pair) => contactFrequency(pair, mechanism)));
  if (hardest > 0)
    candidates.push({ step: (2 * Math.PI) / hardest / PER_PERIOD, why: 'its stiffest compliant contact' });
  candidates.push({ step: mechanism.run.atMost / PER_RUN, why: 'the length of the run' });
  return candidates.reduce((least, candidate) => (candidate.step < least.step ? candidate : least));
}

function startSpeed(body: Body): number {
  return Math.hypot(...body.velocity) + Math.abs(body.spin) * shapeReach(body.shape);
}

function springFrequency(spring: Spring, mechanism: Mechanism): number {
  if (spring.kind === 'gas') return 0;
  const inverse = (id: string, of: (body: Body) => number): number => {
    const body = mechanism.bodies.find((candidate) => candidate.id === id);
    return body && of(body) > 0 ? 1 / of(body) : 0;
  };
  if (spring.kind === 'torsion') {
    const compliance = spring.between.reduce((sum, id) => sum + inverse(id, (body) => body.inertia), 0);
    return Math.sqrt(spring.rate * compliance);
  }
  const rate = spring.curve ? steepest(spring.curve) : spring.rate;
  const mobility = spring.between.reduce((sum, { of, at }) => {
    const body = mechanism.bodies.find((candidate) => candidate.id === of);
    if (!body) return sum;
    const lever2 = (at[0] - body.at[0]) ** 2 + (at[1] - body.at[1]) ** 2;
    return sum + 1 / body.mass + (body.inertia > 0 ? lever2 / body.inertia : 0);
  }, 0);
  return Math.sqrt(rate * mobility);
}

function contactFrequency({ compliant, between }: Mechanism['contacts'][number], mechanism: Mechanism): number {
  if (!compliant) return 0;
  const mobility = mechanism.bodies
    .filter((body) => between.includes(body.id))
    .reduce(
      (sum, body) => sum + 1 / body.mass + (body.inertia > 0 ? shapeReach(body.shape) ** 2 / body.inertia : 0),
      0,
    );
  return Math.sqrt(compliant.stiffness * mobility);
}
