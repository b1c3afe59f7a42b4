export * from './hash.js';
export * from './layout.js';
export * from './reader.js';
export type * from './recording.js';
export * from './serialize.js';
export * from './writer.js';
