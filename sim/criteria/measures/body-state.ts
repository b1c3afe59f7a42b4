import { bodyAtRow, bodyOf, type BodySpec, type BodyState } from '../../recording/index.js';
import type { Measurement } from '../measurement.js';
import type { RunView } from '../run-view.js';

/** A measure of one body, where the run has it. */
export function ofBody(view: RunView, id: string, take: (body: BodySpec) => Measurement): Measurement {
  const body = bodyOf(view.recording, id);
  return body ? take(body) : { reason: `the run has no body ${id}` };
}

/** A figure of a body's motion at a station. */
export function bodyAt(
  view: RunView,
  { of, at }: { of: string; at: string },
  figure: (state: BodyState) => number,
): Measurement {
  return view.at(at, ({ row }) =>
    ofBody(view, of, (body) => ({ value: figure(bodyAtRow(view.recording, body, row)) })),
  );
}
