import type { LayoutRequest } from '../../../sim/recording/index.js';
import { buildLayout, RecordingWriter } from '../../../sim/recording/index.js';

/** A short way to write a run by hand in tests: each row is its time and the columns that are not zero. */
export function startRun(request: LayoutRequest): {
  writer: RecordingWriter;
  row: (time: number, set?: Cells) => number;
} {
  const writer = new RecordingWriter({ solver: 'stepper', layout: buildLayout(request) });
  const row = (time: number, cells: Cells = []): number => {
    const added = writer.addRow(time);
    for (const [column, value] of cells) writer.buffer[writer.offset(added) + column] = value;
    return added;
  };
  return { writer, row };
}

export type Cells = readonly (readonly [column: number, value: number])[];
