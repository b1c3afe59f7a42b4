export { checkResult } from './check-result.js';
export type { Audit, CheckInput } from './check-result.js';
export { checkText } from './check-text.js';
export type { TextOptions } from './check-text.js';
export { exitStatus } from './exit-status.js';
export { resultSchemaText } from './json-schema.js';
export type { ExitStatus } from './exit-status.js';
export type * from './result.js';
