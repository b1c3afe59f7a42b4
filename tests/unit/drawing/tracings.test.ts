import { describe, expect, it } from 'vitest';
import { dot, norm } from '../../../sim/core/vec.js';
import { energyStrip } from '../../../sim/drawing/strip.js';
import { forceArrows, forcesOn, forceScale } from '../../../sim/drawing/tracings/forces.js';
import { bandLabel, lossBand, lossScale } from '../../../sim/drawing/tracings/loss-band.js';
import { lossMap } from '../../../sim/drawing/tracings/loss-map.js';
import { trail, trailInterval } from '../../../sim/drawing/tracings/trail.js';
import { bodyAtRow, bodyOf, timeOfRow } from '../../../sim/recording/index.js';
import { runStepper } from '../../../sim/stepper/index.js';
import { box, degrees, disc, onRamp, ramp } from '../../support/parts.js';
import { G, mechanismOf } from '../../support/run.js';

const friction = 0.2;
const angle = 30;
const mechanism = mechanismOf({
  bodies: [box('block', onRamp(angle, 0.5, 0.1), [0.3, 0.2], 4, { angle: -degrees(angle) })],
  tracks: [ramp(angle, 6)],
  contacts: [{ between: ['block', 'ramp'], friction }],
  run: { until: 1 },
});
const run = runStepper(mechanism);
const spec = bodyOf(run, 'block')!;
const last = run.rowCount - 1;
const normal = 4 * G * Math.cos(degrees(angle));

describe('forces', () => {
  const forces = forcesOn(mechanism, run, 'block', 0.7);
  const force = (symbol: string) => forces.find((each) => each.symbol === symbol)!.force;
  const { vx, vy } = bodyAtRow(run, spec, last);

  it('are weight, normal force and friction in the sizes of the sum on paper', () => {
    expect(norm(force('W'))).toBeCloseTo(4 * G, 6);
    expect(norm(force('N'))).toBeCloseTo(normal, 2);
    expect(norm(force('F'))).toBeCloseTo(friction * normal, 2);
  });

  it('push the way they do: the track away from itself, friction against the slide', () => {
    expect(force('N')[1]).toBeGreaterThan(0);
    expect(dot(force('N'), [vx, vy])).toBeCloseTo(0, 2);
    expect(dot(force('F'), [vx, vy])).toBeLessThan(0);
  });

  it('are drawn from their points at one scale, a round figure for fifty pixels', () => {
    const perPixel = forceScale(mechanism);
    expect(perPixel * 50).toBe(50);
    const arrows = forceArrows(forces, 100, perPixel);
    expect(arrows.filter(({ kind }) => kind === 'line')).toHaveLength(6);
  });
});

describe('the loss map', () => {
  const bands = lossMap(mechanism, run, [0, last]);
  const path = Math.hypot(bodyAtRow(run, spec, last).x - bodyAtRow(run, spec, 0).x, bodyAtRow(run, spec, last).y - bodyAtRow(run, spec, 0).y); // prettier-ignore

  it('holds the whole of the friction’s heat, on the segment it was lost on', () => {
    expect(bands).toHaveLength(1);
    expect(bands[0].joules).toBeCloseTo(friction * normal * path, 2);
    expect(bands[0]).toMatchObject({ track: 'ramp', segment: 0 });
  });

  it('keeps rolling resistance apart from friction', () => {
    const rolling = mechanismOf({
      bodies: [disc('wheel', onRamp(angle, 0.5, 0.1), 0.1, 4)],
      tracks: [ramp(angle, 6)],
      contacts: [{ between: ['wheel', 'ramp'], friction: 0.8, rollingResistance: 0.005 }],
      run: { until: 0.8 },
    });
    const rolled = runStepper(rolling);
    const found = lossMap(rolling, rolled, [0, rolled.rowCount - 1]);
    expect(found.map(({ account }) => account)).toEqual(['rolling-resistance']);
    const wheel = bodyOf(rolled, 'wheel')!;
    const [a, b] = [bodyAtRow(rolled, wheel, 0), bodyAtRow(rolled, wheel, rolled.rowCount - 1)];
    expect(found[0].joules).toBeCloseTo((normal * 0.005 * Math.hypot(b.x - a.x, b.y - a.y)) / 0.1, 1);
  });

  it('is as deep as the friction force: joules for each metre are newtons', () => {
    const inner = bands[0].places.slice(3, -3);
    expect(inner.length).toBeGreaterThan(10);
    for (const { density } of inner) expect(density).toBeCloseTo(friction * normal, 1);
  });

  it('goes with the span: half of it has what was lost until then', () => {
    const middle = Math.floor(last / 2);
    const [first] = lossMap(mechanism, run, [0, middle]);
    const [second] = lossMap(mechanism, run, [middle, last]);
    expect(first.joules + second.joules).toBeCloseTo(bands[0].joules, 6);
    expect(first.joules).toBeLessThan(second.joules);
  });

  it('lies on the solid side, below the ramp, with its label beyond', () => {
    const { perPixel } = lossScale(bands);
    const [cover] = lossBand(bands[0], 'friction', 100, perPixel);
    expect(cover).toMatchObject({ kind: 'line', fill: { tone: 'paper' } });
    const { at } = bandLabel(bands[0], 100, perPixel);
    const middle = bands[0].places[Math.floor(bands[0].places.length / 2)];
    expect(at[1]).toBeGreaterThan(-middle.at[1] * 100);
  });
});

describe('the trail', () => {
  it('has a mark at each interval and figures that don’t print over each other', () => {
    const operations = trail(run, spec, 100, [0, timeOfRow(run, last)]);
    const marks = operations.find(({ kind }) => kind === 'segments');
    const interval = trailInterval(timeOfRow(run, last));
    expect(interval).toBe(0.05);
    if (marks?.kind !== 'segments') throw new Error('a trail has marks');
    expect(marks.ends.length / 4).toBe(Math.round(1 / interval) + 1);
    const places = operations.flatMap((each) => (each.kind === 'text' ? [each.at] : []));
    expect(places.length).toBeGreaterThan(2);
    places.slice(1).forEach(([x, y], i) => expect(Math.hypot(x - places[i][0], y - places[i][1])).toBeGreaterThan(30));
  });
});

describe('the energy strip', () => {
  const strip = energyStrip(run, ['block'], 200);
  const layer = (kind: string) => strip.layers.find((each) => each.kind === kind)!;

  it('stands at one height for a body that only loses to friction: nothing comes in', () => {
    const totals = Array.from(strip.times, (_, i) => strip.layers.reduce((sum, { values }) => sum + values[i], 0));
    for (const total of totals) expect(total / strip.top).toBeCloseTo(1, 3);
  });

  it('begins with height alone and ends with height nil', () => {
    const end = strip.times.length - 1;
    expect(layer('height').values[0]).toBeCloseTo(strip.top, 6);
    expect(layer('height').values[end]).toBeCloseTo(0, 9);
    expect(layer('motion').values[0]).toBe(0);
    expect(layer('loss').values[end]).toBeCloseTo(friction * normal * bodyDistance(), 2);
  });

  it('has the rows of every event among its samples, in order of time', () => {
    for (const { row } of run.events) expect(strip.rows.includes(row)).toBe(true);
    expect([...strip.times]).toEqual([...strip.times].sort((a, b) => a - b));
  });

  function bodyDistance(): number {
    const [a, b] = [bodyAtRow(run, spec, 0), bodyAtRow(run, spec, last)];
    return Math.hypot(b.x - a.x, b.y - a.y);
  }
});
