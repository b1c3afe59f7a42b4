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

/** At most so many problems are told; a last one says how many more there were. */
const MOST = 1000;

/** What one reading of a document gathers. */
export class Reading {
  readonly problems: Problem[] = [];
  readonly defaults: AppliedDefault[] = [];
  errorCount = 0;
  private untold = 0;
  private readonly listed = new Set<string>();

  constructor(readonly ids: IdTable) {}

  report<C extends Code>(code: C, place: Place, values: Values<C>): void {
    this.add(problem(code, place, values));
  }

  add(found: Problem): void {
    if (found.severity === 'error') this.errorCount += 1;
    if (this.problems.length >= MOST) {
      this.untold += 1;
      return;
    }
    // What the text itself got wrong at a place explains any problem with the value there.
    const isKnown = this.problems.some((other) => other.pointer === found.pointer && explains(other.code));
    if (isKnown && found.code === 'wrong-type') return;
    this.problems.push(found);
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
    if (this.untold === 0) return;
    this.problems.push(problem('more-problems', { pointer: '', of: [] }, { found: this.untold }));
  }
}

const explains = (code: string): boolean => code === 'not-finite' || code === 'number-range';

/** The place one key further in, of the same elements. */
export const inside = (place: Place, key: string | number): Place => ({
  pointer: step(place.pointer, key),
  of: place.of,
});
