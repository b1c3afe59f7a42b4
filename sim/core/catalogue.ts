import type { Severity } from './problem.js';

interface Entry {
  severity: Severity;
  /** The sentence, with {names} for what the reader of the document fills in. */
  says: string;
  /** What it means and what to do, for the format's description and the window. */
  means: string;
}

/**
 * Every problem a document can have, by code. Codes are a contract: a script may look for them.
 */
export const catalogue = {
  'file-too-large': {
    severity: 'error',
    says: 'The file has {found}; accepted is {accepted}.',
    means: 'A mechanism is described in kilobytes. The file is not read, so that a wrong one does not fill the memory.',
  },
  'json-syntax': {
    severity: 'error',
    says: 'Not JSON: {found} at line {line}, column {column}, where {accepted} is wanted.',
    means: 'The text breaks the rules of JSON there. Comments and trailing commas are not accepted.',
  },
  'json-depth': {
    severity: 'error',
    says: 'Nested too deeply: {found}; accepted are {accepted}.',
    means: 'No part of the format is nested like that.',
  },
  'duplicate-key': {
    severity: 'warning',
    says: 'The key "{found}" is given twice in one object and the last one counts; accepted is {accepted}.',
    means: 'JSON keeps one value for a key, so the earlier one is lost when the file is saved.',
  },
  'forbidden-key': {
    severity: 'error',
    says: 'The key "{found}" is not accepted; accepted is {accepted}.',
    means: 'These names belong to the language the program is written in, and no mechanism needs them.',
  },
  'not-finite': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'NaN and Infinity are no values of any quantity.',
  },
  'number-range': {
    severity: 'error',
    says: 'The number {found} is out of range; accepted is {accepted}.',
    means:
      'The number is too great or too small for the arithmetic of any computer, and would become infinite or zero.',
  },
  'not-a-document': {
    severity: 'error',
    says: 'The file holds {found}; accepted is {accepted}.',
    means: 'A mechanism file is one JSON object.',
  },
  'wrong-format': {
    severity: 'error',
    says: 'The format is {found}; accepted is {accepted}.',
    means: 'The first key says which version of the format the file is written in.',
  },
  'more-problems': {
    severity: 'note',
    says: 'Found {found}; listed are {accepted}.',
    means: 'After a thousand errors reading stops; of warnings and notes the first thousand are listed.',
  },
  'missing-key': {
    severity: 'error',
    says: 'The key "{key}" of {of} is missing; accepted is {accepted}.',
    means: 'Without it, the element is not fully described, and nothing is guessed.',
  },
  'conflicting-keys': {
    severity: 'error',
    says: 'Found {found} together in {of}; accepted is one of {accepted}.',
    means: 'These keys say the same thing in different ways.',
  },
  'unknown-key': {
    severity: 'note',
    says: 'The key {found} of {of} is not known, and kept; known is {accepted}.',
    means: 'It is kept when the file is saved, and has no effect.',
  },
  'wrong-type': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'The value is not of the sort the key takes.',
  },
  'wrong-choice': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'The key takes one of a few words.',
  },
  'too-few': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'The list is too short to mean anything.',
  },
  'quantity-syntax': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'The text could not be read as a number with a unit.',
  },
  'unknown-unit': {
    severity: 'error',
    says: 'The unit {found} is not known; accepted is {accepted}.',
    means: 'Capital and small letters matter: mm is a millimetre, Mm a million metres.',
  },
  'ambiguous-unit': {
    severity: 'error',
    says: 'The unit {found} could mean two things; accepted is {accepted}.',
    means: 'After a solidus, it is not clear how far the divisor goes (NIST SP 811, 6.1.6).',
  },
  'ambiguous-number': {
    severity: 'error',
    says: 'The number {found} could mean two things; accepted is {accepted}.',
    means: 'A comma before three digits may be a decimal mark or may group thousands.',
  },
  'wrong-dimension': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'The unit does not fit what the key describes.',
  },
  'out-of-range': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'The quantity makes no sense at that size, such as a mass of zero.',
  },
  'no-direction': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'A null vector points nowhere.',
  },
  'not-rising': {
    severity: 'error',
    says: 'Found {found}; accepted are {accepted}.',
    means: 'A curve has one value for each of its first numbers, in order.',
  },
  'wrong-id': {
    severity: 'error',
    says: 'The id {found} is not accepted; accepted are {accepted}.',
    means: 'Ids are referred to by other elements, by the command line and by scripts.',
  },
  'duplicate-id': {
    severity: 'error',
    says: 'The id {found} is already that of {first}; accepted is {accepted}.',
    means: 'Every element of a document has an id that no other element has, of whatever sort.',
  },
  'unknown-reference': {
    severity: 'error',
    says: 'Nothing has the id {found}; accepted is {accepted}.',
    means: 'The element referred to is not in the document.',
  },
  'wrong-reference': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'The element referred to is of a sort that does not fit here.',
  },
  'repeated-point': {
    severity: 'error',
    says: 'Found {found}; accepted are {accepted}.',
    means: 'Two corners of an outline, or two points of a spline, coincide.',
  },
  'self-crossing': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means:
      'The outline of a body crosses or touches itself, or encloses no area, so that inside and outside are not clear.',
  },
  'degenerate-segment': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means:
      'A segment of a track has no length, or is an arc that is all but a full circle, so that it has no direction.',
  },
  'cam-turn': {
    severity: 'error',
    says: 'The segments of the cam have {found}; accepted are {accepted}.',
    means: 'The segments of a cam make one full turn, at the end of which the follower is where it was.',
  },
  'cam-table': {
    severity: 'error',
    says: 'Found {found}; accepted are {accepted}.',
    means: 'The table of a segment gives its displacement from its own start to its own end.',
  },
  'cam-follower': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'The follower cannot ride on the base circle, so that there is no profile that gives it the motion.',
  },
  'cam-at-rest': {
    severity: 'error',
    says: 'Found {found}; accepted are {accepted}.',
    means: 'The profile of a cam depends on how it lies to its follower on the sheet, so that it is placed outright.',
  },
  'beyond-track': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'A body laid on a track lies between its ends.',
  },
  'no-area': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'Mass by density and thickness needs an outline with an area.',
  },
  'particle-turns': {
    severity: 'warning',
    says: 'A particle with {found}: it has no effect; accepted are {accepted}.',
    means: 'A particle is a point mass. It has no orientation, so nothing about turning applies.',
  },
  'empty-wildcard': {
    severity: 'warning',
    says: 'The contact between {found} stands for no pair; accepted is {accepted}.',
    means: 'No two elements that could touch fit the entry, so it has no effect.',
  },
  'impossible-contact': {
    severity: 'error',
    says: 'Found a contact of {found}; accepted are {accepted}.',
    means: 'A body cannot touch itself, tracks do not move, and a body without an outline or two points touch nothing.',
  },
  'duplicate-contact': {
    severity: 'error',
    says: 'The pair {found} is already in {first}; accepted is {accepted}.',
    means: 'Each pair is one account in the ledger and has one set of values.',
  },
  'ambiguous-contact': {
    severity: 'error',
    says: 'Two entries with "*" fit the pair {found} equally well, this and {first}, with different values; accepted is {accepted}.',
    means: 'An entry that names more of a pair outright beats one that names less; between equals nothing is guessed.',
  },
  'same-part': {
    severity: 'error',
    says: 'Found {found}; accepted are {accepted}.',
    means: 'A joint, spring or gear connects two things.',
  },
  'outside-limits': {
    severity: 'error',
    says: 'Found {found}; accepted are {accepted}.',
    means: 'Limits count from the drawn position, so that the mechanism is drawn within them.',
  },
  'rope-ends': {
    severity: 'error',
    says: 'Found {found}; accepted are {accepted}.',
    means: 'A rope is between the parts its first and last points are fixed to.',
  },
  'rope-too-short': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'A rope does not stretch, so that it cannot be drawn longer than it is.',
  },
  'no-line': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'There is no line to act along, or to cross.',
  },
  'ends-on-one-part': {
    severity: 'warning',
    says: 'Found {found}; accepted are {accepted}.',
    means: 'It never changes its length, so that it has no effect.',
  },
  'spring-index': {
    severity: 'warning',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'Outside this range the formula of EN 13906-1 does not hold well, and the spring is hard to make.',
  },
  'solid-length': {
    severity: 'error',
    says: 'Found a solid length of {found}; accepted is {accepted}.',
    means: 'A spring is shorter with all coils touching than relaxed.',
  },
  'empty-span': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'The span is empty, so that nothing happens in it.',
  },
  'no-effect': {
    severity: 'warning',
    says: 'Found {found}: it has no effect; accepted is {accepted}.',
    means: 'The key means something only beside another one.',
  },
  'two-speeds': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'One joint cannot be held at two speeds.',
  },
  'station-ring': {
    severity: 'error',
    says: 'Found {found}; accepted are {accepted}.',
    means: 'Stations that wait for each other are never reached.',
  },
  'no-contact': {
    severity: 'error',
    says: 'The pair {found} never touches; accepted is {accepted}.',
    means: 'Only listed contacts touch, so that the instant never comes.',
  },
  'no-quantity': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'What varies, or is solved for, is a quantity that the document gives.',
  },
  'unknown-material': {
    severity: 'warning',
    says: 'The material {found} is not in the table of materials; accepted is {accepted}.',
    means: 'Contacts of the element get nothing from the table.',
  },
  'duplicate-materials': {
    severity: 'error',
    says: 'The pair {found} is in the table of materials twice; accepted is {accepted}.',
    means: 'The order of the two names means nothing, so that two entries may contradict each other.',
  },
  'compliant-restitution': {
    severity: 'error',
    says: 'Found {found}; accepted are {accepted}.',
    means: 'A compliant contact gives back what its spring stores; a restitution would say the same a second time.',
  },
  'static-below-kinetic': {
    severity: 'warning',
    says: 'Found coefficients of friction {found}; accepted is {accepted}.',
    means:
      'A thing at rest holds at least as well as a sliding one. A contact with only kineticFriction has no static friction.',
  },
  'rest-without-contact': {
    severity: 'warning',
    says: 'Found {found}, which it does not touch; accepted is {accepted}.',
    means: 'Only listed contacts touch, so that the body falls through the track.',
  },
  'starts-inside': {
    severity: 'error',
    says: 'Found {found}; accepted are {accepted}.',
    means: 'Rigid things cannot be in one place. The solvers would have to throw them apart.',
  },
  'starts-behind': {
    severity: 'warning',
    says: 'Found {found}; accepted are {accepted}.',
    means: 'The body starts on the solid side of the track. If it is meant to be there, this is no matter.',
  },
  'starts-compressed': {
    severity: 'note',
    says: 'The compliant contact starts compressed: {found}.',
    means: 'Its spring holds energy from the start.',
  },
  'parts-apart': {
    severity: 'error',
    says: 'The parts do not meet at the pin: {found}; accepted is {accepted}.',
    means: 'Neither part has material where the pin is.',
  },
  'pin-off-part': {
    severity: 'warning',
    says: 'Found the pin {found}; accepted is {accepted}.',
    means: 'The part swings as on a massless arm. Particles and bodies of shape none may be pinned anywhere.',
  },
  'after-the-run': {
    severity: 'warning',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'The run ends before, so that the station is not reached.',
  },
  'not-a-touch': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'The measure is that of an impact, and only a touch has one.',
  },
  'no-bodies': {
    severity: 'warning',
    says: 'The mechanism has {found}; accepted is {accepted}.',
    means: 'Nothing can move, so that a run shows nothing.',
  },
  'too-many': {
    severity: 'error',
    says: 'Found {found}; accepted is {accepted}.',
    means: 'The outline has more corners than the solvers can follow in a sensible time.',
  },
} as const satisfies Record<string, Entry>;

export type Code = keyof typeof catalogue;
