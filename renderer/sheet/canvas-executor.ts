import { layers, type FigureLayer } from '../../sim/drawing/figure.js';
import type { DrawOperation, TextOperation } from '../../sim/drawing/operations.js';
import type { Colours } from '../theme/apply.js';
import { fillColour } from './colour.js';
import { families, type RigidFigure, type SheetExecutor, type Viewport } from './executor.js';

interface Pose {
  x: number;
  y: number;
  turn: number;
}
const still: Pose = { x: 0, y: 0, turn: 0 };

/** Executes draw operations on a 2D canvas: needs no graphics processor and no WebGL. */
export class CanvasExecutor implements SheetExecutor {
  readonly kind = 'canvas';
  readonly canvas = document.createElement('canvas');
  private readonly context: CanvasRenderingContext2D;
  private viewport: Viewport = { width: 1, height: 1, originX: 0, originY: 0, ratio: 1 };
  private colours: Colours | null = null;
  private figures: readonly RigidFigure[] = [];
  private readonly live = new Map<string, { layer: FigureLayer; operations: readonly DrawOperation[] }>();
  private readonly poses = new Map<string, Pose>();

  constructor() {
    const context = this.canvas.getContext('2d');
    if (!context) throw new Error('This browser has no 2D canvas.');
    this.context = context;
  }

  setViewport(viewport: Viewport): void {
    this.viewport = viewport;
    this.canvas.width = Math.round(viewport.width * viewport.ratio);
    this.canvas.height = Math.round(viewport.height * viewport.ratio);
    this.canvas.style.width = `${viewport.width}px`;
    this.canvas.style.height = `${viewport.height}px`;
  }

  setColours(colours: Colours): void {
    this.colours = colours;
  }

  setFigures(figures: readonly RigidFigure[]): void {
    this.figures = figures;
  }

  setLive(key: string, layer: FigureLayer, operations: readonly DrawOperation[]): void {
    if (operations.length === 0) this.live.delete(key);
    else this.live.set(key, { layer, operations });
  }

  pose(part: string, x: number, y: number, turn: number): void {
    this.poses.set(part, { x, y, turn });
  }

  render(): void {
    const { context, colours } = this;
    if (!colours) return;
    const { ratio, originX, originY } = this.viewport;
    context.setTransform(1, 0, 0, 1, 0, 0);
    context.clearRect(0, 0, this.canvas.width, this.canvas.height);
    for (const layer of layers) {
      for (const figure of this.figures) {
        if (figure.layer !== layer) continue;
        const { x, y, turn } = this.poses.get(figure.on) ?? still;
        const [c, s] = [Math.cos(turn) * ratio, Math.sin(turn) * ratio];
        context.setTransform(c, s, -s, c, (originX + x) * ratio, (originY + y) * ratio);
        for (const each of figure.operations) execute(context, each, colours);
      }
      context.setTransform(ratio, 0, 0, ratio, originX * ratio, originY * ratio);
      for (const { layer: at, operations } of this.live.values())
        if (at === layer) for (const each of operations) execute(context, each, colours);
    }
  }

  destroy(): void {
    this.canvas.remove();
  }
}

function execute(context: CanvasRenderingContext2D, each: DrawOperation, colours: Colours): void {
  if (each.kind === 'text') return write(context, each, colours);
  context.beginPath();
  trace(context, each);
  if (each.kind !== 'segments' && each.fill) {
    context.fillStyle = fillColour(each.fill, colours);
    context.fill();
  }
  if (each.stroke) {
    context.strokeStyle = colours[each.stroke.tone];
    context.lineWidth = each.stroke.width;
    context.lineCap = each.stroke.cap ?? 'butt';
    context.lineJoin = 'round';
    context.stroke();
  }
}

function trace(context: CanvasRenderingContext2D, each: Exclude<DrawOperation, TextOperation>): void {
  if (each.kind === 'circle') context.arc(each.at[0], each.at[1], each.radius, 0, 2 * Math.PI);
  else if (each.kind === 'segments') {
    const { ends } = each;
    for (let i = 0; i < ends.length; i += 4) {
      context.moveTo(ends[i], ends[i + 1]);
      context.lineTo(ends[i + 2], ends[i + 3]);
    }
  } else {
    each.points.forEach(([x, y], i) => (i === 0 ? context.moveTo(x, y) : context.lineTo(x, y)));
    if (each.closed) context.closePath();
  }
}

function write(context: CanvasRenderingContext2D, each: TextOperation, colours: Colours): void {
  context.save();
  context.translate(each.at[0], each.at[1]);
  if (each.angle) context.rotate(each.angle);
  const style = each.face === 'symbol' ? 'italic ' : '';
  context.font = `${style}${each.weight ?? 400} ${each.size}px ${families[each.face ?? 'text']}`;
  context.textAlign = 'left';
  context.textBaseline = 'alphabetic';
  const width = context.measureText(each.text).width;
  const height = each.size * 0.7;
  const [x, y] = [-width * each.anchor[0], height - height * each.anchor[1]];
  if (each.ground) {
    context.fillStyle = each.ground === 'marker' ? colours.marked : colours[each.ground];
    context.fillRect(x - 3, y - height - 3, width + 6, height + 6);
  }
  context.fillStyle = colours[each.tone];
  context.fillText(each.text, x, y);
  context.restore();
}
