import type { Finding, Recording, RecordingLayout, RunEnd, RunEvent } from './recording.js';

const FIRST_CAPACITY = 256;

/** What is known of a run before it starts. */
export interface RecordingStart {
  solver: Recording['solver'];
  layout: RecordingLayout;
  /** Step used [s], for a solver that keeps one. */
  step?: number;
}

/**
 * Records a run as it is made. A solver adds a row and fills it in place:
 *
 *     const row = writer.addRow(time);
 *     writer.buffer[writer.offset(row) + column] = value;
 *
 * `buffer` changes when it grows, so take it after `addRow`. A new row is all zeros but for its time. How many of the
 * solver's steps become rows is the solver's choice; the writer only refuses to go back in time.
 */
export class RecordingWriter {
  layout: RecordingLayout;
  private readonly solver: Recording['solver'];
  private readonly step: number | undefined;
  private rows: Float64Array;
  private count = 0;
  private readonly events: RunEvent[] = [];
  private readonly findings: Finding[] = [];
  private counters: Record<string, number> = {};
  private ended: RunEnd | null = null;

  constructor({ solver, layout, step }: RecordingStart) {
    this.solver = solver;
    this.layout = layout;
    this.step = step;
    this.rows = new Float64Array(FIRST_CAPACITY * layout.width);
  }

  get buffer(): Float64Array {
    return this.rows;
  }

  get rowCount(): number {
    return this.count;
  }

  /** Where a row starts in `buffer`. */
  offset(row: number): number {
    return row * this.layout.width;
  }

  /** Time of the last row [s]; −Infinity before the first. */
  get lastTime(): number {
    return this.count === 0 ? -Infinity : this.rows[this.offset(this.count - 1)];
  }

  /** Add a row at a time [s], not before the last one, and return its number. */
  addRow(time: number): number {
    if (!(time >= this.lastTime)) throw new RangeError(`a row at ${time} s cannot follow one at ${this.lastTime} s`);
    const row = this.count;
    if (this.offset(row + 1) > this.rows.length) this.grow();
    this.count += 1;
    this.rows[this.offset(row)] = time;
    return row;
  }

  /**
   * Take a layout that adds columns to the present one (`extendLayout`); they read 0 in the rows that are there. Views
   * taken before keep their own rows and layout.
   */
  widen(layout: RecordingLayout): void {
    const before = this.layout.width;
    this.layout = layout;
    if (layout.width === before) return;
    const wider = new Float64Array((this.rows.length / before) * layout.width);
    for (let row = 0; row < this.count; row += 1) {
      wider.set(this.rows.subarray(row * before, (row + 1) * before), row * layout.width);
    }
    this.rows = wider;
  }

  /** Record something that happened, at a row that is already there. */
  event(event: RunEvent): void {
    if (!(event.row >= 0 && event.row < this.count))
      throw new RangeError(`an event at row ${event.row} has no such row`);
    this.events.push(event);
  }

  finding(finding: Finding): void {
    this.findings.push(finding);
  }

  /** Close the run: how it ended and what it took. */
  finish(end: RunEnd, counters: Record<string, number> = {}): Recording {
    this.ended = end;
    this.counters = { ...counters };
    return this.view();
  }

  /**
   * The run so far, without copying its rows. Rows that are there do not change afterwards, so a view stays valid while
   * the run goes on. Until `finish`, its end reads 'cancelled': that is what it would be, were it stopped here.
   */
  view(): Recording {
    return {
      solver: this.solver,
      layout: this.layout,
      rows: this.rows.subarray(0, this.offset(this.count)),
      rowCount: this.count,
      events: this.events.slice(),
      findings: this.findings.slice(),
      end: this.ended ?? 'cancelled',
      ...(this.step === undefined ? {} : { step: this.step }),
      counters: this.counters,
    };
  }

  private grow(): void {
    const larger = new Float64Array(this.rows.length * 2);
    larger.set(this.rows);
    this.rows = larger;
  }
}
