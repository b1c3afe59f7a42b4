import type { Criterion } from '../kinds/criterion.js';
import { placeOf, type Checked } from './checked.js';
import { checkListed } from './stations.js';

/** Criteria that ask for what cannot be: a pair that never touches, an impact where there is none, an empty band. */
export function checkCriteria(checked: Checked): void {
  for (const criterion of checked.mechanism.criteria) {
    checkPairs(criterion, checked);
    checkTouch(criterion, checked);
    checkBand(criterion, checked);
  }
}

function checkPairs(criterion: Criterion, checked: Checked): void {
  if ('of' in criterion && isPair(criterion.of)) {
    checkListed(criterion.of, placeOf(checked, criterion.id, 'of'), checked);
  }
  for (const { pointer, account } of accountsOf(criterion)) {
    if (typeof account === 'string' || !isPair(account.of)) continue;
    checkListed(account.of, placeOf(checked, criterion.id, pointer, 'of'), checked);
  }
}

type Account = Extract<Criterion, { measure: 'work' }>['account'];

function accountsOf(criterion: Criterion): { pointer: string; account: Account }[] {
  if (criterion.measure === 'work') return [{ pointer: 'account', account: criterion.account }];
  if (criterion.measure !== 'efficiency') return [];
  return (['useful', 'input'] as const).flatMap((key) =>
    criterion[key].map((account, i) => ({ pointer: `${key}/${i}`, account })),
  );
}

const isPair = (of: string | [string, string]): of is [string, string] => typeof of !== 'string';

/** Approach speed and effective mass belong to an impact of the pair. */
function checkTouch(criterion: Criterion, checked: Checked): void {
  if (criterion.measure !== 'approachSpeed' && criterion.measure !== 'effectiveMass') return;
  const station = checked.mechanism.stations.find(({ id }) => id === criterion.at);
  if (!station || station.when.kind === 'touch') return;
  const place = placeOf(checked, criterion.id, 'at');
  const found = `"${criterion.at}", a station of ${station.when.kind}`;
  checked.reading.report('not-a-touch', place, { found, accepted: 'a station with "touch" in its when' });
}

function checkBand(criterion: Criterion, checked: Checked): void {
  if (!('between' in criterion) || !criterion.between) return;
  const [least, greatest] = criterion.between;
  if (least < greatest) return;
  const place = placeOf(checked, criterion.id, 'between');
  const found = `a band from ${least} to ${greatest} (SI)`;
  checked.reading.report('empty-span', place, { found, accepted: 'the lesser value first, then the greater' });
}
