import { problem, type Place, type Problem, type Values } from '../../core/problem.js';
import type { Code } from '../../core/catalogue.js';
import { step, type JsonValue } from '../json/value.js';
import type { IdTable } from './ids.js';

/** A default that was applied: where it would stand, what it is as it would be typed, and why it is that. */
export interface AppliedDefault {
  pointer: string;
  value: string;
  why: string;
}

/** So many errors end the reading; so many warnings and notes are told. */
const MOST = 1000;

/** Ends a reading in which everything seems to be wrong, so that it does not take for ever. */
export class TooManyErrors extends Error {}

/** What one reading of a document gathers. */
export class Reading {
  readonly problems: Problem[] = [];
  readonly defaults: AppliedDefault[] = [];
  errorCount = 0;
  private untold = 0;
  private readonly listed = new Set<string>();
  /** Where the text itself was wrong, which explains any problem with the value there. */
  private readonly explained = new Set<string>();

  constructor(readonly ids: IdTable) {}

  report<C extends Code>(code: C, place: Place, values: Values<C>): void {
    this.add(problem(code, place, values));
  }

  /** @throws TooManyErrors */
  add(found: Problem): void {
    if (found.code === 'wrong-type' && this.explained.has(found.pointer)) return;
    if (found.code === 'not-finite' || found.code === 'number-range') this.explained.add(found.pointer);
    if (found.severity !== 'error' && this.problems.length - this.errorCount >= MOST) {
      this.untold += 1;
      return;
    }
    this.problems.push(found);
    if (found.severity !== 'error') return;
    this.errorCount += 1;
    if (this.errorCount >= MOST) throw new TooManyErrors();
  }

  applied(pointer: string, value: JsonValue, why: string): void {
    this.defaults.push({ pointer, value: typeof value === 'string' ? value : JSON.stringify(value), why });
  }

  /** The same for a default that many pairs share: listed once for each place and value. */
  appliedOnce(pointer: string, value: string, why: string): void {
    const key = `${pointer} ${value} ${why}`;
    if (this.listed.has(key)) return;
    this.listed.add(key);
    this.defaults.push({ pointer, value, why });
  }

  /** Closes the list; call once. */
  finish(): void {
    if (this.errorCount >= MOST) this.more(`more than ${MOST} errors`);
    else if (this.untold > 0) this.more(`${this.untold} more warnings and notes`);
  }

  private more(found: string): void {
    this.problems.push(problem('more-problems', { pointer: '', of: [] }, { found, accepted: `${MOST}` }));
  }
}

/** The place one key further in, of the same elements. */
export const inside = (place: Place, key: string | number): Place => ({
  pointer: step(place.pointer, key),
  of: place.of,
});
