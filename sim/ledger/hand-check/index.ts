export { speedByHand, type HandCheck } from './check.js';
export { handCheck } from './hand-check.js';
export { plainText, type Expression, type Operator, type Token } from './tokens.js';
