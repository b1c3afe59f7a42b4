import { optional, record, text, type Read } from '../fields/spec.js';

/** Field table of the title block. */
export const sheetFields = record('a title block', {
  drawingNumber: optional(text, 'Drawing number.'),
  revision: optional(text, 'Revision.'),
  owner: optional(text, 'Owner of the drawing.'),
  date: optional(text, 'Date, as it shall be printed.'),
  drawnBy: optional(text, 'Who drew it.'),
  checkedBy: optional(text, 'Who checked it.'),
  approvedBy: optional(text, 'Who approved it.'),
  scale: optional(text, 'Scale, as it shall be printed.'),
});

export type Sheet = Read<typeof sheetFields>;
