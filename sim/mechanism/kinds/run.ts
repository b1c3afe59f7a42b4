import { moment } from './common.js';
import { number, optional, quantity, record, required, type Read } from '../fields/spec.js';

/** Field table of the run. */
export const runFields = record('the run settings', {
  until: required(moment, 'When the run ends: a time, or {"station": id}.'),
  atMost: optional(quantity('time', 's', { above: 0 }), 'Longest time; default 60 s where it ends at a station.'),
  step: optional(quantity('time', 's', { above: 0 }), "The stepper's step; default: from the document."),
  tolerance: optional(number({ above: 0, below: 1 }), "The auditor's relative tolerance."),
  timeBudget: optional(quantity('time', 's', { above: 0 }), 'Longest time the computer may take.'),
});

export type RunDocument = Read<typeof runFields>;
