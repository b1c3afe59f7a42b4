import type { ProtocolErrorCode } from './errors.js';

/** What a set of methods is: for each name what goes in, what comes along the way, and what comes out. */
export type Methods = Record<string, { payload: unknown; progress: unknown; result: unknown }>;

/** From the client to the server. */
export type ClientMessage =
  | { type: 'request'; id: number; method: string; payload: unknown }
  | { type: 'cancel'; id: number }
  /** The client has taken this many progress messages and can take as many more. */
  | { type: 'credit'; id: number; count: number };

export interface WireError {
  code: ProtocolErrorCode;
  message: string;
}

/** From the server to the client; `done`, `failed` and `cancelled` end a request. */
export type ServerMessage =
  | { type: 'progress'; id: number; progress: unknown }
  | { type: 'done'; id: number; result: unknown }
  | { type: 'failed'; id: number; error: WireError }
  | { type: 'cancelled'; id: number };
