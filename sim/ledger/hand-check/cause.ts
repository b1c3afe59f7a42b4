import type { Quantity } from './figures.js';
import { symbol, type Token } from './tokens.js';

/** A value that a term stands on, printed below the equation. */
export interface Factor {
  name: string;
  value: number;
  kind: Quantity;
  /** How it joins with the same factor of the stretch before: they add up, or the first or the last of them counts. */
  joins: 'sum' | 'first' | 'last';
  /** The element it belongs to. */
  of?: string[];
}

/** One amount of the work–energy equation [J], positive where it adds to the motion. */
export interface Term {
  /** Terms of one key join into one. */
  key: string;
  value: number;
  factors: Factor[];
  /** Set of the same letters; where several occur they are numbered. */
  family: string;
  /** In symbols, without sign. */
  shape: (factor: (name: string) => Token) => Token[];
}

/** A cause of work along a course. */
export interface Cause {
  /** Work from the course's start to q, where it depends on the place alone [J]. */
  given?: (q: number) => number;
  /** dW/dq where it does not, at q and v² (of the coordinate) [N] or [N m]. */
  rate?: (q: number, square: number) => number;
  /** The rate is the same all along. */
  constant?: boolean;
  term: (work: number) => Term;
}

/** A term that is worked out along the way and printed by its number alone: W with the name of what takes it. */
export function workTerm(key: string, name: string, of: string[], value: number): Term {
  return {
    key: `work ${key}`,
    value,
    factors: [],
    family: `work ${key}`,
    shape: () => [symbol('W', { sub: name, of })],
  };
}

/** Joins a term to the last of the same key. */
export function joinTerms(terms: readonly Term[]): Term[] {
  const joined = new Map<string, Term>();
  for (const term of terms) {
    const earlier = joined.get(term.key);
    joined.set(
      term.key,
      earlier ? { ...term, value: earlier.value + term.value, factors: joinFactors(earlier, term) } : term,
    );
  }
  return [...joined.values()];
}

function joinFactors(earlier: Term, later: Term): Factor[] {
  return earlier.factors.map((factor, i) => {
    const { value } = later.factors[i];
    const kept = factor.joins === 'sum' ? factor.value + value : factor.joins === 'last' ? value : factor.value;
    return { ...factor, value: kept };
  });
}
