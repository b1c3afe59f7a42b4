import type { RunEnd } from '../../sim/recording/recording.js';

const words: Record<RunEnd, string> = {
  reachedEnd: 'ended as set',
  stepTooSmall: 'stopped: the step became too small',
  maxSteps: 'stopped: too many steps',
  nonFinite: 'stopped: a value is no longer finite',
  noSolution: 'stopped: no solution for the contacts',
  eventsAccumulate: 'stopped: events without end',
  timeBudget: 'stopped: time budget used up',
  cancelled: 'halted',
  notSimulated: 'not simulated',
};

/** How a run ended, for people. */
export function endWords(end: RunEnd): string {
  return words[end];
}
