export { readMechanism, LARGEST_FILE, type ReadResult } from './read-mechanism.js';
export { writeDocument } from './write.js';
export { FORMAT, STANDARD_GRAVITY, documentFields, type MechanismDocument } from './document.js';
export type { AppliedDefault } from './fields/reading.js';
export type { Mechanism, RunSettings } from './model.js';
export { readQuantity, type Quantity, type QuantityResult } from './units/quantity.js';
export { displayUnit, formatQuantity, inUnit } from './units/format.js';
export { quantityKinds, type QuantityName } from './units/dimension.js';
export { documentSchema, documentSchemaText } from './json-schema.js';
