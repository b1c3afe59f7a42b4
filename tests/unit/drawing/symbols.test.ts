import { describe, expect, it } from 'vitest';
import { anchorOf } from '../../../sim/drawing/anchors.js';
import { layers, type Figure } from '../../../sim/drawing/figure.js';
import { itemNumbers, numberItems } from '../../../sim/drawing/items.js';
import { shapeOutline } from '../../../sim/drawing/kinds/body.js';
import { linkLine } from '../../../sim/drawing/kinds/link.js';
import { zigzag } from '../../../sim/drawing/kinds/spring.js';
import { trackOperations } from '../../../sim/drawing/kinds/track.js';
import { moved, type DrawOperation } from '../../../sim/drawing/operations.js';
import { pickItem } from '../../../sim/drawing/pick.js';
import { drawnPoses } from '../../../sim/drawing/pose.js';
import { buildScene, inkPoints } from '../../../sim/drawing/scene.js';
import type { Shape } from '../../../sim/mechanism/kinds/body.js';
import { everyKind } from './every-kind.js';

const pixels = 378;
const scene = buildScene(everyKind, pixels);
const of = (item: string) => scene.figures.filter((figure) => figure.item === item);
const drawn = drawnPoses(everyKind);
const operationsOf = (figure: Figure): readonly DrawOperation[] =>
  'on' in figure ? figure.operations : figure.live(drawn);

function numbersIn(each: DrawOperation): readonly number[] {
  if (each.kind === 'segments') return each.ends;
  if (each.kind === 'line') return each.points.flat();
  return each.kind === 'circle' ? [...each.at, each.radius] : each.at;
}

describe('symbols', () => {
  it('there is one for every element of every kind, on a known layer, with finite coordinates', () => {
    const elements = [
      everyKind.bodies,
      everyKind.tracks,
      everyKind.springs,
      everyKind.dampers,
      everyKind.joints,
    ].flat();
    for (const { id } of elements) expect(of(id).length, id).toBeGreaterThan(0);
    for (const figure of scene.figures) {
      expect(layers).toContain(figure.layer);
      const operations = operationsOf(figure);
      expect(operations.length, figure.key).toBeGreaterThan(0);
      for (const each of operations) expect(numbersIn(each).every(Number.isFinite), figure.key).toBe(true);
    }
    expect(new Set(scene.figures.map(({ key }) => key)).size).toBe(scene.figures.length);
  });

  it('a body has a wide outline of its size on paper, and the quartered mark at its mass centre', () => {
    const [figure] = of('box');
    const [outline, ground, ...quarters] = operationsOf(figure);
    if (outline.kind !== 'line' || ground.kind !== 'circle')
      throw new Error('a box begins with its outline and its mark');
    expect(outline.stroke?.width).toBe(1.9);
    const xs = outline.points.map(([x]) => x);
    expect(Math.max(...xs) - Math.min(...xs)).toBeCloseTo(0.24 * pixels, 9);
    expect(ground.at).toEqual([0, -0]);
    expect(quarters.filter((each) => each.kind === 'line' && each.fill?.tone === 'ink')).toHaveLength(2);
  });

  it('a track is hatched on its solid side only, and one that is free on both not at all', () => {
    const path = [[0, 0], [50, 0]] as const; // prettier-ignore
    const [hatch] = trackOperations(path, 'left');
    if (hatch.kind !== 'segments') throw new Error('a track begins with its hatch');
    expect(hatch.ends.filter((_, i) => i % 4 === 3).every((y) => y > 0)).toBe(true);
    expect(trackOperations(path, 'both').map(({ kind }) => kind)).toEqual(['line']);
  });

  it('a spring keeps its number of coils at any length, between its ends', () => {
    for (const length of [5, 40, 400]) {
      const [line] = zigzag(linkLine([0, 0], [length, 0]), 7, 8);
      if (line.kind !== 'line') throw new Error('a spring is a line');
      expect(line.points).toHaveLength(14 + 4);
      expect(line.points[0]).toEqual([0, 0]);
      expect(line.points[line.points.length - 1]).toEqual([length, 0]);
      expect(Math.max(...line.points.map(([, y]) => Math.abs(y)))).toBeCloseTo(8, 9);
    }
  });

  it('an outline has the area of its shape, whatever the kind', () => {
    const area = (shape: Shape) => {
      const points = shapeOutline(shape);
      return points.reduce((sum, [x, y], i) => {
        const [u, v] = points[(i + 1) % points.length];
        return sum + (x * v - u * y) / 2;
      }, 0);
    };
    expect(area({ kind: 'disc', radius: 2 })).toBeCloseTo(4 * Math.PI, 1);
    expect(area({ kind: 'box', width: 3, height: 2 })).toBeCloseTo(6, 12);
    expect(area({ kind: 'bar', length: 3, width: 2 })).toBeCloseTo(6 + Math.PI, 1);
    expect(shapeOutline({ kind: 'particle' })).toEqual([]);
  });

  it('operations are moved and turned as a whole', () => {
    const square: DrawOperation = { kind: 'line', points: [[1, 0], [0, 1]], stroke: { width: 1, tone: 'ink' } }; // prettier-ignore
    const [turned] = moved([square], [10, 20], Math.PI / 2);
    if (turned.kind !== 'line') throw new Error('a line stays a line');
    expect(turned.points[0][0]).toBeCloseTo(10, 12);
    expect(turned.points[0][1]).toBeCloseTo(21, 12);
  });
});

describe('items', () => {
  const items = numberItems(everyKind, new Map([['chute', 'Long chute']]));

  it('are numbered bodies first, and called by the document’s name or by their id read as words', () => {
    expect(items.map(({ number }) => number)).toEqual(items.map((_, i) => i + 1));
    expect(items[0]).toEqual({ number: 1, id: 'box', kind: 'body', name: 'Box' });
    expect(items.find(({ id }) => id === 'chute')?.name).toBe('Long chute');
    expect(items.find(({ id }) => id === 'gas-spring')?.name).toBe('Gas spring');
  });

  it('name contacts by their two numbers', () => {
    expect(itemNumbers(items, ['box', 'chute'])).toBe(`1/${items.find(({ id }) => id === 'chute')?.number}`);
    expect(itemNumbers(items, 'unknown')).toBe('unknown');
    expect(itemNumbers(items, null)).toBe('');
  });

  it('have each a place for the leader of their balloon', () => {
    for (const item of items) {
      if (['gear', 'rack', 'screw'].includes(item.id)) continue;
      const place = anchorOf(item, scene).at(drawn);
      expect(place?.every(Number.isFinite), item.id).toBe(true);
    }
  });

  it('are picked where they are drawn: a body before what lies under it, and nothing on the empty sheet', () => {
    const at = (x: number, y: number) => pickItem(scene, drawn, [x, y], 0.01);
    expect(at(0, 0.5)).toBe('box');
    expect(at(-0.5, 0)).toBe('chute');
    expect(at(9, 9)).toBeNull();
  });
});

describe('ink', () => {
  it('covers bodies and tracks with points close enough together to tell what is free', () => {
    const ink = inkPoints(everyKind, null);
    expect(ink.some(([x, y]) => Math.hypot(x - 0.12, y - 0.58) < 1e-9)).toBe(true);
    const onTrack = ink.filter(([, y]) => y === 0).map(([x]) => x);
    const gaps = onTrack.sort((a, b) => a - b).slice(1).map((x, i) => x - onTrack[i]); // prettier-ignore
    expect(Math.max(...gaps)).toBeLessThan(everyKind.extent / 50);
  });
});
