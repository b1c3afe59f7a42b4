import type { Vec } from '../../core/vec.js';
import type { Place } from '../../core/problem.js';
import type { JsonValue } from '../json/value.js';
import type { Dimension, QuantityName } from '../units/dimension.js';
import type { Reading } from './reading.js';

/**
 * A field table is data: one description of a kind's keys that the validator, the list of defaults, the JSON Schema, the
 * canonical writer and the item card all interpret. `Field<T>` carries, in its type only, what reading it gives.
 */
export type Spec =
  | TextSpec
  | FlagSpec
  | IdSpec
  | RefSpec
  | ChoiceSpec
  | QuantitySpec
  | MeasureSpec
  | VectorSpec
  | TableSpec
  | ListSpec
  | TupleSpec
  | RecordSpec
  | TaggedSpec
  | EitherSpec
  | MapSpec;

declare const reads: unique symbol;
export type Field<T> = Spec & { readonly [reads]?: T };
export type Read<F> = F extends { readonly [reads]?: infer T } ? T : never;

export interface TextSpec {
  type: 'text';
}
export interface FlagSpec {
  type: 'flag';
}
export interface IdSpec {
  type: 'id';
}

/** What an id may lead to. `pin` and `slide` are joints of that kind; `ground` and `all` are words, no ids. */
export type Target =
  | 'body'
  | 'track'
  | 'joint'
  | 'pin'
  | 'slide'
  | 'spring'
  | 'damper'
  | 'drive'
  | 'load'
  | 'latch'
  | 'station'
  | 'criterion'
  | 'ground'
  | 'all'
  | '*';
export interface RefSpec {
  type: 'ref';
  to: readonly Target[];
}
export interface ChoiceSpec {
  type: 'choice';
  options: readonly string[];
}
export interface Range {
  above?: number;
  atLeast?: number;
  below?: number;
  atMost?: number;
  notZero?: true;
  whole?: true;
}
export interface QuantitySpec {
  type: 'quantity';
  kind: QuantityName;
  /** Unit it is shown in. */
  unit: string;
  range: Range;
}
/** A quantity whose dimension something else decides; read with its dimension. */
export interface MeasureSpec {
  type: 'measure';
}
export interface VectorSpec {
  type: 'vector';
  kind: QuantityName;
  unit: string;
  size: 2 | 3;
  notZero: boolean;
}
/** Pairs [x, y] with x rising. */
export interface TableSpec {
  type: 'table';
  x: QuantityName;
  y: QuantityName;
}
export interface ListSpec {
  type: 'list';
  item: Spec;
  atLeast: number;
  /** Its items are elements: one that is wrong does not spoil the list, and each keeps its place. */
  ofElements: boolean;
}
export interface TupleSpec {
  type: 'tuple';
  items: readonly Spec[];
}
/** Keys that stand in for each other: exactly one group is given (or at most one, where `optional`). */
export interface Alternative {
  groups: readonly (readonly string[])[];
  optional?: true;
}
export interface RecordSpec {
  type: 'record';
  /** "a disc": what it is, for messages. */
  says: string;
  fields: Readonly<Record<string, Entry>>;
  alternatives: readonly Alternative[];
  check?: (value: never, place: Place, reading: Reading) => void;
}
/** Which record it is, the value of one key tells. */
export interface TaggedSpec {
  type: 'tagged';
  says: string;
  tag: string;
  variants: Readonly<Record<string, RecordSpec>>;
}
/** Which of several it is, the look of the value tells. */
export interface EitherSpec {
  type: 'either';
  says: string;
  options: readonly Spec[];
  choose: (value: JsonValue, reading: Reading | null) => number;
}
/** An object whose keys are names of the author's. */
export interface MapSpec {
  type: 'map';
  says: string;
  value: Spec;
}

export type Presence = 'required' | 'optional' | 'default';
export interface Entry<T = unknown, P extends Presence = Presence> {
  spec: Field<T>;
  /** One sentence for the format's description and the item card. */
  doc: string;
  presence: P;
  /** As it would be typed, where `presence` is 'default'. */
  value?: JsonValue;
  why?: string;
}

type Entries = Readonly<Record<string, Entry>>;
type Present<E> = { [K in keyof E as E[K] extends Entry<unknown, 'optional'> ? never : K]: EntryRead<E[K]> };
type Absent<E> = { [K in keyof E as E[K] extends Entry<unknown, 'optional'> ? K : never]?: EntryRead<E[K]> };
type EntryRead<E> = E extends { spec: infer F } ? Read<F> : never;
/** What reading a record with these entries gives. */
export type Fields<E> = Present<E> & Absent<E>;
export type RecordField<T> = RecordSpec & { readonly [reads]?: T };

export const required = <T>(spec: Field<T>, doc: string): Entry<T, 'required'> => ({ spec, doc, presence: 'required' });
export const optional = <T>(spec: Field<T>, doc: string): Entry<T, 'optional'> => ({ spec, doc, presence: 'optional' });
export const withDefault = <T>(spec: Field<T>, value: JsonValue, why: string, doc: string): Entry<T, 'default'> => ({
  spec,
  doc,
  presence: 'default',
  value,
  why,
});

export const text: Field<string> = { type: 'text' };
export const flag: Field<boolean> = { type: 'flag' };
export const id: Field<string> = { type: 'id' };
export const ref = (...to: Target[]): Field<string> => ({ type: 'ref', to });
export const choice = <const O extends string>(...options: O[]): Field<O> => ({ type: 'choice', options });
export const quantity = (kind: QuantityName, unit: string, range: Range = {}): Field<number> => ({
  type: 'quantity',
  kind,
  unit,
  range,
});
export const number = (range: Range = {}): Field<number> => quantity('number', '', range);
export const vector = (kind: QuantityName, unit: string): Field<Vec> => ({
  type: 'vector',
  kind,
  unit,
  size: 2,
  notZero: false,
});
export const direction: Field<Vec> = { type: 'vector', kind: 'number', unit: '', size: 2, notZero: true };
export const position: Field<Vec> = vector('length', 'mm');
export const table = (x: QuantityName, y: QuantityName): Field<Vec[]> => ({ type: 'table', x, y });
export const list = <T>(item: Field<T>, atLeast = 0): Field<T[]> => ({
  type: 'list',
  item,
  atLeast,
  ofElements: false,
});
/** One element of a list: its value where all of it is right, and as much as could be read. */
export interface Element<T> {
  value: T | undefined;
  draft: Partial<T>;
  place: Place;
}
export const elements = <T>(item: Field<T>): Field<Element<T>[]> => ({
  type: 'list',
  item,
  atLeast: 0,
  ofElements: true,
});
export const pair = <T>(item: Field<T>): Field<[T, T]> => ({ type: 'tuple', items: [item, item] });

/** A quantity with its dimension; null for a bare number. `text` is what was typed. */
export interface Measured {
  value: number;
  dimension: Dimension | null;
  text: string;
}
export const measure: Field<Measured> = { type: 'measure' };

interface RecordOptions<T> {
  alternatives?: readonly Alternative[];
  check?: (value: T, place: Place, reading: Reading) => void;
}
export function record<const E extends Entries>(
  says: string,
  fields: E,
  options: RecordOptions<Fields<E>> = {},
): RecordField<Fields<E>> {
  const { alternatives = [], check } = options;
  const spec: RecordField<Fields<E>> = { type: 'record', says, fields, alternatives };
  if (check) spec.check = check;
  return spec;
}

type Variants = Readonly<Record<string, RecordSpec>>;
/** Records told apart by the value of `tag`, which the result carries. */
export const tagged = <const K extends string, const V extends Variants>(
  says: string,
  tag: K,
  variants: V,
): Field<{ [N in keyof V & string]: Record<K, N> & Read<V[N]> }[keyof V & string]> => ({
  type: 'tagged',
  says,
  tag,
  variants,
});

type AnyOf<O extends readonly Spec[]> = Read<O[number]>;
export const either = <const O extends readonly Spec[]>(
  says: string,
  options: O,
  choose: (value: JsonValue, reading: Reading | null) => number,
): Field<AnyOf<O>> => ({ type: 'either', says, options, choose });

export const map = <T>(says: string, value: Field<T>): Field<Record<string, T>> => ({ type: 'map', says, value });
