import type { Place } from '../../core/problem.js';
import type { Reading } from '../fields/reading.js';
import type { ContactDocument, ContactPair, MaterialTable, SurfaceDocument } from '../kinds/contact.js';
import type { ContactScene } from './contacts.js';

type Surface = Pick<ContactPair, 'staticFriction' | 'kineticFriction' | 'restitution' | 'rollingResistance'>;

const keys = ['staticFriction', 'kineticFriction', 'restitution', 'rollingResistance'] as const;

/** Friction, restitution and rolling resistance of a pair: as typed, else from the table of materials, else zero. */
export function surfaceOf(
  between: [string, string],
  typed: ContactDocument,
  place: Place,
  scene: ContactScene,
  reading: Reading,
): Surface {
  const names = between.map((id) => materialOf(id, scene));
  const row = tableRow(scene.materials, names[0], names[1]);
  const surface: Surface = { staticFriction: 0, kineticFriction: 0, restitution: 0, rollingResistance: 0 };
  for (const key of keys) {
    const own = valueOf(typed, key);
    const value = own ?? (row && valueOf(row, key));
    if (value !== undefined) surface[key] = value;
    if (own === undefined) applied(key, value, names, place, reading, typed);
  }
  // A compliant pair gives back what its spring stores; a restitution of its materials is not asked for.
  if (typed.stiffness !== undefined) surface.restitution = 0;
  return surface;
}

function applied(
  key: (typeof keys)[number],
  value: number | undefined,
  names: (string | undefined)[],
  place: Place,
  reading: Reading,
  typed: ContactDocument,
): void {
  if (key === 'restitution' && typed.stiffness !== undefined) return;
  const pointer = `${place.pointer}/${key}`;
  const [a, b] = names;
  if (value !== undefined) reading.appliedOnce(pointer, String(value), `table of materials: ${a ?? ''} on ${b ?? ''}`);
  else if (a === undefined || b === undefined) reading.appliedOnce(pointer, '0', 'not given');
  else reading.appliedOnce(pointer, '0', `not given, and not in the table of materials for ${a} on ${b}`);
}

const materialOf = (id: string, { bodies, tracks }: ContactScene): string | undefined =>
  (bodies.find((body) => body.id === id) ?? tracks.find((track) => track.id === id))?.material;

function tableRow(table: MaterialTable, a?: string, b?: string): SurfaceDocument | undefined {
  if (a === undefined || b === undefined) return undefined;
  const look = (x: string, y: string): SurfaceDocument | undefined =>
    Object.hasOwn(table, x) && Object.hasOwn(table[x], y) ? table[x][y] : undefined;
  return look(a, b) ?? look(b, a);
}

const valueOf = (given: SurfaceDocument, key: (typeof keys)[number]): number | undefined =>
  key === 'staticFriction' || key === 'kineticFriction' ? (given[key] ?? given.friction) : given[key];
