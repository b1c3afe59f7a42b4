import { inside, type Reading } from '../fields/reading.js';
import type { Element } from '../fields/spec.js';
import type { Body } from '../kinds/body.js';
import type { ContactDocument, ContactPair, MaterialTable } from '../kinds/contact.js';
import type { Joint } from '../kinds/joint.js';
import type { Track } from '../kinds/track.js';
import type { RestSpeed } from './rest-speed.js';
import { Surfaces } from './surface.js';

export interface ContactScene {
  bodies: readonly Pick<Body, 'id' | 'shape'>[];
  tracks: readonly Pick<Track, 'id'>[];
  /** Name of the material of a body or track. */
  materialOf: ReadonlyMap<string, string | undefined>;
  joints: readonly Joint[];
  materials: MaterialTable;
  /** Default of `restSpeed`. */
  restSpeed: RestSpeed;
}

type Entry = Element<ContactDocument> & { value: ContactDocument };

/** How outright an entry names a pair: both, one and a "*", or "*" twice. */
const rankOf = ({ between }: ContactDocument): number => between.filter((id) => id !== '*').length;

/**
 * The contact pairs of a document: entries with "*" expanded into every sensible pair, the entry that names a pair most
 * outright winning it as a whole, then values from the table of materials, then zero.
 */
export function resolveContacts(
  entries: readonly Element<ContactDocument>[],
  scene: ContactScene,
  reading: Reading,
): ContactPair[] {
  const whole = entries.filter((entry): entry is Entry => entry.value !== undefined);
  const expander = new Expander(whole, scene, reading);
  for (const rank of [2, 1, 0]) {
    for (const entry of whole.filter((each) => rankOf(each.value) === rank)) expander.take(entry, rank);
  }
  const surfaces = new Surfaces(scene.materials, reading);
  return expander.pairs().map(({ between, entry }) => contactPair(between, entry, scene, surfaces, reading));
}

interface Won {
  between: [string, string];
  entry: Entry;
  rank: number;
}

class Expander {
  private readonly won = new Map<string, Won>();
  private readonly bodies: ReadonlyMap<string, ContactScene['bodies'][number]>;
  private readonly tracks: ReadonlySet<string>;
  private readonly jointed: ReadonlySet<string>;

  constructor(
    private readonly entries: readonly Entry[],
    scene: ContactScene,
    private readonly reading: Reading,
  ) {
    this.bodies = new Map(scene.bodies.map((body) => [body.id, body]));
    this.tracks = new Set(scene.tracks.map((track) => track.id));
    this.jointed = new Set(scene.joints.filter(isRigid).map(({ between }) => keyOf(between)));
  }

  /** In the order of the document's entries, then of its bodies and tracks. */
  pairs(): Won[] {
    const byEntry = new Map<Entry, Won[]>(this.entries.map((entry) => [entry, []]));
    for (const won of this.won.values()) byEntry.get(won.entry)?.push(won);
    return [...byEntry.values()].flat();
  }

  take(entry: Entry, rank: number): void {
    const { between } = entry.value;
    if (rank === 2) {
      if (this.isPossible(entry)) this.win(between, entry, rank);
      return;
    }
    const found = this.expand(between);
    for (const each of found) this.win(each, entry, rank);
    if (found.length > 0) return;
    const accepted = 'a "*" that some body or track fits';
    this.reading.report('empty-wildcard', inside(entry.place, 'between'), { found: between.join(' and '), accepted });
  }

  private win(between: [string, string], entry: Entry, rank: number): void {
    const key = keyOf(between);
    const holder = this.won.get(key);
    if (!holder) {
      this.won.set(key, { between, entry, rank });
      return;
    }
    if (holder.rank > rank) return;
    const code = rank === 2 ? 'duplicate-contact' : 'ambiguous-contact';
    if (rank < 2 && sameValues(holder.entry.value, entry.value)) return;
    const place = { ...inside(entry.place, 'between'), of: between };
    const accepted = rank === 2 ? 'one entry' : 'an entry that names the pair outright';
    this.reading.report(code, place, { found: between.join(' and '), first: holder.entry.place.pointer, accepted });
  }

  /** Every pair a "*" stands for: a body and a track, or two bodies, that could touch and that no joint holds together. */
  private expand([a, b]: [string, string]): [string, string][] {
    const firsts = this.candidates(a);
    const seconds = this.candidates(b);
    const pairs = firsts.flatMap((first) => seconds.map((second) => this.ordered(first, second)));
    // A pair may be found both ways round.
    const unique = new Map<string, [string, string]>();
    for (const pair of pairs) if (!unique.has(keyOf(pair))) unique.set(keyOf(pair), pair);
    return [...unique.values()].filter((pair) => this.isSensible(pair) && !this.jointed.has(keyOf(pair)));
  }

  private candidates(id: string): string[] {
    return id === '*' ? [...this.bodies.keys(), ...this.tracks] : [id];
  }

  private ordered(a: string, b: string): [string, string] {
    return this.tracks.has(a) ? [b, a] : [a, b];
  }

  private isSensible([a, b]: [string, string]): boolean {
    const first = this.bodies.get(a);
    const second = this.bodies.get(b);
    if (a === b || !first || first.shape.kind === 'none') return false;
    if (!second) return this.tracks.has(b);
    return second.shape.kind !== 'none' && !(first.shape.kind === 'particle' && second.shape.kind === 'particle');
  }

  /** A pair named outright that cannot touch is a problem; one whose body is wrong elsewhere is passed over. */
  private isPossible({ value: { between }, place }: Entry): boolean {
    const [a, b] = between;
    if (!between.every((id) => this.bodies.has(id) || this.tracks.has(id))) return false;
    if (this.isSensible(this.ordered(a, b))) return true;
    const accepted = 'two different bodies with an outline, or such a body and a track';
    this.reading.report('impossible-contact', inside(place, 'between'), { found: this.describe(a, b), accepted });
    return false;
  }

  private describe(a: string, b: string): string {
    if (a === b) return `"${a}" with itself`;
    const words = [a, b].map((id) => `"${id}" (${this.bodies.get(id)?.shape.kind ?? 'track'})`);
    return words.join(' and ');
  }
}

const isRigid = (joint: Joint): joint is Extract<Joint, { kind: 'pin' | 'slide' | 'weld' }> =>
  joint.kind === 'pin' || joint.kind === 'slide' || joint.kind === 'weld';

const keyOf = ([a, b]: readonly [string, string]): string => (a < b ? `${a} ${b}` : `${b} ${a}`);

function sameValues(a: ContactDocument, b: ContactDocument): boolean {
  const { between: _a, ...rest } = a;
  const { between: _b, ...other } = b;
  const keys = new Set([...Object.keys(rest), ...Object.keys(other)]) as Set<keyof typeof rest>;
  return [...keys].every((key) => rest[key] === other[key]);
}

function contactPair(
  between: [string, string],
  entry: Entry,
  scene: ContactScene,
  surfaces: Surfaces,
  reading: Reading,
): ContactPair {
  const { value, place } = entry;
  const [a, b] = between.map((id) => scene.materialOf.get(id));
  const surface = surfaces.of(value, place, a, b);
  if (value.restSpeed === undefined) {
    reading.appliedOnce(`${place.pointer}/restSpeed`, scene.restSpeed.text, scene.restSpeed.why);
  }
  const { stiffness, damping = 0 } = value;
  return {
    between,
    ...surface,
    restSpeed: value.restSpeed ?? scene.restSpeed.value,
    ...(stiffness !== undefined && { compliant: { stiffness, damping } }),
    pointer: place.pointer,
  };
}
