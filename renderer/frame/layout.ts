import type { FrameGeometry } from './geometry.js';

/** Sizes of the fields of the sheet [px]. */
export interface Layout {
  key: number;
  title: number;
  toolbar: number;
  /** Height of the recorder's paper on the run's sheet. */
  paper: number;
  note: number;
  ruler: number;
}

/** The title column stays; the recorder takes at most a third of the height; the sheet takes the rest. */
export function layoutOf({ compact }: FrameGeometry, height: number): Layout {
  const toolbar = compact ? 30 : 34;
  return {
    key: compact ? 24 : 150,
    title: compact ? 372 : 420,
    toolbar,
    paper: Math.round(Math.max(150, Math.min(0.378 * height - 103, height / 3 - toolbar))),
    note: compact ? 24 : 27,
    ruler: 19,
  };
}
