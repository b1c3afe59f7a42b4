import type { Code } from '../../../sim/core/catalogue.js';
import type { JsonObject } from '../../../sim/mechanism/json/value.js';
import { full } from './full.js';
import { altered, bench, changed, ramp } from './samples.js';

/** A text or a document, and a problem it must lead to. */
export interface BadInput {
  code: Code;
  what: string;
  input: string | JsonObject;
  pointer: string;
  /** Other problems follow from it, such as references to what is wrong. */
  hasSequels?: true;
}

/** One whose fault leads to other problems. */
const sequel = (code: Code, what: string, pointer: string, input: string | JsonObject): BadInput => ({
  ...bad(code, what, pointer, input),
  hasSequels: true,
});
const bad = (code: Code, what: string, pointer: string, input: string | JsonObject): BadInput => ({
  code,
  what,
  pointer,
  input,
});

const block = (changes: JsonObject): JsonObject => changed(ramp(), 'bodies', 0, changes);
const track = (changes: JsonObject): JsonObject => changed(ramp(), 'tracks', 0, changes);
const contact = (changes: JsonObject): JsonObject => changed(ramp(), 'contacts', 0, changes);
const station = (when: JsonObject, more: JsonObject = {}): JsonObject =>
  changed(ramp(), 'stations', 1, { when, ...more });
const joint = (index: number, changes: JsonObject): JsonObject => changed(bench(), 'joints', index, changes);
const withList = (list: string, ...elements: JsonObject[]): JsonObject => altered(bench(), { [list]: elements });
const text = (document: JsonObject, from: string, to: string): string => JSON.stringify(document).replace(from, to);
const at = (of: string, x: string | number, y: string | number): JsonObject => ({ of, at: [x, y] });
const line = [at('crank', 0, 0), at('ground', 0, '200 mm')];
const spring = (changes: JsonObject): JsonObject =>
  withList('springs', { id: 'k', kind: 'linear', between: line, ...changes });
const drive = (changes: JsonObject): JsonObject => withList('drives', { id: 'd', ...changes });
const cam = (changes: JsonObject, more: JsonObject = {}): JsonObject =>
  changed(ramp(), 'bodies', 0, {
    rest: null,
    at: ['1 m', '1 m'],
    shape: {
      kind: 'cam',
      baseRadius: '30 mm',
      segments: [
        { rise: '5 mm', over: '180 deg', law: 'harmonic' },
        { fall: '5 mm', over: '180 deg', law: 'harmonic' },
      ],
      follower: { kind: 'knife', offset: 0, along: [0, 1] },
      ...changes,
    },
    ...more,
  });
const criterion = (changes: JsonObject): JsonObject => altered(ramp(), { criteria: [{ id: 'c', ...changes }] });
const polygon = (...points: [number, number][]): JsonObject => block({ shape: { kind: 'polygon', points } });

export const badInputs: BadInput[] = [
  bad('json-syntax', 'an empty file', '', ''),
  bad('json-syntax', 'prose', '', 'A block on a ramp.'),
  bad('json-syntax', 'a comma too many', '/run/until', '{"format": "joulewright/1", "run": {"until": "1 s",}}'),
  bad('json-syntax', 'a comment', '', '// a block\n{}'),
  bad('json-syntax', 'a text cut off', '/title', '{"title": "Gravity'),
  bad('json-syntax', 'something after the document', '', '{} {}'),
  bad('json-syntax', 'an escape that is none', '/title', '{"title": "\\x"}'),
  bad('json-syntax', 'a number with a leading zero', '/run', '{"run": 01}'),
  bad('json-depth', 'ten thousand brackets', '/0'.repeat(100), '['.repeat(10_000) + ']'.repeat(10_000)),
  bad('duplicate-key', 'a title given twice', '/title', text(ramp(), '"title":', '"title":"Other","title":')),
  bad('forbidden-key', '__proto__', '/__proto__', text(ramp(), '"title"', '"__proto__":{"polluted":true},"title"')),
  bad('forbidden-key', 'constructor', '/bodies/0/constructor', text(ramp(), '"mass"', '"constructor":1,"mass"')),
  bad('forbidden-key', 'prototype', '/run/prototype', text(ramp(), '"until"', '"prototype":1,"until"')),
  bad('not-finite', 'NaN', '/bodies/0/mass', text(ramp(), '"2 kg"', 'NaN')),
  bad('not-finite', 'minus infinity', '/bodies/0/mass', text(ramp(), '"2 kg"', '-Infinity')),
  bad('number-range', '1e400', '/bodies/0/mass', text(ramp(), '"2 kg"', '1e400')),
  bad('number-range', '1e-400', '/bodies/0/mass', text(ramp(), '"2 kg"', '1e-400')),
  bad('number-range', '1e400 with a unit', '/bodies/0/mass', block({ mass: '1e400 kg' })),
  bad('not-a-document', 'a list', '', '[]'),
  bad('not-a-document', 'a number', '', '7'),
  bad('wrong-format', 'no version', '/format', '{}'),
  bad('wrong-format', 'a later version', '/format', altered(ramp(), { format: 'joulewright/2' })),
  bad('missing-key', 'no run', '/run', '{"format": "joulewright/1"}'),
  sequel('missing-key', 'no id', '/bodies/0/id', block({ id: null })),
  bad('missing-key', 'no mass', '/bodies/0/mass', block({ mass: null })),
  bad('missing-key', 'density without thickness', '/bodies/0/thickness', block({ mass: null, density: 7850 })),
  bad('missing-key', 'no pose', '/bodies/0/at', block({ rest: null })),
  bad('missing-key', 'no kind of shape', '/bodies/0/shape/kind', block({ shape: {} })),
  sequel('missing-key', 'no inertia without a shape', '/bodies/0/inertia', block({ shape: { kind: 'none' } })),
  bad(
    'missing-key',
    'no bound of a criterion',
    '/criteria/0/atMost',
    criterion({ measure: 'speed', of: 'block', at: '2' }),
  ),
  bad('conflicting-keys', 'mass and density', '/bodies/0/density', block({ density: 7850, thickness: '5 mm' })),
  bad('conflicting-keys', 'angle and rest', '/bodies/0/rest', block({ angle: 0 })),
  bad('conflicting-keys', 'friction twice', '/contacts/0/staticFriction', contact({ staticFriction: 0.3 })),
  bad('unknown-key', 'a key spelled wrongly', '/contacts/0/restitutoin', contact({ restitutoin: 0.5 })),
  sequel('wrong-type', 'a text for a list', '/bodies', altered(ramp(), { bodies: 'block' })),
  sequel('wrong-type', 'a list for an element', '/bodies/0', altered(ramp(), { bodies: [[]] })),
  bad('wrong-type', 'three coordinates', '/bodies/0/velocity', block({ velocity: [0, 0, 0] })),
  bad('wrong-type', 'true for a mass', '/bodies/0/mass', block({ mass: true })),
  bad('wrong-type', 'null for a title', '/title', altered(ramp(), { title: null })),
  bad('wrong-choice', 'a shape that is none', '/bodies/0/shape/kind', block({ shape: { kind: 'sphere' } })),
  bad('wrong-choice', 'a side that is none', '/tracks/0/side', track({ side: 'top' })),
  bad('wrong-choice', 'a start that is false', '/stations/1/when/start', station({ start: false })),
  bad('too-few', 'a track without segments', '/tracks/0/to', track({ to: [] })),
  bad('too-few', 'a boundary around nothing', '/system', altered(ramp(), { system: [] })),
  bad('too-few', 'a polygon of two points', '/bodies/0/shape/points', polygon([0, 0], [1, 0])),
  bad('too-many', 'a polygon of 1001 points', '/bodies/0/shape/points', polygon(...round(1001))),
  bad('quantity-syntax', 'no number', '/bodies/0/mass', block({ mass: 'heavy' })),
  bad('unknown-unit', 'a unit that is none', '/bodies/0/mass', block({ mass: '2 kgs' })),
  bad('ambiguous-unit', 'two units after the solidus', '/springs/0/rate', spring({ rate: '2 N/m mm' })),
  bad('ambiguous-number', 'a comma before three digits', '/bodies/0/mass', block({ mass: '1,500 kg' })),
  bad(
    'wrong-dimension',
    'a mass for a length',
    '/bodies/0/shape/width',
    block({ shape: { kind: 'box', width: '3 kg', height: 1 } }),
  ),
  bad('wrong-dimension', 'a number without a unit', '/bodies/0/mass', block({ mass: '3' })),
  bad(
    'wrong-dimension',
    'a mass for a force',
    '/loads/0/force/0',
    withList('loads', { id: 'f', on: at('crank', 0, 0), force: ['3 lb', 0] }),
  ),
  bad(
    'wrong-dimension',
    'a viscous coefficient of an orifice',
    '/dampers/0/coefficient',
    withList('dampers', { id: 'c', between: line, coefficient: '2 N s/m', exponent: 2 }),
  ),
  bad('out-of-range', 'a mass of zero', '/bodies/0/mass', block({ mass: 0 })),
  bad('out-of-range', 'a negative mass', '/bodies/0/mass', block({ mass: '-2 kg' })),
  bad(
    'out-of-range',
    'a width of zero',
    '/bodies/0/shape/width',
    block({ shape: { kind: 'box', width: 0, height: 1 } }),
  ),
  bad('out-of-range', 'a rate of zero', '/springs/0/rate', spring({ rate: 0 })),
  bad(
    'out-of-range',
    'a negative damping',
    '/dampers/0/coefficient',
    withList('dampers', { id: 'c', between: line, coefficient: -1 }),
  ),
  bad('out-of-range', 'a restitution above one', '/contacts/0/restitution', contact({ restitution: 1.2 })),
  bad(
    'out-of-range',
    'a negative rise',
    '/bodies/0/shape/segments/0/rise',
    cam({ segments: [{ rise: -1, over: '360 deg', law: 'harmonic' }] }),
  ),
  bad(
    'out-of-range',
    'a negative width of a spread',
    '/spread/vary/0/plusMinus',
    altered(ramp(), { spread: { vary: [{ at: '/bodies/0/mass', plusMinus: '-5 %' }] } }),
  ),
  bad('no-direction', 'an axis that points nowhere', '/joints/2/axis', joint(2, { axis: [0, 0] })),
  bad(
    'not-rising',
    'a curve that turns back',
    '/springs/0/curve/2',
    spring({
      curve: [
        [0, 0],
        ['2 mm', '4 N'],
        ['1 mm', '6 N'],
      ],
    }),
  ),
  sequel('wrong-id', 'a space in an id', '/bodies/0/id', block({ id: 'the block' })),
  sequel('wrong-id', 'the id ground', '/bodies/0/id', block({ id: 'ground' })),
  sequel('wrong-id', 'an id that is a number', '/bodies/0/id', block({ id: 7 })),
  sequel('duplicate-id', 'a track called like a body', '/tracks/0/id', track({ id: 'block' })),
  bad('unknown-reference', 'a contact with nothing', '/contacts/0/between/0', contact({ between: ['blok', 'ramp'] })),
  bad(
    'unknown-reference',
    'a run until no station',
    '/run/until/station',
    altered(ramp(), { run: { until: { station: '9' } } }),
  ),
  bad(
    'unknown-reference',
    'a latch on no joint',
    '/latches/0/joint',
    withList('latches', { id: 'l', joint: 'z', releasesAt: { time: 1 } }),
  ),
  bad('wrong-reference', 'a body at rest on a body', '/bodies/0/rest/on', block({ rest: { on: 'block', at: 0 } })),
  bad(
    'wrong-reference',
    'a gear on a slide',
    '/joints/3/joints/1',
    altered(bench(), {
      joints: [...(bench().joints as JsonObject[]), { id: 'g', kind: 'gear', joints: ['p', 's'], ratio: 2 }],
    }),
  ),
  bad('repeated-point', 'a corner given twice', '/bodies/0/shape/points/1', polygon([0, 0], [0, 0], [1, 0], [0, 1])),
  bad(
    'repeated-point',
    'a spline that stays',
    '/tracks/0/to/0/through/1',
    track({
      to: [
        {
          through: [
            [1, 0],
            [1, 0],
          ],
        },
      ],
    }),
  ),
  bad('self-crossing', 'a bow tie', '/bodies/0/shape/points', polygon([0, 0], [1, 1], [1, 0], [0, 1])),
  bad('self-crossing', 'a polygon that is a line', '/bodies/0/shape/points', polygon([0, 0], [1, 0], [2, 0])),
  bad(
    'degenerate-segment',
    'a segment of no length',
    '/tracks/0/to/0/to',
    track({ to: [{ to: [0, '300 mm'] }, { to: [1, 0] }] }),
  ),
  bad(
    'degenerate-segment',
    'an arc that is all but a circle',
    '/tracks/0/to/0/bulge',
    track({ to: [{ to: [1, 0], bulge: 1e6 }] }),
  ),
  bad('cam-turn', 'a cam of 300 deg', '/bodies/0/shape/segments', cam({ segments: [{ dwell: '300 deg' }] })),
  bad(
    'cam-turn',
    'a cam that only rises',
    '/bodies/0/shape/segments',
    cam({ segments: [{ rise: '5 mm', over: '360 deg', law: 'harmonic' }] }),
  ),
  bad(
    'cam-table',
    'a table law without a table',
    '/bodies/0/shape/segments/0/table',
    cam({
      segments: [
        { rise: '5 mm', over: '180 deg', law: 'table' },
        { fall: '5 mm', over: '180 deg', law: 'harmonic' },
      ],
    }),
  ),
  bad(
    'cam-table',
    'a table that ends too soon',
    '/bodies/0/shape/segments/0/table',
    cam({
      segments: [
        {
          rise: '5 mm',
          over: '180 deg',
          law: 'table',
          table: [
            [0, 0],
            ['90 deg', '5 mm'],
          ],
        },
        { fall: '5 mm', over: '180 deg', law: 'harmonic' },
      ],
    }),
  ),
  bad(
    'cam-follower',
    'an offset beyond the base circle',
    '/bodies/0/shape/follower',
    cam({ follower: { kind: 'knife', offset: '40 mm', along: [0, 1] } }),
  ),
  bad(
    'cam-follower',
    'an arm too short',
    '/bodies/0/shape/follower',
    cam({
      segments: [{ dwell: '360 deg' }],
      follower: { kind: 'roller', radius: '5 mm', pivot: ['1.5 m', '1 m'], arm: '100 mm' },
    }),
  ),
  bad('cam-at-rest', 'a cam laid on a track', '/bodies/0/rest', cam({}, { at: null, rest: { on: 'ramp', at: 0 } })),
  bad('beyond-track', 'a place past the end', '/bodies/0/rest/at', block({ rest: { on: 'ramp', at: '2 m' } })),
  bad(
    'no-area',
    'the density of a particle',
    '/bodies/0/density',
    block({ shape: { kind: 'particle' }, mass: null, density: 7850, thickness: '1 mm' }),
  ),
  bad(
    'particle-turns',
    'a particle that spins',
    '/bodies/0/spin',
    block({ shape: { kind: 'particle' }, spin: '60 rpm' }),
  ),
  bad(
    'empty-wildcard',
    'a "*" that nothing fits',
    '/contacts/0/between',
    altered(bench(), {
      bodies: [{ id: 'crank', shape: { kind: 'none' }, mass: 1, inertia: 1, at: [0, 0] }],
      joints: [],
      contacts: [{ between: ['*', '*'] }],
    }),
  ),
  sequel('impossible-contact', 'a body with itself', '/contacts/0/between', contact({ between: ['block', 'block'] })),
  sequel('impossible-contact', 'a track with a track', '/contacts/0/between', contact({ between: ['ramp', 'ramp'] })),
  bad(
    'duplicate-contact',
    'a pair given twice',
    '/contacts/1/between',
    altered(ramp(), { contacts: [{ between: ['block', 'ramp'] }, { between: ['ramp', 'block'] }] }),
  ),
  bad(
    'ambiguous-contact',
    'two equal wildcards that differ',
    '/contacts/1/between',
    altered(ramp(), {
      contacts: [
        { between: ['block', '*'], friction: 0.1 },
        { between: ['*', 'ramp'], friction: 0.2 },
      ],
    }),
  ),
  bad('same-part', 'a pin of a body on itself', '/joints/0/between', joint(0, { between: ['crank', 'crank'] })),
  bad(
    'same-part',
    'a torsion spring on one body',
    '/springs/0/between',
    withList('springs', { id: 'k', kind: 'torsion', between: ['crank', 'crank'], rate: 1 }),
  ),
  bad(
    'same-part',
    'a rotary damper on one body',
    '/dampers/0/between',
    withList('dampers', { id: 'c', between: ['crank', 'crank'], coefficient: 1 }),
  ),
  bad(
    'outside-limits',
    'limits beside the drawn position',
    '/joints/0/limits',
    joint(0, { limits: { from: '10 deg', to: '20 deg' } }),
  ),
  bad(
    'rope-ends',
    'a rope between others than its ends',
    '/joints/0/between',
    joint(0, { kind: 'rope', at: null, between: ['wheel', 'ground'], through: line }),
  ),
  bad(
    'rope-too-short',
    'a rope shorter than drawn',
    '/joints/0/length',
    joint(0, { kind: 'rope', at: null, between: null, through: line, length: '100 mm' }),
  ),
  bad(
    'no-line',
    'a rope of no length',
    '/joints/0/through',
    joint(0, { kind: 'rope', at: null, between: null, through: [at('crank', 0, 0), at('ground', 0, 0)] }),
  ),
  bad(
    'no-line',
    'a spring without a line',
    '/springs/0/between',
    spring({ between: [at('crank', 0, 0), at('ground', 0, 0)], rate: 1, freeLength: '10 mm' }),
  ),
  bad(
    'no-line',
    'a damper without a line',
    '/dampers/0/between',
    withList('dampers', { id: 'c', between: [at('crank', 0, 0), at('ground', 0, 0)], coefficient: 1 }),
  ),
  bad(
    'no-line',
    'a gate of no width',
    '/stations/1/when/crosses/line',
    station({
      crosses: {
        point: at('block', 0, 0),
        line: [
          [0, 0],
          [0, 0],
        ],
      },
    }),
  ),
  bad(
    'ends-on-one-part',
    'a spring from a body to itself',
    '/springs/0/between',
    spring({ between: [at('crank', 0, 0), at('crank', 0, '10 mm')], rate: 1 }),
  ),
  bad(
    'spring-index',
    'a spring wound too tight',
    '/springs/0/wire',
    spring({ wire: { diameter: '2 mm', meanDiameter: '6 mm', activeCoils: 8, shearModulus: '81.5 GPa' } }),
  ),
  bad(
    'solid-length',
    'a solid length above the free one',
    '/springs/0/solidLength',
    spring({ rate: 1, solidLength: '1 m' }),
  ),
  bad(
    'empty-span',
    'a load that ends before it begins',
    '/loads/0/until',
    withList('loads', { id: 'f', on: 'crank', torque: 1, from: 2, until: 1 }),
  ),
  bad(
    'empty-span',
    'a band upside down',
    '/criteria/0/between',
    criterion({ measure: 'speed', of: 'block', at: '2', between: [2, 1] }),
  ),
  bad(
    'empty-span',
    'a search in one place',
    '/sizing/to',
    altered(criterion({ measure: 'speed', of: 'block', at: '2', atMost: 2 }), {
      sizing: { solve: '/bodies/0/mass', from: 1, to: 1, for: 'c' },
    }),
  ),
  bad('no-effect', 'damping without stiffness', '/contacts/0/damping', contact({ damping: 1 })),
  bad('no-effect', 'a limit without a speed', '/drives/0/limit', drive({ on: 'p', torque: 1, limit: 2 })),
  bad(
    'two-speeds',
    'two speeds on one pin',
    '/drives/1/on',
    withList('drives', { id: 'd', on: 'p', speed: 1 }, { id: 'e', on: 'p', speed: 2 }),
  ),
  bad(
    'station-ring',
    'two stations that wait for each other',
    '/stations/0/after',
    altered(ramp(), {
      stations: [
        { id: '1', when: { start: true }, after: '2' },
        { id: '2', when: { end: true }, after: '1' },
      ],
    }),
  ),
  sequel(
    'no-contact',
    'a touch of a pair that is not listed',
    '/stations/1/when/touch',
    altered(station({ touch: ['block', 'ramp'] }), { contacts: [] }),
  ),
  sequel(
    'no-contact',
    'the heat of a pair that is not listed',
    '/criteria/0/of',
    altered(criterion({ measure: 'heat', of: ['block', 'ramp'], atMost: 1 }), { contacts: [] }),
  ),
  bad(
    'no-quantity',
    'a spread of nothing',
    '/spread/vary/0/at',
    altered(ramp(), { spread: { vary: [{ at: '/bodies/7/mass', plusMinus: '5 %' }] } }),
  ),
  bad(
    'no-quantity',
    'a spread of a name',
    '/spread/vary/0/at',
    altered(ramp(), { spread: { vary: [{ at: '/title', plusMinus: '5 %' }] } }),
  ),
  bad(
    'unknown-material',
    'a material not in the table',
    '/bodies/0/material',
    altered(block({ material: 'nyoln' }), { materials: { steel: { nylon: { friction: 0.2 } } } }),
  ),
  bad(
    'duplicate-materials',
    'a pair in both orders',
    '/materials/nylon/steel',
    altered(ramp(), { materials: { steel: { nylon: { friction: 0.2 } }, nylon: { steel: { friction: 0.3 } } } }),
  ),
  bad(
    'compliant-restitution',
    'a stiffness and a restitution',
    '/contacts/0/restitution',
    contact({ stiffness: '10 N/mm', restitution: 0.5 }),
  ),
  bad(
    'static-below-kinetic',
    'kinetic friction alone',
    '/contacts/0',
    contact({ friction: null, kineticFriction: 0.2 }),
  ),
  bad(
    'rest-without-contact',
    'a body laid on what it does not touch',
    '/bodies/0/rest',
    altered(ramp(), { contacts: [] }),
  ),
  bad('starts-inside', 'a block in the ramp', '/bodies/0', block({ rest: null, at: ['200 mm', '150 mm'] })),
  bad('starts-inside', 'a block below the floor', '/bodies/0', block({ rest: null, at: ['600 mm', '-30 mm'] })),
  bad(
    'starts-inside',
    'a particle just below the floor',
    '/bodies/0',
    block({ shape: { kind: 'particle' }, rest: null, at: ['600 mm', '-1 mm'] }),
  ),
  bad(
    'starts-inside',
    'two wheels in one place',
    '/bodies/0',
    altered(changed(bench(), 'bodies', 1, { at: ['90 mm', 0] }), {
      joints: [],
      contacts: [{ between: ['crank', 'wheel'] }],
    }),
  ),
  bad('starts-behind', 'a block far below the floor', '/bodies/0', block({ rest: null, at: ['600 mm', '-90 mm'] })),
  bad(
    'starts-compressed',
    'a block in a compliant floor',
    '/bodies/0',
    altered(block({ rest: null, at: ['600 mm', '19 mm'] }), {
      contacts: [{ between: ['block', 'ramp'], stiffness: '10 N/mm' }],
    }),
  ),
  bad(
    'parts-apart',
    'a pin between two wheels that neither reaches',
    '/joints/0/at',
    joint(0, { between: ['crank', 'wheel'], at: ['100 mm', '300 mm'] }),
  ),
  bad('pin-off-part', 'a pin beside its wheel', '/joints/0/at', joint(0, { at: ['100 mm', 0] })),
  bad('after-the-run', 'a station after the end', '/stations/1/when/time', station({ time: '5 s' })),
  bad(
    'not-a-touch',
    'an approach speed at a rest',
    '/criteria/0/at',
    criterion({ measure: 'approachSpeed', of: ['block', 'ramp'], at: '2', atMost: 1 }),
  ),
  bad('no-bodies', 'nothing that moves', '/bodies', '{"format": "joulewright/1", "run": {"until": "1 s"}}'),
  bad(
    'wrong-dimension',
    'a gate in kilograms',
    '/stations/4/when/crosses/line/0/0',
    changed(full(), 'stations', 4, {
      when: {
        crosses: {
          point: at('block', 0, 0),
          line: [
            ['1 kg', 0],
            [1, 0],
          ],
        },
      },
    }),
  ),
];

function round(count: number): [number, number][] {
  return Array.from({ length: count }, (_, i) => [
    Math.cos((2 * Math.PI * i) / count),
    Math.sin((2 * Math.PI * i) / count),
  ]);
}
