import 'pixi.js/unsafe-eval';
import { autoDetectRenderer, CanvasTextMetrics, Container, Graphics, Text, TextStyle, type Renderer } from 'pixi.js';
import { layers, type FigureLayer } from '../../sim/drawing/figure.js';
import type { DrawOperation, TextOperation } from '../../sim/drawing/operations.js';
import type { Colours } from '../theme/apply.js';
import { fillColour } from './colour.js';
import { families, type RigidFigure, type SheetExecutor, type Viewport } from './executor.js';

/** Executes draw operations with Pixi on WebGL. */
export class PixiExecutor implements SheetExecutor {
  readonly kind = 'webgl';
  private readonly stage = new Container();
  private readonly paper = new Container();
  private readonly layers = new Map<FigureLayer, { rigid: Container; live: Container }>();
  private readonly parts = new Map<string, Container[]>();
  private readonly live = new Map<string, Container>();
  private colours: Colours | null = null;
  private ratio = 1;

  private constructor(private readonly renderer: Renderer) {
    this.stage.addChild(this.paper);
    for (const layer of layers) {
      const pair = { rigid: new Container(), live: new Container() };
      this.paper.addChild(pair.rigid, pair.live);
      this.layers.set(layer, pair);
    }
  }

  /** @throws where there is no WebGL */
  static async create(): Promise<PixiExecutor> {
    const canvas = document.createElement('canvas');
    const renderer = await autoDetectRenderer({
      canvas,
      preference: ['webgl'],
      width: 1,
      height: 1,
      antialias: true,
      backgroundAlpha: 0,
      autoDensity: true,
      resolution: window.devicePixelRatio,
    });
    return new PixiExecutor(renderer);
  }

  get canvas(): HTMLCanvasElement {
    return this.renderer.canvas;
  }

  setViewport({ width, height, originX, originY, ratio }: Viewport): void {
    this.ratio = ratio;
    this.renderer.resize(width, height, ratio);
    this.paper.position.set(originX, originY);
  }

  setColours(colours: Colours): void {
    this.colours = colours;
  }

  setFigures(figures: readonly RigidFigure[]): void {
    this.parts.clear();
    for (const { rigid } of this.layers.values())
      for (const child of rigid.removeChildren()) child.destroy({ children: true });
    for (const { layer, on, operations } of figures) {
      const container = new Container();
      this.draw(container, operations);
      this.layers.get(layer)?.rigid.addChild(container);
      this.parts.set(on, [...(this.parts.get(on) ?? []), container]);
    }
  }

  setLive(key: string, layer: FigureLayer, operations: readonly DrawOperation[]): void {
    const known = this.live.get(key);
    if (operations.length === 0) {
      known?.destroy({ children: true });
      this.live.delete(key);
      return;
    }
    const container = known ?? new Container();
    if (!known) {
      this.live.set(key, container);
      this.layers.get(layer)?.live.addChild(container);
    }
    this.draw(container, operations);
  }

  pose(part: string, x: number, y: number, turn: number): void {
    for (const container of this.parts.get(part) ?? []) {
      container.position.set(x, y);
      container.rotation = turn;
    }
  }

  render(): void {
    this.renderer.render(this.stage);
  }

  destroy(): void {
    this.stage.destroy({ children: true });
    this.renderer.destroy();
    this.canvas.remove();
  }

  /** Puts operations into a container: shapes in one graphics object, texts above it; both are kept for the next time. */
  private draw(container: Container, operations: readonly DrawOperation[]): void {
    const { colours } = this;
    if (!colours) return;
    const kept = container.children[0];
    const graphics = kept instanceof Graphics ? kept.clear() : new Graphics();
    if (!kept) container.addChild(graphics);
    let used = 1;
    for (const each of operations)
      if (each.kind === 'text') this.write(container, used++, graphics, each, colours);
      else shape(graphics, each, colours);
    while (container.children.length > used) container.children[used].destroy();
  }

  /** Puts a text at its place among a container's children; one that says the same there already is only moved. */
  private write(container: Container, index: number, graphics: Graphics, each: TextOperation, colours: Colours): void {
    const label = [each.text, each.size, each.weight, each.face, colours[each.tone], this.ratio].join('|');
    let text = container.children.at(index);
    if (text?.label !== label) {
      text?.destroy();
      text = new Text({ text: each.text, style: styleOf(each, colours), resolution: this.ratio, label });
      (text as Text).anchor.set(...each.anchor);
      container.addChildAt(text, index);
    }
    if (each.ground) ground(graphics, each, colours);
    // Whole pixels keep upright text crisp; the origin of the paper is at one too.
    const snap = (value: number, size: number, anchor: number) =>
      each.angle ? value : Math.round((value - size * anchor) * this.ratio) / this.ratio + size * anchor;
    text.position.set(snap(each.at[0], text.width, each.anchor[0]), snap(each.at[1], text.height, each.anchor[1]));
    text.rotation = each.angle ?? 0;
  }
}

function styleOf(each: TextOperation, colours: Colours): TextStyle {
  return new TextStyle({
    fontFamily: families[each.face ?? 'text'],
    fontSize: each.size,
    fontStyle: each.face === 'symbol' ? 'italic' : 'normal',
    fontWeight: `${each.weight ?? 400}`,
    fill: colours[each.tone],
  });
}

function ground(graphics: Graphics, each: TextOperation, colours: Colours): void {
  const { width } = CanvasTextMetrics.measureText(each.text, styleOf(each, colours));
  const height = each.size * 0.7;
  const [c, s] = [Math.cos(each.angle ?? 0), Math.sin(each.angle ?? 0)];
  const [left, top] = [-width * each.anchor[0] - 3, -height * each.anchor[1] - 3];
  const corners = [
    [left, top],
    [left + width + 6, top],
    [left + width + 6, top + height + 6],
    [left, top + height + 6],
  ].flatMap(([x, y]) => [each.at[0] + c * x - s * y, each.at[1] + s * x + c * y]);
  graphics.poly(corners).fill(each.ground === 'marker' ? colours.marked : colours[each.ground ?? 'paper']);
}

function shape(graphics: Graphics, each: Exclude<DrawOperation, TextOperation>, colours: Colours): void {
  if (each.kind === 'circle') graphics.circle(each.at[0], each.at[1], each.radius);
  else if (each.kind === 'segments') {
    const { ends } = each;
    if (ends.length === 0) return;
    for (let i = 0; i < ends.length; i += 4) graphics.moveTo(ends[i], ends[i + 1]).lineTo(ends[i + 2], ends[i + 3]);
  } else
    graphics.poly(
      each.points.flatMap(([x, y]) => [x, y]),
      each.closed ?? false,
    );
  if (each.kind !== 'segments' && each.fill) graphics.fill(fillColour(each.fill, colours));
  const { stroke } = each;
  if (stroke)
    graphics.stroke({ width: stroke.width, color: colours[stroke.tone], cap: stroke.cap ?? 'butt', join: 'round' });
}
