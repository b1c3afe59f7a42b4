import type { Bounds, Criterion, Measure } from '../mechanism/kinds/criterion.js';
import type { Mechanism } from '../mechanism/model.js';
import type { Finding, Recording } from '../recording/index.js';
import { figure } from './figure.js';
import { judgeBounds } from './limits.js';
import type { MeasureKind, Measured, Measurement, Unmeasured } from './measurement.js';
import { measures } from './measures/index.js';
import type { CriteriaResult, CriterionResult } from './result.js';
import { RunView } from './run-view.js';

interface Judged {
  result: CriterionResult;
  findings: Finding[];
}

/**
 * Judge every acceptance criterion of a mechanism on a recorded run.
 *
 * A criterion that cannot be evaluated has `passes: null` and a finding `criterion-not-evaluated` with the reason, and
 * counts as failed. What a reader must know of a value is its `note` and a finding of severity note. A value that passes
 * or fails by less than the recorded rows leave open is a warning, `criterion-unresolved`.
 *
 * @param recording the run of either solver, which `by` names; null where nothing ran
 */
export function evaluateCriteria(mechanism: Mechanism, recording: Recording | null): CriteriaResult {
  const view = recording && recording.rowCount > 0 ? new RunView(mechanism, recording) : null;
  const judged = mechanism.criteria.map((criterion) => judge(criterion, view));
  return { criteria: judged.map(({ result }) => result), findings: judged.flatMap(({ findings }) => findings) };
}

function judge(criterion: Criterion, view: RunView | null): Judged {
  // The table gives each measure its own criteria; the compiler cannot follow that through one name.
  const kind = measures[criterion.measure] as unknown as MeasureKind<Measure>;
  const measurement = view ? kind.take(criterion, view) : { reason: 'the mechanism was not run' };
  const head = { ...headOf(criterion), unit: kind.unit, by: view?.recording.solver ?? null };
  const checked = onlyFinite(measurement);
  return 'reason' in checked ? unevaluated(head, criterion, checked) : evaluated(head, criterion, checked);
}

type Head = Omit<CriterionResult, 'value' | 'passes'>;

function headOf(criterion: Criterion): Omit<Head, 'unit' | 'by'> {
  const { id, name, measure, atMost, atLeast, between }: Pick<Criterion, 'id' | 'name' | 'measure'> & Bounds =
    criterion;
  return {
    id,
    ...(name === undefined ? {} : { name }),
    measure,
    ...(atMost === undefined ? {} : { atMost }),
    ...(atLeast === undefined ? {} : { atLeast }),
    ...(between === undefined ? {} : { between: [...between] }),
  };
}

function onlyFinite(measurement: Measurement): Measurement {
  if ('reason' in measurement || measurement.value === null || Number.isFinite(measurement.value)) return measurement;
  return { reason: 'a number it is made of is not finite' };
}

function unevaluated(head: Head, criterion: Criterion, { reason, parts }: Unmeasured): Judged {
  const text = `${called(criterion)} was not evaluated, and counts as failed: ${reason}.`;
  return {
    result: { ...head, value: null, passes: null, ...(parts ? { parts } : {}) },
    findings: [{ severity: 'warning', code: 'criterion-not-evaluated', text, of: [criterion.id] }],
  };
}

function evaluated(head: Head, criterion: Criterion, measured: Measured): Judged {
  const { value, passes, claimed, at, resolution = 0, parts, note } = measured;
  const verdict = value === null ? null : (judgeBounds(value, head) ?? judgeClaim(value, claimed));
  const result: CriterionResult = {
    ...head,
    value,
    ...(claimed === undefined ? {} : { claimed }),
    ...verdict,
    ...(at === undefined ? {} : { at }),
    ...(resolution > 0 ? { resolution } : {}),
    passes: passes ?? verdict?.passes ?? null,
    ...(parts ? { parts } : {}),
    ...(note === undefined ? {} : { note }),
  };
  return { result, findings: findingsOf(result, criterion, measured) };
}

const judgeClaim = (value: number, claimed: number | undefined) =>
  claimed === undefined ? null : judgeBounds(value, { atLeast: claimed });

function findingsOf(result: CriterionResult, criterion: Criterion, { note, warning }: Measured): Finding[] {
  const of = [criterion.id];
  const { margin, resolution, unit } = result;
  const isOpen = margin !== undefined && resolution !== undefined && Math.abs(margin) < resolution;
  const outcome = result.passes === true ? 'passes' : 'fails';
  const open =
    `${called(criterion)} ${outcome} by ${figure(Math.abs(margin ?? 0))} ${unit}, but the recorded rows leave its ` +
    `value open by about ${figure(resolution ?? 0)} ${unit}: take a smaller step.`;
  return [
    ...(warning ? [{ severity: 'warning' as const, ...warning, of }] : []),
    ...(isOpen ? [{ severity: 'warning' as const, code: 'criterion-unresolved', text: open, of }] : []),
    ...(note === undefined
      ? []
      : [{ severity: 'note' as const, code: 'criterion-note', text: `${called(criterion)}: ${note}`, of }]),
  ];
}

const called = ({ id, name }: Criterion): string => `Criterion ${id}${name === undefined ? '' : ` (${name})`}`;
