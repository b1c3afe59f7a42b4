import { type Checked } from './checked.js';

/** A document in which nothing moves. */
export function checkRun({ draft, reading }: Checked): void {
  if (draft.bodies && draft.bodies.length > 0) return;
  reading.report('no-bodies', { pointer: '/bodies', of: [] }, { found: 'no bodies', accepted: 'at least one' });
}
