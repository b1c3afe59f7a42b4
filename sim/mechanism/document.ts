import type { JsonObject } from './json/value.js';
import {
  choice,
  elements,
  list,
  optional,
  record,
  ref,
  required,
  text,
  vector,
  withDefault,
  type Read,
} from './fields/spec.js';
import { bodyFields } from './kinds/body.js';
import { contactFields, materialFields } from './kinds/contact.js';
import { criterionFields } from './kinds/criterion.js';
import { damperFields } from './kinds/damper.js';
import { demonstrationFields } from './kinds/demonstration.js';
import { driveFields } from './kinds/drive.js';
import { jointFields } from './kinds/joint.js';
import { latchFields } from './kinds/latch.js';
import { loadFields } from './kinds/load.js';
import { runFields } from './kinds/run.js';
import { sheetFields } from './kinds/sheet.js';
import { sizingFields } from './kinds/sizing.js';
import { springFields } from './kinds/spring.js';
import { spreadFields } from './kinds/spread.js';
import { stationFields } from './kinds/station.js';
import { trackFields } from './kinds/track.js';

/** The version this program writes. */
export const FORMAT = 'joulewright/1';

/**
 * A mechanism file as it was typed: units, unknown keys and all, in the newest version of the format. What it means is
 * the `Mechanism` that reading gives beside it.
 */
export interface MechanismDocument extends JsonObject {
  format: typeof FORMAT;
}

/** Standard gravity (3rd CGPM, 1901), downwards [m/s²]. */
export const STANDARD_GRAVITY = 9.80665;

/** The whole document, in the order of the contract. */
export const documentFields = record('a mechanism document', {
  format: required(choice(FORMAT), 'Version of the format.'),
  title: withDefault(text, '', 'no title given', 'Title of the drawing.'),
  sheet: optional(sheetFields, 'Title block.'),
  notes: optional(text, 'Free text.'),
  gravity: withDefault(
    vector('acceleration', 'm/s^2'),
    [0, `-${STANDARD_GRAVITY} m/s^2`],
    'standard gravity, downwards',
    'Gravity.',
  ),
  materials: optional(materialFields, 'What materials do on each other.'),
  bodies: optional(elements(bodyFields), 'The moving parts.'),
  tracks: optional(elements(trackFields), 'Fixed profiles.'),
  contacts: optional(elements(contactFields), 'What touches what.'),
  joints: optional(elements(jointFields), 'Joints, ropes and gears.'),
  springs: optional(elements(springFields), 'Springs.'),
  dampers: optional(elements(damperFields), 'Dampers.'),
  drives: optional(elements(driveFields), 'Drives.'),
  loads: optional(elements(loadFields), 'Loads.'),
  latches: optional(elements(latchFields), 'Latches.'),
  system: optional(list(ref('body'), 1), 'The bodies inside the boundary; default: all.'),
  stations: optional(elements(stationFields), 'Marked instants.'),
  criteria: optional(elements(criterionFields), 'Acceptance criteria.'),
  spread: optional(spreadFields, 'Tolerance study.'),
  sizing: optional(sizingFields, 'What to solve for.'),
  demonstration: optional(list(demonstrationFields), 'Annotated playback.'),
  run: required(runFields, 'How to run it.'),
});

/** What reading the whole document gives, as far as it could be read. */
export type DocumentDraft = Partial<Read<typeof documentFields>>;
