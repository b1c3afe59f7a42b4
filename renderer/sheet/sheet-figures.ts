import type { Vec } from '../../sim/core/vec.js';
import { anchorOf, type AnchorOf } from '../../sim/drawing/anchors.js';
import { apart, balloonOperations, placeBalloons, type Balloon } from '../../sim/drawing/balloons.js';
import type { Figure } from '../../sim/drawing/figure.js';
import type { Item } from '../../sim/drawing/items.js';
import { phantomOperations } from '../../sim/drawing/kinds/body.js';
import { moved, type DrawOperation } from '../../sim/drawing/operations.js';
import { boxAround, toPaper } from '../../sim/drawing/paper.js';
import { posesAt } from '../../sim/drawing/pose.js';
import type { Scene } from '../../sim/drawing/scene.js';
import { stationMarks, type StationName } from '../../sim/drawing/stations.js';
import type { Recording } from '../../sim/recording/recording.js';
import { bodyAtRow, bodyOf } from '../../sim/recording/reader.js';

/** More items than this, and joints go without balloons: the parts list has them. */
const crowded = 10;
/** More than this, and balloons would hide the drawing. */
const full = 30;

/** A placed balloon and what it belongs to. */
export interface ItemBalloon {
  item: Item;
  balloon: Balloon;
  anchor: AnchorOf;
}

/** A balloon for each item, placed on the sheet as drawn. */
export function placeItemBalloons(scene: Scene, items: readonly Item[], ink: readonly Vec[]): ItemBalloon[] {
  const shown = items.filter(({ kind }) => kind !== 'joint' || items.length <= crowded);
  if (shown.length > full) return [];
  const anchors = shown.flatMap((item) => {
    const { at: anchor, onLine } = anchorOf(item, scene);
    const at = anchor(scene.drawn);
    return at ? [{ item, anchor, number: item.number, at, onLine }] : [];
  });
  const paper = ink.map((point) => toPaper(point, scene.pixels));
  const around = (left: number, right: number) =>
    boxAround(paper.filter(([x]) => x >= left && x <= right)) ?? boxAround(paper) ?? { left, right, low: 0, high: 0 };
  const placed = placeBalloons(anchors, around);
  return anchors.flatMap(({ item, anchor, number }) => {
    const balloon = placed.find((each) => each.number === number);
    return balloon ? [{ item, anchor, balloon }] : [];
  });
}

/** The balloons as figures; on a run they go along with their bodies. */
export function balloonFigures(balloons: readonly ItemBalloon[], picked: string | null): Figure[] {
  // Those that stand still come first: it is the moving ones that give way.
  const order = [...balloons].sort((a, b) => Number(a.item.kind === 'body') - Number(b.item.kind === 'body'));
  const live: Extract<Figure, { live: unknown }>['live'] = (now) => {
    const placed = apart(order.map(({ item, balloon, anchor }) => followed(balloon, anchor(now), item.kind)));
    return placed.flatMap((balloon, i) => balloonOperations(balloon, order[i].item.id === picked));
  };
  return [{ key: 'balloons', layer: 'balloons', live }];
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
