import type { Finding, Recording, RecordingLayout, RunEnd, RunEvent } from '../recording/recording.js';

/** A stretch of a run on its way: first the layout, then rows and events as they are made. */
export type RunFrame =
  | { part: 'layout'; solver: Recording['solver']; layout: RecordingLayout; step?: number; duration: number }
  | { part: 'rows'; rows: ArrayBuffer; rowCount: number; events: RunEvent[]; time: number };

/** What is known of a run once it has ended. */
export interface RunClosing {
  end: RunEnd;
  findings: Finding[];
  counters: Record<string, number>;
}

/** Takes a growing recording apart: each row and each event goes once. */
export class FrameCutter {
  private rowsSent = 0;
  private eventsSent = 0;

  /** The rows and events since the last call; null where there are none. */
  next({ rows, rowCount, layout, events }: Recording): Extract<RunFrame, { part: 'rows' }> | null {
    if (rowCount === this.rowsSent && events.length === this.eventsSent) return null;
    const fresh = rows.slice(this.rowsSent * layout.width, rowCount * layout.width).buffer;
    const frame = {
      part: 'rows',
      rows: fresh,
      rowCount: rowCount - this.rowsSent,
      events: events.slice(this.eventsSent),
      time: rowCount === 0 ? 0 : rows[(rowCount - 1) * layout.width],
    } as const;
    this.rowsSent = rowCount;
    this.eventsSent = events.length;
    return frame;
  }
}

/** Puts a run together again from its frames; `recording` is a view that stays valid while more comes. */
export class FrameJoiner {
  private rows = new Float64Array(0);
  private count = 0;
  private events: RunEvent[] = [];
  private start: Extract<RunFrame, { part: 'layout' }> | null = null;
  private closing: RunClosing = { end: 'cancelled', findings: [], counters: {} };

  get duration(): number {
    return this.start?.duration ?? 0;
  }

  add(frame: RunFrame): void {
    if (frame.part === 'layout') this.start = frame;
    else {
      const fresh = new Float64Array(frame.rows);
      this.grow(this.used + fresh.length);
      this.rows.set(fresh, this.used);
      this.count += frame.rowCount;
      this.events = [...this.events, ...frame.events];
    }
  }

  close(closing: RunClosing): void {
    this.closing = closing;
  }

  /** The run so far; null before its layout is known. */
  recording(): Recording | null {
    if (!this.start) return null;
    const { solver, layout, step } = this.start;
    return {
      solver,
      layout,
      rows: this.rows.subarray(0, this.used),
      rowCount: this.count,
      events: this.events,
      ...(step === undefined ? {} : { step }),
      ...this.closing,
    };
  }

  private get used(): number {
    return this.count * (this.start?.layout.width ?? 0);
  }

  private grow(size: number): void {
    if (size <= this.rows.length) return;
    const larger = new Float64Array(Math.max(size, this.rows.length * 2));
    larger.set(this.rows.subarray(0, this.used));
    this.rows = larger;
  }
}
