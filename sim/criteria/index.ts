export { evaluateCriteria } from './evaluate.js';
export type * from './result.js';
