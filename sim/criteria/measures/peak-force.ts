import type { RunEvent } from '../../recording/index.js';
import type { CriterionOf, MeasureKind, Measurement } from '../measurement.js';
import { peakOf, smoothRuns } from '../peak.js';
import { isSameOf, type Rows, type RunView } from '../run-view.js';
import { forceOf } from './force-series.js';

/**
 * Greatest magnitude of a force [N]: of a pair, summed over its points, normal and friction together; of a spring or
 * damper along its line; of a joint's reaction. Found between rows as `peakOf` says. Rigid impacts are impulses, which
 * have no force: they are left out, with a note; a pair that met in nothing else has no peak force.
 */
export const peakForce: MeasureKind<'peakForce'> = {
  unit: 'N',
  take: (criterion, view) => view.over(criterion, (rows) => greatest(criterion, view, rows)),
};

function greatest({ of }: CriterionOf<'peakForce'>, view: RunView, rows: Rows): Measurement {
  const source = forceOf(view.recording, of);
  const impacts = impactsOn(of, view, rows);
  if (!source) return { value: 0, note: 'the two never met.' };
  if ('none' in source) return { reason: source.none };
  const { read } = source;
  const runs = smoothRuns(view.recording, rows, (row) => Math.hypot(...read(row)));
  const { value, time, resolution } = peakOf(runs);
  if (value === 0 && impacts.length > 0 && typeof of !== 'string') {
    return { reason: 'the two met in rigid impacts only, and a rigid impact has no force' };
  }
  const left = impacts.length === 1 ? '1 rigid impact has' : `${impacts.length} rigid impacts have`;
  const note = `${left} no force, and ${impacts.length === 1 ? 'is' : 'are'} left out.`;
  return {
    value,
    resolution,
    ...(value > 0 ? { at: time } : {}),
    ...(impacts.length > 0 ? { note } : {}),
  };
}

/** Rigid impacts within a span that load a pair or a joint; a spring takes no impulse. */
function impactsOn(of: string | [string, string], view: RunView, { fromRow, toRow }: Rows): RunEvent[] {
  const { recording, mechanism } = view;
  const isRigid = (pair: [string, string]): boolean => view.contactPair(pair)?.compliant === undefined;
  const isJoint = mechanism.joints.some(({ id }) => id === of);
  return recording.events.filter((event) => {
    // An impact at the last row comes after the span.
    if (event.row < fromRow || event.row >= toRow) return false;
    if (event.kind === 'limit') return isJoint;
    if (event.kind !== 'touch' || !isRigid(event.pair)) return false;
    return isJoint || (typeof of !== 'string' && isSameOf(event.pair, of));
  });
}
