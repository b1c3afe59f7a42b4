import type { Vec } from '../../sim/core/vec.js';
import { layers, type Figure } from '../../sim/drawing/figure.js';
import type { DrawOperation } from '../../sim/drawing/operations.js';
import { boxAround, toPaper } from '../../sim/drawing/paper.js';
import { drawnPoses, posesAt, type Poses } from '../../sim/drawing/pose.js';
import { buildScene, inkPoints, type Scene } from '../../sim/drawing/scene.js';
import { forceArrows, forceScale, forcesOn, type BodyForce } from '../../sim/drawing/tracings/forces.js';
import { lossScale } from '../../sim/drawing/tracings/loss-band.js';
import { lossMap } from '../../sim/drawing/tracings/loss-map.js';
import { trail, trailInterval } from '../../sim/drawing/tracings/trail.js';
import type { Recording } from '../../sim/recording/recording.js';
import { bodyOf } from '../../sim/recording/reader.js';
import { accountLook } from '../account/look.js';
import { lineName } from '../account/names.js';
import { energy } from '../format/quantity.js';
import type { Layout } from '../frame/layout.js';
import type { Workbench } from '../state/workbench.svelte.js';
import type { RigidFigure } from './executor.js';
import { clearances, fitDrawing, isFree, readingsCorners, type Fit } from './fit.js';
import { lossFigure, type LabelledBand } from './loss-figures.js';
import { balloonFigures, placeItemBalloons, stationFigures, type ItemBalloon } from './sheet-figures.js';

type LiveFigure = Extract<Figure, { live: unknown }>;

/** Room around the drawing [px]: balloons above, stations and the legend below. */
const margins = {
  full: { top: 64, bottom: 92, side: 24, below: 60 },
  compact: { top: 20, bottom: 74, side: 22, below: 78 },
};
export const readingsSize = { full: { width: 336, height: 127 }, compact: { width: 324, height: 118 } };

/** What lies on the sheet's field, worked out from the drawing, the run and the page that is open. */
export class SheetView {
  readonly field = $derived.by(() => {
    const { geometry, sheet } = this.bench.view;
    const { key, title, ruler, toolbar, paper, note } = this.layout();
    const inner = { width: geometry.inner.width - 2.6, height: geometry.inner.height - 2.6 };
    const width = Math.floor(inner.width - key - title - ruler);
    const onRun = Math.floor(inner.height - toolbar - paper - note - ruler);
    return { width, height: sheet === 2 ? onRun : onRun + paper, onRun };
  });
  /** The run on this sheet; none on the drawing's own. */
  readonly recording: Recording | null = $derived(this.bench.view.sheet === 2 ? this.bench.run.recording : null);
  private readonly ended: Recording | null = $derived(
    this.bench.run.status === 'running' ? null : this.bench.run.recording,
  );
  private readonly ink: Vec[] = $derived(
    this.bench.drawing.mechanism ? inkPoints(this.bench.drawing.mechanism, this.ended) : [],
  );
  readonly fit: Fit | null = $derived.by(() => this.layDown());
  readonly scene: Scene | null = $derived(
    this.bench.drawing.mechanism && this.fit ? buildScene(this.bench.drawing.mechanism, this.fit.scale.pixels) : null,
  );
  private readonly size = $derived(this.bench.view.geometry.compact ? 'compact' : 'full');
  private readonly placed = $derived.by(() => this.placeBalloons());
  readonly readings: Vec = $derived.by(() => this.placeReadings());
  private readonly bands = $derived.by(() => this.labelledBands());
  /** Loss that stands for a pixel, and a round figure with its length for the legend; null without a loss map. */
  readonly loss = $derived(this.bands.length > 0 ? lossScale(this.bands.map(({ band }) => band)) : null);
  private readonly lossTracing = $derived(
    this.scene && this.loss ? lossFigure(this.bands, this.scene.pixels, this.loss.perPixel) : null,
  );
  private readonly lossBottom = $derived(this.lossTracing?.bottom ?? -Infinity);
  readonly legendPattern = $derived(this.bands[0]?.pattern ?? 'friction');
  /** [N] that a pixel of an arrow stands for. */
  readonly newtonsPerPixel = $derived(this.scene ? forceScale(this.scene.mechanism) : 1);
  readonly interval = $derived(this.ended ? trailInterval(this.bench.playback.end) : null);
  readonly rigid: readonly RigidFigure[] = $derived.by(() =>
    [...(this.scene?.figures ?? []), ...this.tracings()].filter((figure): figure is RigidFigure => 'on' in figure),
  );
  readonly live: readonly LiveFigure[] = $derived.by(() =>
    [...(this.scene?.figures ?? []), ...this.balloons()].filter((figure): figure is LiveFigure => 'live' in figure),
  );

  constructor(
    private readonly bench: Workbench,
    private readonly layout: () => Layout,
  ) {}

  /** Where everything is at the moment shown. */
  poses(): Poses {
    const { scene, recording } = this;
    if (!scene) return new Map();
    return recording ? posesAt(scene.mechanism, recording, this.bench.playback.time) : drawnPoses(scene.mechanism);
  }

  /** Forces on the body that the readings are of. */
  forces(): BodyForce[] {
    const { scene, recording, bench } = this;
    if (!scene || !recording || bench.subject === null) return [];
    return forcesOn(scene.mechanism, recording, bench.subject, bench.playback.time);
  }

  forceOperations(): DrawOperation[] {
    if (!this.scene || !this.bench.view.shown.forces) return [];
    return forceArrows(this.forces(), this.scene.pixels, this.newtonsPerPixel);
  }

  private layDown(): Fit | null {
    const box = boxAround(this.ink);
    if (!box) return null;
    const field = { width: this.field.width, height: this.field.onRun };
    return fitDrawing(box, this.ink, field, margins[this.size], readingsSize[this.size]);
  }

  /** A corner for the readings that the drawing is not in. */
  private placeReadings(): Vec {
    const size = readingsSize[this.size];
    const corners = readingsCorners({ width: this.field.width, height: this.field.onRun }, size);
    const { fit, ink } = this;
    if (!fit) return corners[0];
    const free = clearances.flatMap((clear) => corners.filter((corner) => isFree(corner, size, ink, fit, clear)));
    return free[0] ?? corners[0];
  }

  private labelledBands(): LabelledBand[] {
    const { mechanism, items } = this.bench.drawing;
    const { page, printed, picked } = this.bench.account;
    if (!mechanism || !this.ended || !page || !this.bench.view.shown.lossMap || !this.recording) return [];
    return lossMap(mechanism, this.ended, [page.from.row, page.to.row])
      .filter(({ joules }) => joules > 1e-3 * Math.max(this.bench.account.ledger?.turnover ?? 0, 1e-12))
      .map((band) => {
        const on = { on: band.track, segment: band.segment };
        const line = printed?.paidOut.find((each) => each.of === band.pair && each.account === 'friction' && (each.segment ?? band.segment) === band.segment);
        return {
          band,
          pattern: accountLook(this.ended, 'friction', band.pair),
          label: lineName({ account: 'friction', of: band.pair, ...(band.name ? on : {}) }, items, mechanism).replace(/^Friction /, ''),
          figure: line?.segment === band.segment && printed ? `${line.printed} ${printed.scale.unit}` : energyText(band.joules, printed?.scale),
          picked: picked !== null && line === picked,
        };
      });
  }

  private tracings(): Figure[] {
    const { scene, ended, bench } = this;
    const { account, view, subject } = bench;
    if (!scene || !ended || !this.recording || !account.page || subject === null) return [];
    const { from, to } = account.page;
    const stations = account.stations.map(({ id, row, time }) => {
      return { mark: account.mark(id), word: account.word(id), row, time, open: id === from.id || id === to.id };
    });
    const figures = stationFigures(scene, ended, stations, subject, this.baseLine());
    const spec = bodyOf(ended, subject);
    if (view.shown.trail && spec) {
      const operations = trail(ended, spec, scene.pixels, [from.time, to.time]);
      figures.push({ key: 'trail', layer: 'tracings', on: 'ground', operations });
    }
    if (this.lossTracing) figures.push(this.lossTracing.figure);
    return figures.sort((a, b) => layers.indexOf(a.layer) - layers.indexOf(b.layer));
  }

  /** All pennants stand on one line below the drawing [px of paper]. */
  private baseLine(): number {
    const lowest = Math.min(...this.ink.map(([, y]) => y));
    const drawn = toPaper([0, lowest], this.scene?.pixels ?? 1)[1];
    return Math.max(drawn, this.lossBottom) + 14;
  }

  private placeBalloons(): readonly ItemBalloon[] {
    const { drawing, view } = this.bench;
    if (!this.scene || !view.shown.balloons || view.geometry.compact) return [];
    return placeItemBalloons(this.scene, drawing.items, inkPoints(this.scene.mechanism, null));
  }

  private balloons(): Figure[] {
    const { drawing, view } = this.bench;
    return balloonFigures(this.placed, view.sheet === 1 ? (drawing.item?.id ?? null) : null);
  }
}

function energyText(joules: number, scale?: { unit: string; joules: number }): string {
  const { value, unit } = energy(joules, scale);
  return `${value} ${unit}`;
}
