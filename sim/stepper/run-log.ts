import type { Vec } from '../core/vec.js';
import type { Mechanism } from '../mechanism/model.js';
import type { StationWatch } from '../recording/station-watch.js';
import type { Pair } from './contact/pair.js';
import type { Recorder } from './recorder.js';
import type { Scene } from './scene.js';
import type { Strike } from './strike.js';

/** What a station on an impact also says, in SI. */
interface TouchData {
  approachSpeed: number;
  effectiveMass: number;
}

/** Writes down what happens in a run: rows, events and the stations they reach, findings (each kind once). */
export class RunLog {
  /** Row of the present state, where it has been recorded. */
  private rowNow = -1;
  private readonly reported = new Set<string>();

  constructor(
    private readonly mechanism: Mechanism,
    private readonly scene: Scene,
    private readonly watch: StationWatch,
    private readonly recorder: Recorder,
  ) {}

  /** Time now [s]. */
  get time(): number {
    return this.scene.time * this.scene.scale.time;
  }

  /** The state has changed since the last row. */
  moved(): void {
    this.rowNow = -1;
  }

  /** Records the present state, once. */
  record(): number {
    if (this.rowNow < 0) this.rowNow = this.recorder.row();
    return this.rowNow;
  }

  /** Stations reached now. */
  reach(ids: readonly string[]): void {
    for (const id of ids) this.station(id, this.record(), this.time);
  }

  station(station: string, row: number, time: number, touch?: TouchData): void {
    this.recorder.writer.event({ kind: 'station', time, row, station, ...(touch ? { touch } : {}) });
  }

  /** What an impact struck, at the row just before it. */
  struck(strikes: readonly Strike[], row: number): void {
    const { scale } = this.scene;
    for (const { pair, stop, x, y, approachSpeed, effectiveMass } of strikes) {
      if (pair) {
        const touch = { approachSpeed: approachSpeed * scale.speed, effectiveMass: effectiveMass * scale.mass };
        this.touch(pair, row, [x * scale.length, y * scale.length], touch);
      } else if (stop) {
        const isSlide = this.mechanism.joints.some(({ id, kind }) => id === stop.joint && kind === 'slide');
        this.recorder.writer.event({
          kind: 'limit',
          time: this.time,
          row,
          joint: stop.joint,
          approachSpeed: approachSpeed * (isSlide ? scale.speed : 1 / scale.time),
          effectiveMass: effectiveMass * (isSlide ? scale.mass : scale.inertia),
        });
      }
    }
  }

  private touch({ between }: Pair, row: number, at: Vec, touch: TouchData): void {
    this.recorder.writer.event({ kind: 'touch', time: this.time, row, pair: between, at, ...touch });
    for (const id of this.watch.happened('touch', between, this.time)) this.station(id, row, this.time, touch);
  }

  pair(kind: 'parts' | 'sticks' | 'slips', { between, reading }: Pair): void {
    const { length } = this.scene.scale;
    const row = this.record();
    const at: Vec = [reading.x * length, reading.y * length];
    this.recorder.writer.event({ kind, time: this.time, row, pair: between, at });
    this.reach(this.watch.happened(kind, between, this.time));
  }

  release(latch: string): void {
    this.recorder.writer.event({ kind: 'release', time: this.time, row: this.record(), latch });
  }

  /** A warning (or an error) of the run; the first of its kind says where. */
  warn(code: string, text: string, of: string[], severity: 'warning' | 'error' = 'warning'): void {
    if (this.reported.has(code)) return;
    this.reported.add(code);
    this.recorder.writer.finding({ severity, code, text, of, at: this.time });
  }
}
