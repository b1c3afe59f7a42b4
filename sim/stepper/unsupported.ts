import type { Mechanism } from '../mechanism/model.js';
import type { Finding } from '../recording/recording.js';
import { driveLaws, joints, shapes, springs } from './kinds/index.js';
import { stepFindings } from './step-limits.js';

/**
 * Why the stepper cannot run a document: one finding for each element that it does not simulate, or what is wrong with the
 * step that `options` or else the document fixes. None when it can run.
 */
export function unsupported(mechanism: Mechanism, options: { step?: number } = {}): Finding[] {
  const findings = unsupportedElements(mechanism);
  const step = options.step ?? mechanism.run.step;
  return findings.length > 0 || step === undefined ? findings : stepFindings(mechanism, step);
}

function unsupportedElements(mechanism: Mechanism): Finding[] {
  const findings: Finding[] = [];
  const refuse = (id: string, what: string): void => {
    findings.push({
      severity: 'error',
      code: 'not-simulated',
      text: `${what} "${id}" is kept in the file, but the stepper does not simulate it yet.`,
      of: [id],
    });
  };
  for (const { id, shape } of mechanism.bodies) if (!shapes[shape.kind]) refuse(id, `The ${shape.kind}`);
  for (const joint of mechanism.joints) {
    if (!joints[joint.kind]) refuse(joint.id, `The ${joint.kind}`);
    if (joint.kind === 'pin') refusePin(joint, mechanism, refuse);
  }
  for (const { id, kind } of mechanism.springs) if (!springs[kind]) refuse(id, `The ${kind} spring`);
  for (const drive of mechanism.drives) {
    if (!driveLaws[drive.law.kind]) refuse(drive.id, 'The drive (other than a constant torque or force)');
  }
  return findings;
}

/** A particle hangs on its pin as on a massless link: such a link has no friction or stops of its own. */
function refusePin(
  pin: Mechanism['joints'][number] & { kind: 'pin' },
  mechanism: Mechanism,
  refuse: (id: string, what: string) => void,
): void {
  const points = pin.between.filter((id) => {
    const body = mechanism.bodies.find((candidate) => candidate.id === id);
    return body?.inertia === 0 && Math.hypot(pin.at[0] - body.at[0], pin.at[1] - body.at[1]) > 1e-6 * mechanism.extent;
  });
  if (points.length > 1) refuse(pin.id, 'The pin between two particles away from both');
  if (points.length === 1 && (pin.friction || pin.limits))
    refuse(pin.id, 'Friction or limits of the massless link at pin');
}
