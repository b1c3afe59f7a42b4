import type { Measure } from '../../mechanism/kinds/criterion.js';
import type { MeasureKind } from '../measurement.js';
import { angle } from './angle.js';
import { approachSpeed } from './approach-speed.js';
import { claimedEfficiency } from './claimed-efficiency.js';
import { duration } from './duration.js';
import { effectiveMass } from './effective-mass.js';
import { efficiency } from './efficiency.js';
import { heat } from './heat.js';
import { kineticEnergy } from './kinetic-energy.js';
import { liftOff } from './lift-off.js';
import { meanPower } from './mean-power.js';
import { peakForce } from './peak-force.js';
import { peakPower } from './peak-power.js';
import { reached } from './reached.js';
import { returnMargin } from './return-margin.js';
import { slipSpeed } from './slip-speed.js';
import { speed } from './speed.js';
import { storedEnergy } from './stored-energy.js';
import { stroke } from './stroke.js';
import { travel } from './travel.js';
import { work } from './work.js';

/** Every measure of the contract; one that is missing does not compile. */
export const measures = {
  approachSpeed,
  speed,
  kineticEnergy,
  effectiveMass,
  peakForce,
  travel,
  angle,
  slipSpeed,
  heat,
  stroke,
  storedEnergy,
  returnMargin,
  work,
  peakPower,
  meanPower,
  efficiency,
  duration,
  liftOff,
  reached,
  claimedEfficiency,
} satisfies { [M in Measure]: MeasureKind<M> };
