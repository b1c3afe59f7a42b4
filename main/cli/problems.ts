import type { Problem } from '../../sim/core/problem.js';
import type { Finding } from '../../sim/recording/recording.js';

/** One problem of a file as a line of text: severity, place, sentence, code. */
export function problemLine(problem: Problem): string {
  const place = problem.pointer === '' ? '' : `${problem.pointer}: `;
  return `${problem.severity}: ${place}${problem.text} [${problem.code}]\n`;
}

/** A problem of the document as a finding of the result, with its place kept. */
export function asFinding({ severity, code, text, of, pointer }: Problem): Finding & { pointer: string } {
  return { severity, code, text, of, pointer };
}
