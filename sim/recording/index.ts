export * from './layout.js';
export * from './reader.js';
export type * from './recording.js';
export * from './writer.js';
