import { inside } from '../fields/reading.js';
import type { ContactDocument } from '../kinds/contact.js';
import type { Place } from '../../core/problem.js';
import { placeOf, type Checked } from './checked.js';

/** Values of a contact that do not go together, and a body laid on a track that it does not touch. */
export function checkContacts(checked: Checked): void {
  const { draft, reading } = checked;
  for (const { value, place } of draft.contacts ?? []) {
    if (value) checkCompliance(value, place, checked);
  }
  const told = new Set<string>();
  for (const { staticFriction, kineticFriction, pointer, between } of checked.mechanism.contacts) {
    if (staticFriction >= kineticFriction || told.has(pointer)) continue;
    told.add(pointer);
    const found = `static ${staticFriction}, kinetic ${kineticFriction}`;
    const accepted = 'a static coefficient no less than the kinetic one, or friction for both';
    reading.report('static-below-kinetic', { pointer, of: [...between] }, { found, accepted });
  }
  checkRests(checked);
}

function checkCompliance(value: ContactDocument, place: Place, { reading }: Checked): void {
  if (value.stiffness !== undefined && value.restitution !== undefined) {
    const accepted = 'stiffness and damping, or restitution';
    reading.report('compliant-restitution', inside(place, 'restitution'), {
      found: `a restitution of ${value.restitution} beside a stiffness`,
      accepted,
    });
  }
  if (value.stiffness === undefined && value.damping !== undefined) {
    const values = { found: 'damping without stiffness', accepted: 'damping beside a stiffness' };
    reading.report('no-effect', inside(place, 'damping'), values);
  }
}

function checkRests(checked: Checked): void {
  const { mechanism, draft, reading } = checked;
  // A contact that is wrong itself might have been the one between them.
  if (draft.contacts?.some(({ value }) => value === undefined)) return;
  for (const { id, rest } of mechanism.bodies) {
    if (!rest || mechanism.contacts.some(({ between }) => between.includes(id) && between.includes(rest.on))) continue;
    const place = { ...placeOf(checked, id, 'rest'), of: [id, rest.on] };
    const found = `"${id}" laid on "${rest.on}"`;
    reading.report('rest-without-contact', place, { found, accepted: 'a contact between them' });
  }
}
