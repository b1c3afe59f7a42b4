import type { Recording } from '../../sim/recording/recording.js';
import { rowAtOrBefore, timeOfRow } from '../../sim/recording/reader.js';

/** Seconds of the run for a second of the clock. */
export const rates = [1 / 100, 1 / 50, 1 / 20, 1 / 10, 1 / 4, 1 / 2, 1, 2, 5, 10] as const;

/** The moment shown, and how the paper is fed. */
export class Playback {
  /** [s] */
  time = $state(0);
  feeding = $state(false);
  rateIndex = $state(rates.indexOf(1));

  constructor(private readonly recording: () => Recording | null) {}

  get rate(): number {
    return rates[this.rateIndex];
  }

  /** "1:4": a second of the run takes four; "2:1": two pass in one. */
  get paper(): string {
    return this.rate < 1 ? `1:${Math.round(1 / this.rate)}` : `${this.rate}:1`;
  }

  get end(): number {
    const recording = this.recording();
    return recording && recording.rowCount > 0 ? timeOfRow(recording, recording.rowCount - 1) : 0;
  }

  moveTo(time: number): void {
    this.time = Math.min(Math.max(time, 0), this.end);
  }

  /** Starts or stops the paper; at the end it starts over. */
  toggle(): void {
    if (!this.feeding && this.time >= this.end) this.time = 0;
    this.feeding = !this.feeding && this.end > 0;
  }

  /** Advances by a stretch of the clock [s]. */
  feed(elapsed: number): void {
    if (!this.feeding) return;
    this.moveTo(this.time + elapsed * this.rate);
    if (this.time >= this.end) this.feeding = false;
  }

  /** To the recorded row before or after this moment: a tick. Of the two rows of an impact the later is shown. */
  tick(by: 1 | -1): void {
    const recording = this.recording();
    if (!recording || recording.rowCount === 0) return;
    this.feeding = false;
    let row = rowAtOrBefore(recording, this.time);
    if (by < 0 && timeOfRow(recording, row) < this.time) return this.moveTo(timeOfRow(recording, row));
    do row += by;
    while (row > 0 && row < recording.rowCount - 1 && timeOfRow(recording, row) === this.time);
    this.moveTo(timeOfRow(recording, Math.min(Math.max(row, 0), recording.rowCount - 1)));
  }

  changeRate(by: 1 | -1): void {
    this.rateIndex = Math.min(rates.length - 1, Math.max(0, this.rateIndex + by));
  }

  /** A rate at which the run takes some five seconds. */
  fitRate(): void {
    const wanted = this.end / 5;
    const fitting = rates.findLastIndex((rate) => rate <= wanted);
    this.rateIndex = Math.max(0, fitting);
  }
}
