import type { NumericalCause } from '../recording/recording.js';
import type { BookedAccount, Books } from './books.js';

export const CAUSES: readonly NumericalCause[] = [
  'force-truncation',
  'solver-residual',
  'velocity-projection',
  'position-projection',
];

/**
 * What the method itself makes or loses, by cause and by body, each measured where it arises:
 * - force-truncation: a spring's impulse over a step against the change of its stored energy;
 * - solver-residual: a constraint that should do no work, times what is left of its rate after the iterations;
 * - velocity-projection and position-projection: bringing the state back onto joints and closed contacts.
 */
export class NumericalBooks {
  private readonly byCause: Record<NumericalCause, BookedAccount>;

  constructor(books: Books, ids: string[]) {
    const opened = CAUSES.map((cause) => [cause, books.open('numerical', null, ids, { cause })] as const);
    this.byCause = Object.fromEntries(opened) as Record<NumericalCause, BookedAccount>;
  }

  add(cause: NumericalCause, body: number, work: number): void {
    if (body >= 0) this.byCause[cause].work(body, work);
  }

  /** Shares work between the bodies of a pair; all of it goes to the one that moves. */
  share(cause: NumericalCause, bodyA: number, bodyB: number, work: number): void {
    if (work === 0) return;
    if (bodyA < 0) this.add(cause, bodyB, work);
    else if (bodyB < 0) this.add(cause, bodyA, work);
    else {
      this.add(cause, bodyA, work / 2);
      this.add(cause, bodyB, work / 2);
    }
  }
}
