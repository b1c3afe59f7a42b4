import type { Place } from '../../core/problem.js';
import type { TrackPath } from '../../geometry/index.js';
import type { DocumentDraft } from '../document.js';
import type { Reading } from '../fields/reading.js';
import type { Mechanism } from '../model.js';
import type { PlacedBody } from '../resolve/body.js';

/** What the checks of a whole mechanism look at. */
export interface Checked {
  mechanism: Mechanism;
  draft: DocumentDraft;
  /** Bodies whose pose is known, also those whose mass is not. */
  placed: readonly PlacedBody[];
  paths: ReadonlyMap<string, TrackPath>;
  /** Where each element stands, by id. */
  places: ReadonlyMap<string, Place>;
  reading: Reading;
}

/** Where a key of an element stands. */
export const placeOf = ({ places }: Pick<Checked, 'places'>, id: string, ...keys: string[]): Place => {
  const place = places.get(id) ?? { pointer: '', of: [id] };
  return { ...place, pointer: [place.pointer, ...keys].join('/') };
};
