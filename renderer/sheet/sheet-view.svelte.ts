import type { Vec } from '../../sim/core/vec.js';
import type { Figure } from '../../sim/drawing/figure.js';
import type { DrawOperation } from '../../sim/drawing/operations.js';
import { boxAround } from '../../sim/drawing/paper.js';
import { drawnPoses, posesAt, type Poses } from '../../sim/drawing/pose.js';
import { buildScene, inkPoints, type Scene } from '../../sim/drawing/scene.js';
import { forceArrows, forceScale, forcesOn, type BodyForce } from '../../sim/drawing/tracings/forces.js';
import type { Recording } from '../../sim/recording/recording.js';
import type { Layout } from '../frame/layout.js';
import type { Workbench } from '../state/workbench.svelte.js';
import type { RigidFigure } from './executor.js';
import { clearances, fitDrawing, isFree, readingsCorners, type Fit } from './fit.js';
import { balloonFigures, placeItemBalloons, type ItemBalloon } from './sheet-figures.js';
import { RunTracings } from './run-tracings.svelte.js';

type LiveFigure = Extract<Figure, { live: unknown }>;

const nowhere: Poses = new Map();

/** Room around the drawing [px]: balloons above, stations and the legend below. */
const margins = {
  full: { top: 64, bottom: 92, side: 24, below: 60 },
  compact: { top: 20, bottom: 74, side: 22, below: 78 },
};
export const readingsSize = { full: { width: 336, height: 127 }, compact: { width: 324, height: 118 } };

/** What lies on the sheet's field, worked out from the drawing, the run and the page that is open. */
export class SheetView {
  /** Size of the field [px], and its height beside the recorder's paper: the drawing lies in that on either sheet. */
  readonly field = $derived.by(() => {
    const { geometry, sheet } = this.bench.view;
    const { key, title, ruler, toolbar, paper, note } = this.layout();
    const inner = { width: geometry.inner.width - 2.6, height: geometry.inner.height - 2.6 };
    const onRun = Math.floor(inner.height - toolbar - paper - note - ruler);
    return { width: Math.floor(inner.width - key - title - ruler), height: sheet === 2 ? onRun : onRun + paper, onRun };
  });
  /** The run on this sheet; none on the drawing's own. */
  readonly recording: Recording | null = $derived.by(() =>
    this.bench.view.sheet === 2 ? this.bench.run.recording : null,
  );
  /** The run once it has ended, on either sheet. */
  readonly ended: Recording | null = $derived.by(() =>
    this.bench.run.status === 'running' ? null : this.bench.run.recording,
  );
  readonly ink: readonly Vec[] = $derived.by(() => {
    const { mechanism } = this.bench.drawing;
    return mechanism ? inkPoints(mechanism, this.ended) : [];
  });
  readonly fit: Fit | null = $derived.by(() => this.layDown());
  readonly readings: Vec = $derived.by(() => this.placeReadings());
  readonly scene: Scene | null = $derived.by(() => {
    const { mechanism } = this.bench.drawing;
    return mechanism && this.fit ? buildScene(mechanism, this.fit.scale.pixels) : null;
  });
  readonly tracings: RunTracings;
  /** [N] that a pixel of an arrow stands for. */
  readonly newtonsPerPixel = $derived.by(() => (this.scene ? forceScale(this.scene.mechanism) : 1));
  private readonly placed = $derived.by(() => this.placeBalloons());
  readonly rigid: readonly RigidFigure[] = $derived.by(() =>
    [...(this.scene?.figures ?? []), ...this.tracings.figures].filter(
      (figure): figure is RigidFigure => 'on' in figure,
    ),
  );
  readonly live: readonly LiveFigure[] = $derived.by(() =>
    [...(this.scene?.figures ?? []), ...this.balloons()].filter((figure): figure is LiveFigure => 'live' in figure),
  );

  constructor(
    private readonly bench: Workbench,
    private readonly layout: () => Layout,
  ) {
    this.tracings = new RunTracings(bench, this);
  }

  /** Where everything is at the moment shown. */
  poses(): Poses {
    const { scene, recording } = this;
    if (!scene) return nowhere;
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

  private get size(): 'full' | 'compact' {
    return this.bench.view.geometry.compact ? 'compact' : 'full';
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
