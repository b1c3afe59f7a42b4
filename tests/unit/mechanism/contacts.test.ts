import { describe, expect, it } from 'vitest';
import type { JsonObject } from '../../../sim/mechanism/json/value.js';
import type { ContactPair } from '../../../sim/mechanism/kinds/contact.js';
import { altered, bench, mechanismOf, ramp, readDocument } from './samples.js';

const disc = (id: string, x: number, more: JsonObject = {}): JsonObject => ({
  id,
  shape: { kind: 'disc', radius: '10 mm' },
  mass: 1,
  at: [x, 1],
  ...more,
});

/** Two discs, a particle, a link and two tracks far from each other. */
const scene = (contacts: JsonObject[], more: JsonObject = {}): JsonObject => ({
  format: 'joulewright/1',
  bodies: [
    disc('a', 0, { material: 'steel' }),
    disc('b', 1, { material: 'nylon' }),
    { id: 'dot', shape: { kind: 'particle' }, mass: 1, at: [2, 1] },
    { id: 'point', shape: { kind: 'particle' }, mass: 1, at: [3, 1] },
    { id: 'link', shape: { kind: 'none' }, mass: 1, inertia: 1, at: [4, 1] },
  ],
  tracks: [
    { id: 'floor', from: [0, 0], to: [{ to: [5, 0] }], material: 'steel' },
    { id: 'wall', from: [5, 5], to: [{ to: [5, 0] }], side: 'right' },
  ],
  contacts,
  run: { until: 1 },
  ...more,
});

const pairsOf = (document: JsonObject): string[] =>
  mechanismOf(document).contacts.map(({ between }) => between.join('–'));

const pair = (document: JsonObject, a: string, b: string): ContactPair | undefined =>
  mechanismOf(document).contacts.find(({ between }) => between[0] === a && between[1] === b);

describe('A contact with "*"', () => {
  it('stands for every sensible pair, bodies first', () => {
    expect(pairsOf(scene([{ between: ['*', '*'] }]))).toEqual([
      ...['a–b', 'a–dot', 'a–point', 'a–floor', 'a–wall'],
      ...['b–dot', 'b–point', 'b–floor', 'b–wall'],
      ...['dot–floor', 'dot–wall', 'point–floor', 'point–wall'],
    ]);
  });

  it('stands for what fits the other one', () => {
    expect(pairsOf(scene([{ between: ['*', 'floor'] }]))).toEqual(['a–floor', 'b–floor', 'dot–floor', 'point–floor']);
    expect(pairsOf(scene([{ between: ['floor', '*'] }]))).toEqual(['a–floor', 'b–floor', 'dot–floor', 'point–floor']);
    expect(pairsOf(scene([{ between: ['a', '*'] }]))).toEqual(['a–b', 'a–dot', 'a–point', 'a–floor', 'a–wall']);
  });

  it('leaves out bodies that a joint holds together, unless they are named', () => {
    const jointed = altered(bench(), {
      joints: [
        { id: 'w', kind: 'weld', between: ['crank', 'wheel'] },
        {
          id: 'r',
          kind: 'rope',
          through: [
            { of: 'wheel', at: ['200 mm', 0] },
            { of: 'carriage', at: ['400 mm', 0] },
          ],
        },
      ],
    });
    expect(pairsOf(altered(jointed, { contacts: [{ between: ['*', '*'] }] }))).toEqual([
      'crank–carriage',
      'wheel–carriage',
    ]);
    const named = altered(jointed, { contacts: [{ between: ['wheel', 'crank'] }] });
    expect(pairsOf(named)).toEqual(['wheel–crank']);
  });

  it('yields as a whole to an entry that names the pair more outright', () => {
    const document = scene([
      { between: ['*', '*'], friction: 0.1, restitution: 0.9 },
      { between: ['a', '*'], friction: 0.2 },
      { between: ['floor', 'a'], friction: 0.3 },
    ]);
    expect(pair(document, 'b', 'floor')).toMatchObject({
      staticFriction: 0.1,
      restitution: 0.9,
      pointer: '/contacts/0',
    });
    expect(pair(document, 'a', 'wall')).toMatchObject({ staticFriction: 0.2, restitution: 0, pointer: '/contacts/1' });
    expect(pair(document, 'floor', 'a')).toMatchObject({ staticFriction: 0.3, restitution: 0, pointer: '/contacts/2' });
    expect(pair(document, 'a', 'floor')).toBeUndefined();
  });

  it('may fit a pair twice where both entries say the same', () => {
    const document = scene([
      { between: ['a', '*'], friction: 0.2 },
      { between: ['*', 'floor'], friction: 0.2 },
    ]);
    expect(pair(document, 'a', 'floor')?.pointer).toBe('/contacts/0');
  });
});

describe('The values of a contact', () => {
  const materials = { steel: { nylon: { staticFriction: 0.25, kineticFriction: 0.2, restitution: 0.4 } } };

  it('come from the table of materials, in either order of the names', () => {
    const document = scene([{ between: ['a', 'b'] }, { between: ['b', 'floor'] }], { materials });
    const wanted = { staticFriction: 0.25, kineticFriction: 0.2, restitution: 0.4, rollingResistance: 0 };
    expect(pair(document, 'a', 'b')).toMatchObject(wanted);
    expect(pair(document, 'b', 'floor')).toMatchObject(wanted);
  });

  it('beat the table where they are typed, each for itself', () => {
    const document = scene([{ between: ['a', 'b'], friction: 0.5, rollingResistance: '1 mm' }], { materials });
    expect(pair(document, 'a', 'b')).toMatchObject({
      staticFriction: 0.5,
      kineticFriction: 0.5,
      restitution: 0.4,
      rollingResistance: 0.001,
    });
  });

  it('are zero where neither says anything, and listed so', () => {
    const { mechanism, defaults } = readDocument(scene([{ between: ['a', 'floor'] }], { materials }));
    expect(mechanism?.contacts[0]).toMatchObject({ staticFriction: 0, kineticFriction: 0, restitution: 0 });
    expect(defaults).toContainEqual({
      pointer: '/contacts/0/restitution',
      value: '0',
      why: 'not given, and not in the table of materials for steel on steel',
    });
  });

  it('of a compliant pair have no restitution, not even of its materials', () => {
    const document = scene([{ between: ['a', 'b'], stiffness: '5 N/mm' }], { materials });
    expect(pair(document, 'a', 'b')).toMatchObject({ restitution: 0, compliant: { stiffness: 5000, damping: 0 } });
  });
});

describe('The rest speed', () => {
  const restSpeed = (changes: JsonObject): number => mechanismOf(altered(ramp(), changes)).contacts[0].restSpeed;
  const { extent } = mechanismOf(ramp());
  const still = { gravity: [0, 0] };

  it('is 1e-3 of √(g × extent)', () => {
    expect(restSpeed({})).toBeCloseTo(1e-3 * Math.sqrt(9.80665 * extent), 15);
  });

  it('is 1e-3 of the greatest starting speed where there is no gravity', () => {
    const [block] = ramp().bodies as JsonObject[];
    expect(restSpeed({ ...still, bodies: [{ ...block, velocity: ['3 m/s', '-4 m/s'] }] })).toBeCloseTo(5e-3, 15);
  });

  it('is 1e-3 of the extent in a second where nothing moves either', () => {
    expect(restSpeed(still)).toBeCloseTo(1e-3 * extent, 15);
  });

  it('is what is typed', () => {
    expect(restSpeed({ contacts: [{ between: ['block', 'ramp'], restSpeed: '7 mm/s' }] })).toBe(0.007);
  });
});
