import type { Finding } from '../../recording/index.js';
import { ACCOUNT_NAMES, ofLabel } from '../names.js';
import type { OneSided } from './common.js';
import type { OffDocument } from './document-check.js';
import type { Figure, Quantity } from './figures.js';
import type { Parting } from './parting.js';
import type { Remedy } from './remedies.js';

/** What each figure of a station is called, and its SI unit. */
export const QUANTITIES: Record<Quantity, { name: string; unit: string }> = {
  time: { name: 'time', unit: 's' },
  x: { name: 'x', unit: 'm' },
  y: { name: 'y', unit: 'm' },
  angle: { name: 'angle', unit: 'rad' },
  speed: { name: 'speed', unit: 'm/s' },
  spin: { name: 'spin', unit: 'rad/s' },
  approachSpeed: { name: 'approach speed', unit: 'm/s' },
  effectiveMass: { name: 'effective mass', unit: 'kg' },
};

/** The first station where two runs part, and the account that parts most. */
export function partingFindings({ station, figure, account }: Parting, time: number): Finding[] {
  const findings: Finding[] = [];
  if (figure) {
    const { name, unit } = QUANTITIES[figure.quantity];
    const what = figure.of === '' ? name : `${name} of ${figure.of}`;
    const text = `The runs part at station ${station}: ${what} ${bothOf(figure, unit)}.`;
    findings.push({
      severity: 'error',
      code: 'runs-part',
      text,
      of: [station, ...figure.of.split('/')].filter(Boolean),
      at: time,
    });
  }
  if (account) {
    const { from, to, account: name, of } = account;
    const what = [ACCOUNT_NAMES[name], ofLabel(of)].filter(Boolean).join(' ');
    const text = `From station ${from} to ${to} the account ${what} parts most: work ${bothOf(account, 'J')}.`;
    findings.push({ severity: 'error', code: 'account-parts', text, of: of === null ? [] : [of].flat() });
  }
  return findings;
}

function bothOf({ stepper, auditor, difference, share }: Figure, unit: string): string {
  const [a, b] = [stepper, auditor].map((value) => (value === null ? 'none' : `${digits(value)} ${unit}`));
  return `${a} by the stepper and ${b} by the auditor, ${digits(Math.abs(difference))} ${unit} or ${percent(share)} apart`;
}

export function oneSidedFinding({ station, reachedBy, time }: OneSided): Finding {
  const other = reachedBy === 'stepper' ? 'auditor' : 'stepper';
  const text = `The ${reachedBy} reached station ${station}, at ${digits(time)} s; the ${other} did not.`;
  return { severity: 'error', code: 'station-one-sided', text, of: [station], at: time };
}

const UNITS = { mass: 'kg', inertia: 'kg m²', gravity: 'J', spring: 'J' };

export function offDocumentFinding({ by, what, of, found, expected, from, to }: OffDocument): Finding {
  const unit = UNITS[what];
  const [a, b] = [`${digits(found)} ${unit}`, `${digits(expected)} ${unit}`];
  const text =
    what === 'mass' || what === 'inertia'
      ? `The ${by} ran ${of} with ${a} of ${what} where the document has ${b}.`
      : `From station ${from ?? ''} to ${to ?? ''} the ${by} booked ${a} to ${what} ${of}; by the document’s data and where ` +
        `the ${by} itself had the bodies, it is ${b}.`;
  return { severity: 'error', code: 'off-document', text: `${text} No step or tolerance mends that.`, of: [of] };
}

export function remedyFinding(remedy: Remedy): Finding {
  switch (remedy.do) {
    case 'smaller-step': {
      const text = `Take a smaller step: ${digits(remedy.step)} s; it is ${digits(remedy.now)} s now.`;
      return { severity: 'note', code: 'try-smaller-step', text, of: [] };
    }
    case 'compliant-stop': {
      const text = `If ${ofLabel(remedy.pair)} yields in fact, give the contact a stiffness and damping: a rigid impact is all in one instant, a compliant one is stepped through.`;
      return { severity: 'note', code: 'try-compliant-stop', text, of: [...remedy.pair] };
    }
    case 'contact-order': {
      const pairs = remedy.pairs.map((pair) => ofLabel(pair));
      const text = `${pairs.join(' and ')} strike at one instant, and in which order they are taken may decide what follows: part them in time, or make one of them compliant.`;
      return { severity: 'note', code: 'contact-order', text, of: [...new Set(remedy.pairs.flat())], at: remedy.at };
    }
  }
}

export function nothingCompared(): Finding {
  const text = 'There is no station that both runs reached, so nothing was compared. Mark at least a start and an end.';
  return { severity: 'warning', code: 'nothing-compared', text, of: [] };
}

/** Four significant digits: a difference of half a percent shows in them. */
export function digits(value: number): string {
  return String(Number(value.toPrecision(4))).replace('-', '−');
}

function percent(share: number): string {
  return `${Number((100 * share).toPrecision(2))} %`;
}
