import type { Item } from '../../sim/drawing/items.js';
import type { PatternName } from '../../sim/drawing/patterns.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import type { AccountName, Recording } from '../../sim/recording/recording.js';
import { kineticEnergyOf, valueAt } from '../../sim/recording/reader.js';
import { accountLook } from '../account/look.js';
import { accountWord, lineName } from '../account/names.js';

/** One line of the Key: a look and what it stands for. */
export interface Cause {
  look: PatternName;
  name: string;
}

/** Accounts that stand in the Key one by one, since their looks differ. */
const eachByItself: readonly AccountName[] = ['friction', 'joint-friction', 'rolling-resistance'];

/** Greatest energy of motion in the run [J]: what work is measured by. */
function greatestEnergy(recording: Recording): number {
  let greatest = 0;
  for (let row = 0; row < recording.rowCount; row++) {
    const energy = recording.layout.bodies.reduce((sum, body) => sum + kineticEnergyOf(recording, body, row), 0);
    greatest = Math.max(greatest, energy);
  }
  return greatest;
}

/** Whether an account did any work by the end of the run or on the way, beyond rounding. */
function works(recording: Recording, columns: readonly number[], least: number): boolean {
  for (let row = 0; row < recording.rowCount; row++)
    if (columns.some((column) => Math.abs(valueAt(recording, row, column)) > least)) return true;
  return false;
}

/** The causes and stores at work in a run, and those that every run has. */
export function causesOf(recording: Recording, mechanism: Mechanism, items: readonly Item[]): Cause[] {
  const causes: Cause[] = [
    { look: 'gravity', name: 'Gravity, height' },
    { look: 'motion', name: 'Motion' },
  ];
  const least = 1e-9 * greatestEnergy(recording);
  for (const { account, of, columns } of recording.layout.accounts) {
    if (account === 'gravity' || account === 'numerical' || !works(recording, columns.work, least)) continue;
    const name = eachByItself.includes(account) ? lineName({ account, of }, items, mechanism) : accountWord(account);
    if (causes.every((cause) => cause.name !== name)) causes.push({ look: accountLook(recording, account, of), name });
  }
  return [...causes, { look: 'numerical', name: 'Numerical' }, { look: 'unbooked', name: 'Unbooked' }];
}
