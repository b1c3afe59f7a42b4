import type { CheckResult, ResultFinding } from './result.js';

/**
 * A result with every number finite, and −0 as 0: one that is not finite becomes 0, and a finding names the first of them
 * with its place.
 * JSON has no other numbers, and a reader must never take a nil that stands for one as measured.
 */
export function onlyFinite(result: CheckResult): CheckResult {
  const bad: string[] = [];
  const clean = replaced(result, '', bad) as CheckResult;
  return bad.length === 0 ? clean : { ...clean, findings: [...clean.findings, nonFiniteFinding(bad)] };
}

function replaced(value: unknown, pointer: string, bad: string[]): unknown {
  if (typeof value === 'number') {
    if (Number.isFinite(value)) return value + 0;
    bad.push(pointer);
    return 0;
  }
  if (Array.isArray(value)) return value.map((item, i) => replaced(item, `${pointer}/${i}`, bad));
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(
    Object.entries(value).map(([key, item]) => [key, replaced(item, `${pointer}/${key}`, bad)]),
  );
}

function nonFiniteFinding([first, ...others]: string[]): ResultFinding {
  const more = others.length > 0 ? ` and ${others.length} more` : '';
  const text = `${first}${more} in this result is not a finite number, and is given as 0.`;
  return { severity: 'error', code: 'non-finite', text, of: [] };
}
