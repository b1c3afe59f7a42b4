import type { Mechanism } from '../mechanism/model.js';
import type { Finding } from '../recording/recording.js';
import { greatestFrequency } from './frequency.js';

/** More steps than anybody waits for; a step too small to move the clock at all never ends. */
export const MOST_STEPS = 1e8;

/**
 * What is wrong with a step that somebody fixed [s]. An explicit spring force is stable up to ω h = 2 (Hairer, Lubich &
 * Wanner, *Geometric Numerical Integration*, 2006, I.5.2); beyond it every oscillation grows without bound.
 */
export function stepFindings(mechanism: Mechanism, step: number): Finding[] {
  const { atMost } = mechanism.run;
  const refusal = (code: string, text: string): Finding[] => [{ severity: 'error', code, text, of: [] }];
  if (!(atMost / step <= MOST_STEPS)) {
    const least = figure(atMost / MOST_STEPS, Math.ceil);
    return refusal(
      'step-too-small',
      `A run of ${atMost} s in steps of ${step} s takes more than ${MOST_STEPS} of them; accepted is a step of ${least} s or more.`,
    );
  }
  if (mechanism.springs.length === 0 && !mechanism.contacts.some(({ compliant }) => compliant)) return [];
  const greatest = 2 / greatestFrequency(mechanism);
  if (step < greatest) return [];
  return refusal(
    'step-unstable',
    `With a step of ${step} s the stiffest spring or compliant contact would swing up without bound; the largest stable step is ${figure(greatest, Math.floor)} s, and a sound one is a tenth of that.`,
  );
}

/** Three digits, rounded to the safe side. */
function figure(value: number, round: (value: number) => number): number {
  const unit = 10 ** (Math.floor(Math.log10(value)) - 2);
  return Number((round(value / unit) * unit).toPrecision(3));
}
