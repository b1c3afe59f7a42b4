export * from './endpoint.js';
export * from './errors.js';
export * from './frames.js';
export * from './port.js';
export type { SolverMethods } from './solver.js';
