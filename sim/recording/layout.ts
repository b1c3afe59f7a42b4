import type { PointOn } from '../mechanism/kinds/joint.js';
import type { AccountSpec, ContactSpec, LinkSpec, RecordingLayout } from './recording.js';

/** An account before its columns are numbered: what it is, the bodies it works on, and which extra columns it needs. */
export type AccountRequest = Omit<AccountSpec, 'columns'> & { heat?: boolean; stored?: boolean; input?: boolean };

/** A spring or damper as the mechanism has it: the ends are points, or two parts where it acts on their angle. */
export interface LinkRequest {
  id: string;
  between: readonly [PointOn | string, PointOn | string];
}

/** What a solver is going to record. The order of each list is the order of its columns. */
export interface LayoutRequest {
  bodies: readonly { id: string; mass: number; inertia: number }[];
  accounts: readonly AccountRequest[];
  contacts?: readonly { between: [string, string] }[];
  joints?: readonly { id: string }[];
  springs?: readonly LinkRequest[];
  dampers?: readonly LinkRequest[];
}

/** Number the columns of a run: time first, then bodies, accounts, contacts, joints, springs and dampers. */
export function buildLayout(request: LayoutRequest): RecordingLayout {
  const columns = new ColumnCounter();
  const bodies = request.bodies.map(({ id, mass, inertia }) => ({
    id,
    mass,
    inertia,
    columns: columns.named('x', 'y', 'angle', 'vx', 'vy', 'spin'),
  }));
  const accounts = request.accounts.map((account) => accountSpec(account, columns));
  const contacts = (request.contacts ?? []).map((contact) => contactSpec(contact, columns));
  const joints = (request.joints ?? []).map(({ id }) => ({
    id,
    columns: columns.named('fx', 'fy', 'torque', 'x', 'y', 'position'),
  }));
  const springs = (request.springs ?? []).map((spring) => linkSpec(spring, columns));
  const dampers = (request.dampers ?? []).map((damper) => linkSpec(damper, columns));
  return { width: columns.next, bodies, accounts, contacts, joints, springs, dampers };
}

/**
 * A layout with more accounts and contacts, which take columns after the ones there are; those keep theirs. Spare columns
 * are left behind them, so that a run that finds its contacts one by one need not be copied each time.
 */
export function extendLayout(
  layout: RecordingLayout,
  more: Required<Pick<LayoutRequest, 'contacts'>> & Pick<LayoutRequest, 'accounts'>,
): RecordingLayout {
  const columns = new ColumnCounter(usedWidth(layout));
  const accounts = [...layout.accounts, ...more.accounts.map((account) => accountSpec(account, columns))];
  const contacts = [...layout.contacts, ...more.contacts.map((contact) => contactSpec(contact, columns))];
  const width = columns.next <= layout.width ? layout.width : Math.ceil(columns.next * SPARE);
  return { ...layout, width, accounts, contacts };
}

/** How much wider than needed an extended layout is made. */
const SPARE = 1.5;

/** First column that nothing has taken: each list has its columns in order, so that the last of each has its greatest. */
function usedWidth({ bodies, accounts, contacts, joints, springs, dampers }: RecordingLayout): number {
  let most = 0;
  for (const list of [bodies, accounts, contacts, joints, springs, dampers]) {
    const last = list.at(-1);
    if (last) most = Math.max(most, ...Object.values(last.columns).flat());
  }
  return 1 + most;
}

class ColumnCounter {
  /** Column 0 is time. */
  constructor(public next = 1) {}

  take(): number {
    return this.next++;
  }

  named<Name extends string>(...names: Name[]): Record<Name, number> {
    return Object.fromEntries(names.map((name) => [name, this.take()])) as Record<Name, number>;
  }
}

function accountSpec({ heat, stored, input, ...account }: AccountRequest, columns: ColumnCounter): AccountSpec {
  const numbered: AccountSpec['columns'] = { work: account.bodies.map(() => columns.take()) };
  if (heat) numbered.heat = columns.take();
  if (stored) numbered.stored = columns.take();
  if (input) numbered.input = columns.take();
  return { ...account, columns: numbered };
}

function contactSpec({ between }: { between: [string, string] }, columns: ColumnCounter): ContactSpec {
  const named = columns.named('points', 'normal', 'friction', 'slip', 'x', 'y', 'nx', 'ny', 'segment');
  return { between, columns: named };
}

function linkSpec({ id, between }: LinkRequest, columns: ColumnCounter): LinkSpec {
  const [first, second] = between;
  const ends: LinkSpec['ends'] = [asEnd(first), asEnd(second)];
  return { id, ends, columns: columns.named('deflection', 'force') };
}

function asEnd(end: PointOn | string): LinkSpec['ends'][0] {
  return typeof end === 'string' ? { of: end } : { of: end.of, at: end.at };
}
