import type { Item } from '../../sim/drawing/items.js';
import type { PatternName } from '../../sim/drawing/patterns.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import type { AccountName, Recording } from '../../sim/recording/recording.js';
import { accountLook } from '../account/look.js';
import { accountWord, lineName } from '../account/names.js';

/** One line of the Key: a look and what it stands for. */
export interface Cause {
  look: PatternName;
  name: string;
}

/** Accounts that stand in the Key one by one, since their looks differ. */
const eachByItself: readonly AccountName[] = ['friction', 'joint-friction', 'rolling-resistance'];

/** The causes and stores of a run, and those that every run has. */
export function causesOf(recording: Recording, mechanism: Mechanism, items: readonly Item[]): Cause[] {
  const causes: Cause[] = [
    { look: 'gravity', name: 'Gravity, height' },
    { look: 'motion', name: 'Motion' },
  ];
  for (const { account, of } of recording.layout.accounts) {
    if (account === 'gravity' || account === 'numerical') continue;
    const name = eachByItself.includes(account) ? lineName({ account, of }, items, mechanism) : accountWord(account);
    if (causes.every((cause) => cause.name !== name)) causes.push({ look: accountLook(recording, account, of), name });
  }
  return [...causes, { look: 'numerical', name: 'Numerical' }, { look: 'unbooked', name: 'Unbooked' }];
}
