import type { CheckResult, ResultCriterion } from '../result.js';
import { table } from './layout.js';
import { short } from './quantities.js';

/** The acceptance criteria with their limits, in SI, and whether they pass. */
export function criteriaText({ criteria }: CheckResult, width: number): string[] {
  if (criteria.length === 0) return [];
  const passed = criteria.filter(({ passes }) => passes === true).length;
  const columns = [
    { head: 'Criteria', cells: criteria.map(({ id }) => id), align: 'left' as const },
    {
      head: 'Measured',
      cells: criteria.map(({ value }) => (value === null ? '–' : short(value))),
      align: 'right' as const,
    },
    { head: 'Limit', cells: criteria.map(limit), align: 'left' as const },
    { head: `${passed} of ${criteria.length} pass`, cells: criteria.map(outcome), align: 'left' as const },
  ];
  return ['', ...table(columns, 4, width)];
}

function limit({ atMost, atLeast, between }: ResultCriterion): string {
  if (between) return `${short(between[0])} to ${short(between[1])}`;
  if (atMost !== undefined) return `≤ ${short(atMost)}`;
  return atLeast === undefined ? '' : `≥ ${short(atLeast)}`;
}

function outcome({ passes }: ResultCriterion): string {
  return passes === null ? 'not evaluated' : passes ? 'pass' : 'FAIL';
}
