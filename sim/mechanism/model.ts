import type { Vec } from '../core/vec.js';
import type { Body } from './kinds/body.js';
import type { ContactPair } from './kinds/contact.js';
import type { Criterion } from './kinds/criterion.js';
import type { Damper } from './kinds/damper.js';
import type { DemonstrationStep } from './kinds/demonstration.js';
import type { Drive } from './kinds/drive.js';
import type { Joint } from './kinds/joint.js';
import type { Latch } from './kinds/latch.js';
import type { Load } from './kinds/load.js';
import type { Sheet } from './kinds/sheet.js';
import type { Sizing } from './kinds/sizing.js';
import type { Spread } from './kinds/spread.js';
import type { Spring } from './kinds/spring.js';
import type { Station } from './kinds/station.js';
import type { Track } from './kinds/track.js';

/** How to run: all in SI, defaults applied. */
export interface RunSettings {
  /** The run ends at the station, at the time, or at `atMost` [s], whichever comes first. */
  until: { station: string } | { time: number };
  atMost: number;
  /** The stepper's step [s], where the document or the caller fixes it. */
  step?: number;
  /** The auditor's relative tolerance. */
  tolerance?: number;
  /** Wall-clock budget [s]. */
  timeBudget?: number;
}

/** A mechanism as the solvers take it: validated, SI, defaults applied, wildcards expanded, wire rates worked out. */
export interface Mechanism {
  title: string;
  /** Title block, as typed. */
  sheet: Sheet;
  notes: string;
  gravity: Vec;
  bodies: Body[];
  tracks: Track[];
  contacts: ContactPair[];
  joints: Joint[];
  springs: Spring[];
  dampers: Damper[];
  drives: Drive[];
  loads: Load[];
  latches: Latch[];
  /** Ids of the bodies inside the boundary. */
  system: string[];
  stations: Station[];
  criteria: Criterion[];
  /** Tolerance study, where the document has one. */
  spread?: Spread;
  sizing?: Sizing;
  demonstration: DemonstrationStep[];
  run: RunSettings;
  /** Diagonal of the bounding box of everything drawn [m]; the length that tolerances are relative to. */
  extent: number;
}
