import type { CheckResult, ResultFinding } from '../result.js';
import { hanging } from './layout.js';
import { time } from './quantities.js';

const ORDER: Record<ResultFinding['severity'], { rank: number; word: string }> = {
  error: { rank: 0, word: 'Error' },
  warning: { rank: 1, word: 'Warning' },
  note: { rank: 2, word: 'Note' },
};

/** The findings, errors first, each with its code, its place in the file, and when it was. */
export function findingsText({ findings }: CheckResult, width: number): string[] {
  if (findings.length === 0) return [];
  const sorted = [...findings].sort((a, b) => ORDER[a.severity].rank - ORDER[b.severity].rank);
  return ['', 'Findings', '─'.repeat(width), ...sorted.flatMap((finding) => findingText(finding, width))];
}

function findingText({ severity, code, text, at, pointer }: ResultFinding, width: number): string[] {
  const where = [code, pointer, at === undefined ? undefined : `at ${time(at)}`].filter(Boolean).join(', ');
  return hanging(ORDER[severity].word.padEnd(9), `${text} (${where})`, width);
}
