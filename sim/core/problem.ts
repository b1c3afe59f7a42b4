import { catalogue, type Code } from './catalogue.js';

export type Severity = 'error' | 'warning' | 'note';

/** Something about a document that its author should know, as data. */
export interface Problem {
  severity: Severity;
  code: string;
  /** One sentence: what was found, where, what is accepted. */
  text: string;
  /** JSON pointer (RFC 6901) into the document; empty for the whole of it. */
  pointer: string;
  /** Ids of the elements it concerns. */
  of: string[];
  found?: string;
  accepted?: string;
}

/** Where a problem is: its pointer and the ids it concerns. */
export interface Place {
  pointer: string;
  of: string[];
}

/** Names in braces of a template, as a union. */
type Slots<T extends string> = T extends `${string}{${infer Name}}${infer Rest}` ? Name | Slots<Rest> : never;

/** What a code's sentence needs to be told. */
export type Values<C extends Code> = Record<Slots<(typeof catalogue)[C]['says']>, string | number>;

/**
 * The problem with this code, its sentence filled in from `values`; `found` and `accepted` become fields of their own.
 */
export function problem<C extends Code>(code: C, place: Place, values: Values<C>): Problem {
  const { severity, says } = catalogue[code];
  const given: Record<string, string | number | undefined> = values;
  const filled = says.replace(/\{(\w+)\}/g, (_, name: string) => String(given[name]));
  // A suggestion ends with a question mark of its own.
  const text = filled.replace(/\?\.$/, '?');
  const made: Problem = { severity, code, text, pointer: place.pointer, of: place.of };
  if (given.found !== undefined) made.found = String(given.found);
  if (given.accepted !== undefined) made.accepted = String(given.accepted);
  return made;
}
