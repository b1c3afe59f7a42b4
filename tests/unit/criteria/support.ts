import type { Criterion } from '../../../sim/mechanism/kinds/criterion.js';
import type { ContactPair } from '../../../sim/mechanism/kinds/contact.js';
import type { Mechanism } from '../../../sim/mechanism/model.js';
import type { Finding, LayoutRequest, Recording, RecordingLayout, RunEvent } from '../../../sim/recording/index.js';
import { evaluateCriteria, type CriterionResult } from '../../../sim/criteria/index.js';
import { startRun, type Cells } from '../recording/synthetic.js';
import { cratesMechanism } from '../report/crates.js';

/** A criterion without its id; a measure and its own keys. */
export type Asked = Criterion extends infer C ? (C extends Criterion ? Omit<C, 'id'> : never) : never;

/** Judges one criterion, `q`, on a run. */
export function judged(
  asked: Asked,
  recording: Recording | null,
  changes: Partial<Mechanism> = {},
): { result: CriterionResult; findings: Finding[] } {
  const criteria = [{ id: 'q', ...asked } as Criterion];
  const evaluated = evaluateCriteria({ ...cratesMechanism(), criteria, ...changes }, recording);
  return { result: evaluated.criteria[0], findings: evaluated.findings };
}

/** The value of a criterion; null where it could not be evaluated. */
export const valueOf = (asked: Asked, recording: Recording, changes: Partial<Mechanism> = {}): number | null =>
  judged(asked, recording, changes).result.value;

/** Why a criterion could not be evaluated: the text of its one finding. */
export function reasonOf(asked: Asked, recording: Recording, changes: Partial<Mechanism> = {}): string {
  const { result, findings } = judged(asked, recording, changes);
  if (result.passes !== null || result.value !== null) return `evaluated: ${result.value}`;
  return findings
    .filter(({ code, severity }) => code === 'criterion-not-evaluated' && severity === 'warning')
    .map(({ text }) => text)
    .join('|');
}

/** Writes a run: `cells` gives what each row at a time holds, by the layout's columns. */
export function runOf(
  request: LayoutRequest,
  times: readonly number[],
  cells: (time: number, layout: RecordingLayout, row: number) => Cells,
  events: readonly RunEvent[] = [],
  end: Recording['end'] = 'reachedEnd',
): Recording {
  const { writer, row } = startRun(request);
  times.forEach((time, i) => row(time, cells(time, writer.layout, i)));
  for (const event of events) writer.event(event);
  return writer.finish(end);
}

export const stationAt = (
  station: string,
  row: number,
  time: number,
  touch?: { approachSpeed: number; effectiveMass: number },
): RunEvent => ({
  kind: 'station',
  station,
  row,
  time,
  ...(touch ? { touch } : {}),
});

export const touchAt = (pair: [string, string], row: number, time: number, approachSpeed = 1): RunEvent => ({
  kind: 'touch',
  pair,
  row,
  time,
  at: [0, 0],
  approachSpeed,
  effectiveMass: 2,
});

/** A contact pair of the document, rigid unless it has a stiffness. */
export const pairOf = (between: [string, string], stiffness?: number): ContactPair => ({
  between,
  ...{ staticFriction: 0, kineticFriction: 0, restitution: 0, rollingResistance: 0, restSpeed: 0 },
  ...(stiffness === undefined ? {} : { compliant: { stiffness, damping: 0 } }),
  pointer: '/contacts/0',
});

/** Times from 0 to `end`, evenly. */
export const evenly = (count: number, end: number): number[] =>
  Array.from({ length: count + 1 }, (_, i) => (i * end) / count);
