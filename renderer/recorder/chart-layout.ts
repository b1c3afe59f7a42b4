import { niceAtLeast } from '../../sim/drawing/paper.js';

/** Where things lie on the recorder's paper [px]. */
export interface ChartLayout {
  width: number;
  height: number;
  left: number;
  right: number;
  /** Top of the pennants. */
  flags: number;
  energy: { top: number; bottom: number };
  speed: { top: number; bottom: number };
  /** Centre lines of the feed holes. */
  holes: [upper: number, lower: number];
  /** Base line of the time scale's figures. */
  times: number;
}

/** Edge strips with the feed holes, pennants, energy, speed, time scale, from the top down. */
export function chartLayout(width: number, height: number): ChartLayout {
  const compact = height < 200;
  const flags = compact ? 14 : 16;
  const top = flags + (compact ? 21 : 26);
  const scale = height - (compact ? 29 : 33);
  const speed = Math.round((scale - top) * 0.32);
  return {
    width,
    height,
    left: 54,
    right: width - 27,
    flags,
    energy: { top, bottom: scale - speed - 9 },
    speed: { top: scale - speed, bottom: scale },
    holes: [compact ? 6 : 7, height - (compact ? 6 : 7)],
    times: scale + 13,
  };
}

/** A time axis from nil: its end, and the distance of its figures [s]. */
export interface TimeAxis {
  end: number;
  step: number;
  decimals: number;
}

/** While a run is recorded its end is open: the axis grows in round steps, and not beyond the greatest duration. */
export function timeAxis(time: number, isOpen: boolean, duration: number): TimeAxis {
  const wanted = isOpen
    ? Math.min(niceAtLeast(Math.max(time * 1.25, duration / 1000)), Math.max(duration, time))
    : time;
  const end = wanted > 0 ? wanted : 1;
  const step = niceAtLeast(end / 10);
  return { end, step, decimals: Math.max(0, Math.ceil(-Math.log10(step) - 1e-9)) };
}

export function xOf(layout: ChartLayout, axis: TimeAxis, time: number): number {
  return layout.left + ((layout.right - layout.left) * time) / axis.end;
}

export function timeAt(layout: ChartLayout, axis: TimeAxis, x: number): number {
  const share = (x - layout.left) / (layout.right - layout.left);
  return Math.min(1, Math.max(0, share)) * axis.end;
}
