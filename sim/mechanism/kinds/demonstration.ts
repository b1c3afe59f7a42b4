import { list, number, optional, record, ref, required, text, type Field, type Read } from '../fields/spec.js';
import { moment } from './common.js';

/** x, y of the middle and width of what is shown [m]. */
const view: Field<readonly [number, number, number]> = {
  type: 'vector',
  kind: 'length',
  unit: 'mm',
  size: 3,
  notZero: false,
};

/** Field table of one step of an annotated playback. */
export const demonstrationFields = record('a step of the demonstration', {
  text: required(text, 'What is said.'),
  view: optional(view, 'Middle and width of what is shown: [x, y, width]; default: everything.'),
  from: optional(moment, 'Where the playback begins; default: the start.'),
  to: optional(moment, 'Where it ends; default: the end.'),
  rate: optional(number({ above: 0 }), 'Speed of the playback; default 1.'),
  show: optional(list(text), 'Tracings shown.'),
  mark: optional(
    list(ref('body', 'track', 'joint', 'spring', 'damper', 'drive', 'load', 'latch', 'station')),
    'Ids marked.',
  ),
});

export type DemonstrationStep = Read<typeof demonstrationFields>;
