import type { PrintScale } from '../../ledger/index.js';
import { lineLabel, scaleOf } from '../../ledger/index.js';
import type { CheckResult, ResultLedger, ResultPlace } from '../result.js';
import type { PrintUnit } from './quantities.js';
import { table } from './layout.js';
import { figure, lengthUnit } from './quantities.js';

/** How many places are listed; the rest are summed up in one line. */
const LISTED = 10;

/** What one cause lost at one place, in one piece or in several impacts. */
interface Loss {
  cause: string;
  place: string;
  times: number;
  heat: number;
  /** Mean of where it was, weighted with the heat. */
  x: number;
  y: number;
}

/** Where joules were lost over the whole of the run, the most first: the loss map in figures. */
export function lossesText({ stepper }: CheckResult, width: number): string[] {
  const ledger = stepper?.ledgers.at(-1);
  if (!ledger) return [];
  const energy = energyUnit(scaleOf(stepper?.ledgers ?? []));
  const losses = lossesOf(ledger).filter(({ heat }) => Number(figure(heat, energy)) > 0);
  if (losses.length === 0) return [];
  const rest = losses.slice(LISTED).reduce((sum, { heat }) => sum + heat, 0);
  const more = `${losses.length - LISTED} more places: ${figure(rest, energy)} ${energy.symbol}`;
  return [
    '',
    `Lost from ${ledger.from} to ${ledger.to}`,
    ...lossTable(losses.slice(0, LISTED), energy, width),
    ...(losses.length > LISTED ? [more] : []),
  ];
}

function energyUnit({ unit, joules, decimals }: PrintScale): PrintUnit {
  return { symbol: unit, size: joules, decimals };
}

function lossTable(losses: readonly Loss[], energy: PrintUnit, width: number): string[] {
  const length = lengthUnit(losses.flatMap(({ x, y }) => [x, y]));
  const cells = (cell: (loss: Loss) => string): string[] => losses.map(cell);
  const columns = [
    { head: 'Cause', cells: cells(({ cause }) => cause), align: 'left' as const },
    { head: 'Place', cells: cells(placeLabel), align: 'left' as const },
    { head: `x, ${length.symbol}`, cells: cells(({ x }) => figure(x, length)), align: 'right' as const },
    { head: `y, ${length.symbol}`, cells: cells(({ y }) => figure(y, length)), align: 'right' as const },
    { head: `Lost, ${energy.symbol}`, cells: cells(({ heat }) => figure(heat, energy)), align: 'right' as const },
  ];
  return table(columns, columns.length, width);
}

/** The losses of a ledger by cause and place: several impacts on one segment are one line. */
function lossesOf({ entries }: ResultLedger): Loss[] {
  const losses = new Map<string, Loss>();
  for (const entry of entries) {
    const cause = lineLabel({ role: 'entry', ...entry });
    for (const place of entry.places.filter(({ heat }) => heat > 0)) addLoss(losses, cause, place);
  }
  return [...losses.values()].sort((a, b) => b.heat - a.heat);
}

function addLoss(losses: Map<string, Loss>, cause: string, place: ResultPlace): void {
  const name = placeName(place);
  const key = `${cause} ${name}`;
  const loss = losses.get(key) ?? { cause, place: name, times: 0, heat: 0, x: 0, y: 0 };
  const heat = loss.heat + place.heat;
  const share = place.heat / heat;
  const [x, y] = [loss.x + share * (place.at[0] - loss.x), loss.y + share * (place.at[1] - loss.y)];
  losses.set(key, { ...loss, times: loss.times + 1, heat, x, y });
}

function placeName({ on, segment, name }: ResultPlace): string {
  return segment === undefined || name === on ? on : `${on}, ${name ?? `segment ${segment + 1}`}`;
}

function placeLabel({ place, times }: Loss): string {
  return times > 1 ? `${place}, ${times} times` : place;
}
