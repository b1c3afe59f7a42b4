import { Random } from '../../core/random.js';
import type { Body } from '../../mechanism/kinds/body.js';
import type { Mechanism } from '../../mechanism/model.js';
import type { Finding, Recording } from '../../recording/index.js';
import { compareStation } from './at-station.js';
import { commonStations, oneSidedStations } from './common.js';
import type { Quantity, StationFigure } from './figures.js';
import { scalesOf, type Compared } from './scales.js';
import { digits, QUANTITIES } from './words.js';

/** How far the start is moved, as a share of the extent and of the greatest speed. */
const NUDGE = 1e-9;

/** An outcome that moves by more than this share of its scale hangs on the nudge: it was made a million times greater. */
const SENSITIVE = 1e-3;

const SEED = 20;

/** How a start a hair away changes the outcome. */
export interface Sensitivity {
  sensitive: boolean;
  findings: Finding[];
}

/**
 * Whether the outcome of a mechanism hangs on the last digits of its start: runs it again with every body moved by 1e-9
 * of the extent, and its velocity by 1e-9 of the greatest speed, in directions that are the same every time, and compares
 * the figures of all stations.
 *
 * @param nominal a run of the mechanism as it is
 * @param run makes a run as `nominal` was made
 */
export function sensitivityOf(
  mechanism: Mechanism,
  nominal: Recording,
  run: (mechanism: Mechanism) => Recording,
): Sensitivity {
  const scales = scalesOf(mechanism, [nominal]);
  const nudged = run(nudge(mechanism, scales.speed));
  const compared: Compared = { mechanism, stepper: nudged, auditor: nominal, scales, least: 1, tolerance: SENSITIVE };
  // A run that was stopped says nothing about stations it did not come to.
  const [lost] = nudged.end === nominal.end ? oneSidedStations(nudged, nominal) : [];
  for (const station of commonStations(nudged, nominal)) {
    const moved = compareStation(compared, station).figures.filter(
      ({ within, quantity }) => !within && isOutcome(quantity),
    );
    if (moved.length > 0) return sensitive(station.id, station.auditor.time, furthest(moved));
  }
  return lost ? sensitive(lost.station, lost.time, null) : { sensitive: false, findings: [] };
}

/** The mechanism with every body a hair away from where it starts; its joints stay where they are drawn. */
export function nudge(mechanism: Mechanism, greatestSpeed: number): Mechanism {
  const random = new Random(SEED);
  const about = (size: number): number => NUDGE * size * random.between(-1, 1);
  const bodies = mechanism.bodies.map((body): Body => {
    const { extent } = mechanism;
    const [[x, y], [vx, vy]] = [body.at, body.velocity];
    return {
      ...body,
      at: [x + about(extent), y + about(extent)],
      velocity: [vx + about(greatestSpeed), vy + about(greatestSpeed)],
    };
  });
  return { ...mechanism, bodies };
}

/** The effective mass of a face that lands flat is that of the corner which is first by a hair; nothing follows from it. */
function isOutcome(quantity: Quantity): boolean {
  return quantity !== 'effectiveMass';
}

function furthest(figures: readonly StationFigure[]): StationFigure {
  return figures.reduce((most, each) => (most.share >= each.share ? most : each));
}

function sensitive(station: string, time: number, figure: StationFigure | null): Sensitivity {
  const change = figure
    ? `${QUANTITIES[figure.quantity].name}${figure.of === '' ? '' : ` of ${figure.of}`} at station ${station} changes by ` +
      `${digits(100 * figure.share)} %`
    : `station ${station} is reached by one run and not by the other`;
  const text =
    `The outcome hangs on the last digits of the start: with every body moved by 1e-9 of the extent, ${change}. ` +
    'What is computed from there on is one of many outcomes; no step or tolerance settles which. Make the stops ' +
    'compliant, part impacts that fall together, or judge the spread of outcomes.';
  return { sensitive: true, findings: [{ severity: 'warning', code: 'sensitive', text, of: [station], at: time }] };
}
