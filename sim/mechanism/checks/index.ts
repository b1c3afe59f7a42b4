import type { DocumentDraft } from '../document.js';
import type { Reading } from '../fields/reading.js';
import type { Mechanism } from '../model.js';
import type { PlacedBody } from '../resolve/body.js';
import type { TrackPath } from '../../geometry/index.js';

/** What the checks of a whole mechanism look at. */
export interface Checked {
  mechanism: Mechanism;
  draft: DocumentDraft;
  /** Bodies whose pose is known, also those whose mass is not. */
  placed: readonly PlacedBody[];
  paths: ReadonlyMap<string, TrackPath>;
  reading: Reading;
}

export function checkMechanism(_checked: Checked): void {}
