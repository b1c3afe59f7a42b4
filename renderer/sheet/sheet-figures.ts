import type { Vec } from '../../sim/core/vec.js';
import { anchorOf } from '../../sim/drawing/anchors.js';
import { balloonOperations, placeBalloons, type Balloon } from '../../sim/drawing/balloons.js';
import type { Figure } from '../../sim/drawing/figure.js';
import type { Item } from '../../sim/drawing/items.js';
import { phantomOperations } from '../../sim/drawing/kinds/body.js';
import { moved, type DrawOperation } from '../../sim/drawing/operations.js';
import { toPaper } from '../../sim/drawing/paper.js';
import { posesAt } from '../../sim/drawing/pose.js';
import type { Scene } from '../../sim/drawing/scene.js';
import { stationMarks, type StationName } from '../../sim/drawing/stations.js';
import type { Recording } from '../../sim/recording/recording.js';
import { bodyAtRow, bodyOf } from '../../sim/recording/reader.js';

/** More items than this, and joints go without balloons: the parts list has them. */
const crowded = 10;

/** A balloon for each item, placed on the sheet as drawn; on a run it goes along with its body. */
export function balloonFigures(scene: Scene, items: readonly Item[], ink: readonly Vec[], picked: string | null): Figure[] {
  const shown = items.filter(({ kind }) => kind !== 'joint' || items.length <= crowded);
  const anchors = shown.flatMap((item) => {
    const { at, onLine } = anchorOf(item, scene);
    const place = at(scene.drawn);
    return place ? [{ item, at, place, onLine, number: item.number }] : [];
  });
  const paper = ink.map((point) => toPaper(point, scene.pixels));
  const roof = (x: number, half: number) =>
    paper.reduce((high, [px, py]) => (Math.abs(px - x) <= half ? Math.min(high, py) : high), Infinity);
  const placed = placeBalloons(anchors.map(({ place, ...rest }) => ({ ...rest, at: place })), (x, half) => safeRoof(roof(x, half), paper)); // prettier-ignore
  return placed.map((balloon) => {
    const anchor = anchors.find(({ number }) => number === balloon.number);
    return {
      key: `balloon:${balloon.number}`,
      layer: 'balloons',
      live: (now) => balloonOperations(followed(balloon, anchor?.at(now), anchor?.item.kind), anchor?.item.id === picked),
    };
  });
}

function safeRoof(found: number, paper: readonly Vec[]): number {
  return Number.isFinite(found) ? found : Math.min(...paper.map(([, y]) => y));
}

/** The balloon of a body moves with it; others stay, and only their leaders follow. */
function followed(balloon: Balloon, at: Vec | null | undefined, kind: Item['kind'] | undefined): Balloon {
  if (!at) return balloon;
  const [dx, dy] = [at[0] - balloon.at[0], at[1] - balloon.at[1]];
  const center: Vec = kind === 'body' ? [balloon.center[0] + dx, balloon.center[1] + dy] : balloon.center;
  return { ...balloon, at, center };
}

/** A station as the sheet marks it. */
export interface SheetStation extends StationName {
  row: number;
  time: number;
  open: boolean;
}

/** Pennants under where a body was at each station, and its outline there in phantom line. */
export function stationFigures(
  scene: Scene,
  recording: Recording,
  stations: readonly SheetStation[],
  subject: string,
  baseLine: number,
): Figure[] {
  const spec = bodyOf(recording, subject);
  const body = scene.mechanism.bodies.find(({ id }) => id === subject);
  if (!spec || !body) return [];
  const places = stations.map((station) => {
    const { x, y } = bodyAtRow(recording, spec, station.row);
    return { ...station, at: toPaper([x, y], scene.pixels) };
  });
  const phantoms = stations
    .filter(({ open }) => open)
    .flatMap(({ time }): DrawOperation[] => {
      const pose = posesAt(scene.mechanism, recording, time).get(subject);
      return pose ? moved(phantomOperations(body, scene.pixels), toPaper(pose.at, scene.pixels), -pose.angle) : [];
    });
  return [
    { key: 'stations', layer: 'stations', on: 'ground', operations: stationMarks(places, baseLine) },
    { key: 'phantoms', layer: 'tracings', on: 'ground', operations: phantoms },
  ];
}
