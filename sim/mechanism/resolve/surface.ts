import type { Place } from '../../core/problem.js';
import type { Reading } from '../fields/reading.js';
import type { ContactDocument, ContactPair, MaterialTable, SurfaceDocument } from '../kinds/contact.js';

type Surface = Pick<ContactPair, 'staticFriction' | 'kineticFriction' | 'restitution' | 'rollingResistance'>;

const keys = ['staticFriction', 'kineticFriction', 'restitution', 'rollingResistance'] as const;
type Key = (typeof keys)[number];

/**
 * Friction, restitution and rolling resistance of pairs: as typed, else from the table of materials, else zero. Worked out,
 * and its defaults listed, once for each entry and two materials.
 */
export class Surfaces {
  private readonly known = new Map<string, Surface>();

  constructor(
    private readonly table: MaterialTable,
    private readonly reading: Reading,
  ) {}

  of(typed: ContactDocument, place: Place, a: string | undefined, b: string | undefined): Surface {
    const key = JSON.stringify([place.pointer, a, b]);
    const known = this.known.get(key);
    if (known) return known;
    const surface = this.workOut(typed, place, a, b);
    this.known.set(key, surface);
    return surface;
  }

  private workOut(typed: ContactDocument, place: Place, a: string | undefined, b: string | undefined): Surface {
    const row = this.row(a, b);
    const surface: Surface = { staticFriction: 0, kineticFriction: 0, restitution: 0, rollingResistance: 0 };
    for (const key of keys) {
      // A compliant pair gives back what its spring stores; a restitution of its materials is not asked for.
      if (key === 'restitution' && typed.stiffness !== undefined) continue;
      const own = valueOf(typed, key);
      const value = own ?? (row && valueOf(row, key));
      if (value !== undefined) surface[key] = value;
      if (own === undefined) this.reading.appliedOnce(`${place.pointer}/${key}`, `${value ?? 0}`, whyNot(value, a, b));
    }
    return surface;
  }

  private row(a: string | undefined, b: string | undefined): SurfaceDocument | undefined {
    if (a === undefined || b === undefined) return undefined;
    const look = (x: string, y: string): SurfaceDocument | undefined =>
      Object.hasOwn(this.table, x) && Object.hasOwn(this.table[x], y) ? this.table[x][y] : undefined;
    return look(a, b) ?? look(b, a);
  }
}

function whyNot(value: number | undefined, a: string | undefined, b: string | undefined): string {
  if (a === undefined || b === undefined) return 'not given';
  return value === undefined
    ? `not given, and not in the table of materials for ${a} on ${b}`
    : `table of materials: ${a} on ${b}`;
}

const valueOf = (given: SurfaceDocument, key: Key): number | undefined =>
  key === 'staticFriction' || key === 'kineticFriction' ? (given[key] ?? given.friction) : given[key];
