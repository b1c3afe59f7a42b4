import { readMechanism, type Mechanism, type ReadResult } from '../../../sim/mechanism/index.js';
import type { JsonObject } from '../../../sim/mechanism/json/value.js';

/** A block that slides down a ramp onto a floor: the least document with a body, a track and a contact. */
export const ramp = (): JsonObject => ({
  format: 'joulewright/1',
  title: 'Block on a ramp',
  bodies: [
    {
      id: 'block',
      shape: { kind: 'box', width: '60 mm', height: '40 mm' },
      mass: '2 kg',
      rest: { on: 'ramp', at: '100 mm' },
    },
  ],
  tracks: [{ id: 'ramp', from: [0, '300 mm'], to: [{ to: ['400 mm', 0] }, { to: ['800 mm', 0] }] }],
  contacts: [{ between: ['block', 'ramp'], friction: 0.2 }],
  stations: [
    { id: '1', when: { start: true } },
    { id: '2', when: { rests: 'block' } },
  ],
  run: { until: '3 s' },
});

/** Two cranks on the ground, a carriage on a slide, and what can be put on them. */
export const bench = (): JsonObject => ({
  format: 'joulewright/1',
  bodies: [
    { id: 'crank', shape: { kind: 'disc', radius: '50 mm' }, mass: '2 kg', at: [0, 0] },
    { id: 'wheel', shape: { kind: 'disc', radius: '50 mm' }, mass: '2 kg', at: ['200 mm', 0] },
    { id: 'carriage', shape: { kind: 'box', width: '80 mm', height: '40 mm' }, mass: '3 kg', at: ['400 mm', 0] },
  ],
  joints: [
    { id: 'p', kind: 'pin', between: ['crank', 'ground'], at: [0, 0] },
    { id: 'q', kind: 'pin', between: ['wheel', 'ground'], at: ['200 mm', 0] },
    { id: 's', kind: 'slide', between: ['carriage', 'ground'], at: ['400 mm', 0], axis: [1, 0] },
  ],
  run: { until: '1 s' },
});

/** A copy of a document with keys of its top level replaced. */
export const altered = (document: JsonObject, changes: JsonObject): JsonObject => ({ ...document, ...changes });

/** A copy with keys of one element replaced; a null takes a key away. */
export function changed(document: JsonObject, list: string, index: number, changes: JsonObject): JsonObject {
  const copy = structuredClone(document);
  const element = (copy[list] as JsonObject[])[index];
  for (const [key, value] of Object.entries(changes)) {
    if (value === null) Reflect.deleteProperty(element, key);
    else element[key] = value;
  }
  return copy;
}

export const readDocument = (document: JsonObject): ReadResult => readMechanism(JSON.stringify(document));

/** The mechanism of a document that must be right. */
export function mechanismOf(document: JsonObject): Mechanism {
  const { mechanism, problems } = readDocument(document);
  if (!mechanism) throw new Error(problems.map((each) => `${each.pointer}: ${each.text}`).join('\n'));
  return mechanism;
}

/** Code and pointer of every problem, for comparisons. */
export const told = ({ problems }: ReadResult): string[] => problems.map(({ code, pointer }) => `${code} ${pointer}`);
