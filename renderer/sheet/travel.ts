import type { BodySpec, Recording } from '../../sim/recording/recording.js';
import { valueAt } from '../../sim/recording/reader.js';

/** Path length of a body's mass centre from the start to each row, and its lowest height in the run [m]. */
export interface Travel {
  lengths: Float64Array;
  lowest: number;
}

export function travelOf(recording: Recording, { columns }: BodySpec): Travel {
  const lengths = new Float64Array(recording.rowCount);
  let lowest = Infinity;
  for (let row = 0; row < recording.rowCount; row++) {
    const [x, y] = [valueAt(recording, row, columns.x), valueAt(recording, row, columns.y)];
    lowest = Math.min(lowest, y);
    if (row === 0) continue;
    const [px, py] = [valueAt(recording, row - 1, columns.x), valueAt(recording, row - 1, columns.y)];
    lengths[row] = lengths[row - 1] + Math.hypot(x - px, y - py);
  }
  return { lengths, lowest };
}
