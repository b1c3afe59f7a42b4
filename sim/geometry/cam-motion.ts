import type { CamSegment, CamShape } from '../mechanism/kinds/body.js';
import { motionLaw } from './cam-laws.js';
import { naturalSecondDerivatives, spanCoefficients } from './natural-spline.js';

/** Follower displacement s [m] (or [rad], swinging) and its derivatives by the cam's turn θ [rad]. */
export interface CamMotion {
  s: number;
  ds: number;
  dds: number;
}

/** The follower's motion at a turn `angle` [rad] of the cam from drawn, in its working sense; any number of turns. */
export function camMotion(cam: CamShape, angle: number): CamMotion {
  const full = 2 * Math.PI;
  let left = angle - Math.floor(angle / full) * full;
  let s = 0;
  for (const segment of cam.segments) {
    if (left <= segment.over) return within(segment, left, s);
    left -= segment.over;
    s += segment.lift;
  }
  return { s, ds: 0, dds: 0 };
}

function within(segment: CamSegment, at: number, from: number): CamMotion {
  if (segment.law === 'dwell') return { s: from, ds: 0, dds: 0 };
  if (segment.law === 'table') return offset(tableMotion(segment.table ?? [], at), from);
  const { lift, over } = segment;
  const m = motionLaw(segment.law, at / over);
  return offset(
    { s: lift * m.displacement, ds: (lift * m.velocity) / over, dds: (lift * m.acceleration) / over ** 2 },
    from,
  );
}

const offset = (motion: CamMotion, from: number): CamMotion => ({ ...motion, s: from + motion.s });

/** A natural cubic spline through [angle, displacement] pairs, both counted from the segment's start. */
function tableMotion(table: readonly (readonly [number, number])[], at: number): CamMotion {
  const h = table.slice(1).map((row, i) => row[0] - table[i][0]);
  const m = naturalSecondDerivatives(
    table.map((row) => row[1]),
    h,
  );
  let i = 0;
  while (i < h.length - 1 && at > table[i + 1][0]) i += 1;
  const v = (at - table[i][0]) / h[i];
  const [a, b, c] = spanCoefficients(table[i][1], table[i + 1][1], m[i], m[i + 1], h[i]);
  return {
    s: table[i][1] + v * (a + v * (b + v * c)),
    ds: (a + v * (2 * b + 3 * v * c)) / h[i],
    dds: (2 * b + 6 * v * c) / h[i] ** 2,
  };
}
