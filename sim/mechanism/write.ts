import { documentFields, type MechanismDocument } from './document.js';
import { inOrder } from './fields/order.js';
import { layOut } from './json/layout.js';

/** The document as canonical JSON: keys in the order of the contract, then unknown ones as they came; units as typed. */
export function writeDocument(document: MechanismDocument): string {
  return `${layOut(inOrder(documentFields, document))}\n`;
}
