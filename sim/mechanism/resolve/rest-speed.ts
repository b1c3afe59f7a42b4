import { norm } from '../../core/vec.js';
import type { Body } from '../kinds/body.js';
import type { Track } from '../kinds/track.js';
import { formatQuantity } from '../units/format.js';

const FRACTION = 1e-3;

export interface RestSpeed {
  /** [m/s] */
  value: number;
  /** As it would be typed. */
  text: string;
  why: string;
}

/**
 * Default of a pair's rest speed [m/s]: 1e-3 of √(g · extent); without gravity, 1e-3 of the greatest speed at the start
 * of any body or belt; where nothing moves either, 1e-3 of the extent in a second.
 */
export function restSpeedOf(
  gravity: number,
  extent: number,
  bodies: readonly Body[],
  tracks: readonly Track[],
): RestSpeed {
  const speeds = [...bodies.map((body) => norm(body.velocity)), ...tracks.map(beltSpeed)];
  const starting = speeds.reduce((most, speed) => Math.max(most, speed), 0);
  const [speed, of] =
    gravity > 0
      ? [Math.sqrt(gravity * extent), '√(g × extent)']
      : starting > 0
        ? [starting, 'the greatest starting speed']
        : [extent, 'the extent in a second'];
  const value = FRACTION * speed;
  return { value, text: formatQuantity(value, 'speed'), why: `1e-3 of ${of}, ${formatQuantity(speed, 'speed')}` };
}

const beltSpeed = ({ surfaceSpeed }: Track): number =>
  typeof surfaceSpeed === 'number' ? Math.abs(surfaceSpeed) : Math.abs(surfaceSpeed[0][1]);
