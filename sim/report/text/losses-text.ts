import { lineLabel, scaleOf } from '../../ledger/index.js';
import type { CheckResult, ResultLedger, ResultPlace } from '../result.js';
import { table } from './layout.js';
import { figure, lengthUnit } from './quantities.js';

/** How many places are listed; the rest are summed up in one line. */
const LISTED = 10;

interface Loss {
  cause: string;
  place: ResultPlace;
}

/** Where joules were lost over the whole of the run, the most first: the loss map in figures. */
export function lossesText({ stepper }: CheckResult, width: number): string[] {
  const ledger = stepper?.ledgers.at(-1);
  if (!ledger) return [];
  const losses = lossesOf(ledger);
  if (losses.length === 0) return [];
  const listed = losses.slice(0, LISTED);
  const joules = scaleOf(stepper?.ledgers ?? []);
  const energy = { symbol: joules.unit, size: joules.joules, decimals: joules.decimals };
  const length = lengthUnit(listed.flatMap(({ place }) => place.at));
  const at = (axis: 0 | 1): string[] => listed.map(({ place }) => figure(place.at[axis], length));
  const rows = table(
    [
      { head: 'Cause', cells: listed.map(({ cause }) => cause), align: 'left' },
      { head: 'Place', cells: listed.map(({ place }) => placeName(place)), align: 'left' },
      { head: `x, ${length.symbol}`, cells: at(0), align: 'right' },
      { head: `y, ${length.symbol}`, cells: at(1), align: 'right' },
      { head: `Lost, ${energy.symbol}`, cells: listed.map(({ place }) => figure(place.heat, energy)), align: 'right' },
    ],
    5,
    width,
  );
  const rest = losses.slice(LISTED).reduce((sum, { place }) => sum + place.heat, 0);
  const more =
    losses.length > LISTED ? [`${losses.length - LISTED} more places: ${figure(rest, energy)} ${energy.symbol}`] : [];
  return ['', `Lost from ${ledger.from} to ${ledger.to}`, ...rows, ...more];
}

function lossesOf({ entries }: ResultLedger): Loss[] {
  return entries
    .flatMap((entry) => entry.places.map((place) => ({ cause: lineLabel({ role: 'entry', ...entry }), place })))
    .filter(({ place }) => place.heat > 0)
    .sort((a, b) => b.place.heat - a.place.heat);
}

function placeName({ on, segment, name }: ResultPlace): string {
  return segment === undefined ? on : `${on}, ${name ?? `segment ${segment + 1}`}`;
}
