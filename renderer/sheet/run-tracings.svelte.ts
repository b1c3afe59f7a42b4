import { layers, type Figure } from '../../sim/drawing/figure.js';
import { toPaper } from '../../sim/drawing/paper.js';
import { lossScale } from '../../sim/drawing/tracings/loss-band.js';
import { lossMap, type LossBand } from '../../sim/drawing/tracings/loss-map.js';
import { trail, trailInterval } from '../../sim/drawing/tracings/trail.js';
import type { PageLine } from '../../sim/ledger/index.js';
import { bodyOf } from '../../sim/recording/reader.js';
import { accountLook } from '../account/look.js';
import { lineName } from '../account/names.js';
import { energy } from '../format/quantity.js';
import type { Workbench } from '../state/workbench.svelte.js';
import { lossFigure, type LabelledBand } from './loss-figures.js';
import type { SheetView } from './sheet-view.svelte.js';
import { stationFigures } from './sheet-figures.js';

/** Losses below this share of the turnover are no band of the loss map. */
const leastShare = 1e-3;

/** What a run lays over the drawing: stations, trail and loss map of the page that is open. */
export class RunTracings {
  private readonly bands: readonly LabelledBand[] = $derived.by(() => this.labelledBands());
  /** Loss that stands for a pixel, and a round figure with its length for the legend; null without a loss map. */
  readonly loss = $derived.by(() => (this.bands.length > 0 ? lossScale(this.bands.map(({ band }) => band)) : null));
  readonly legendPattern = $derived.by(() => this.bands[0]?.pattern ?? 'friction');
  /** Time between two marks of the trail [s]. */
  readonly interval = $derived.by(() => (this.sheet.ended ? trailInterval(this.bench.playback.end) : null));
  private readonly lossTracing = $derived.by(() => {
    const { scene } = this.sheet;
    return scene && this.loss ? lossFigure(this.bands, scene.pixels, this.loss.perPixel) : null;
  });
  readonly figures: readonly Figure[] = $derived.by(() => this.draw());

  constructor(
    private readonly bench: Workbench,
    private readonly sheet: SheetView,
  ) {}

  private labelledBands(): LabelledBand[] {
    const { mechanism } = this.bench.drawing;
    const { page, ledger } = this.bench.account;
    const { ended, recording } = this.sheet;
    if (!mechanism || !ended || !recording || !page || !this.bench.view.shown.lossMap) return [];
    const least = leastShare * Math.max(ledger?.turnover ?? 0, Number.MIN_VALUE);
    return lossMap(mechanism, ended, [page.from.row, page.to.row])
      .filter(({ joules }) => joules > least)
      .map((band) => this.labelled(band));
  }

  /** A band with the name and, where it is the same, the figure that the account has for it. */
  private labelled(band: LossBand): LabelledBand {
    const { drawing, account } = this.bench;
    const { printed, picked } = account;
    const { account: cause, pair, joules } = band;
    const part = band.name === undefined ? {} : { on: band.track, segment: band.segment };
    const name = drawing.mechanism ? lineName({ account: cause, of: pair, ...part }, drawing.items, drawing.mechanism) : ''; // prettier-ignore
    const isOurs = (line: PageLine) => line.account === cause && [line.of].flat().join() === pair.join();
    const lines = [...(printed?.paidOut ?? []), ...(printed?.received ?? [])].filter(isOurs);
    const line = lines.find(({ segment }) => segment === band.segment) ?? (lines.length === 1 ? lines[0] : undefined);
    // What a belt gives a body is not what is lost between them, and a line may hold more segments than this one.
    const isSame = line !== undefined && Math.abs(line.amount - joules) <= 0.005 * joules;
    return {
      band,
      pattern: accountLook(this.sheet.ended, cause, pair),
      label: name.replace(/^Friction /, ''),
      figure: isSame && printed ? `${line.printed} ${printed.scale.unit}` : energyText(joules, printed?.scale),
      picked: picked !== null && line === picked,
    };
  }

  private draw(): Figure[] {
    const { bench } = this;
    const { account, view, subject } = bench;
    const { scene, ended, recording } = this.sheet;
    if (!scene || !ended || !recording || !account.page || subject === null) return [];
    const { from, to } = account.page;
    const stations = account.stations.map(({ id, row, time }) => {
      return { mark: account.mark(id), word: account.word(id), row, time, open: id === from.id || id === to.id };
    });
    const figures = stationFigures(scene, ended, stations, subject, this.baseLine(scene.pixels));
    const spec = bodyOf(ended, subject);
    if (view.shown.trail && spec) {
      const operations = trail(ended, spec, scene.pixels, [from.time, to.time]);
      figures.push({ key: 'trail', layer: 'tracings', on: 'ground', operations });
    }
    if (this.lossTracing) figures.push(this.lossTracing.figure);
    return figures.sort((a, b) => layers.indexOf(a.layer) - layers.indexOf(b.layer));
  }

  /** All pennants stand on one line, below the drawing and its loss map [px of paper]. */
  private baseLine(pixels: number): number {
    const lowest = Math.min(...this.sheet.ink.map(([, y]) => y));
    return Math.max(toPaper([0, lowest], pixels)[1], this.lossTracing?.bottom ?? -Infinity) + 14;
  }
}

function energyText(joules: number, scale?: { unit: string; joules: number }): string {
  const { value, unit } = energy(joules, scale);
  return `${value} ${unit}`;
}
