import type { Recording } from './recording.js';

/** A recording on its way to another thread: everything but the rows is plain data, and the rows are one buffer. */
export interface PackedRecording extends Omit<Recording, 'rows'> {
  rows: ArrayBuffer;
}

/**
 * Pack a recording for `postMessage(packed, transfer)`. The rows are copied once into a buffer of their own, exactly as
 * long as they are, so the sender keeps its recording and may go on with the run.
 */
export function packRecording(recording: Recording): { packed: PackedRecording; transfer: ArrayBuffer[] } {
  const rows = recording.rows.slice(0, recording.rowCount * recording.layout.width).buffer;
  return { packed: { ...recording, rows }, transfer: [rows] };
}

/** Take a recording out of its packing, without copying. */
export function unpackRecording(packed: PackedRecording): Recording {
  return { ...packed, rows: new Float64Array(packed.rows) };
}
