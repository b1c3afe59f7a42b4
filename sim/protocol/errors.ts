/** A message that doesn't fit the protocol, or an answer from the other side that it failed. */
export class ProtocolError extends Error {
  override readonly name = 'ProtocolError';

  constructor(
    readonly code: ProtocolErrorCode,
    message: string,
  ) {
    super(message);
  }
}

/**
 * - `bad-message`: what came in is no message of this protocol
 * - `unknown-method`: a request names a method the server does not have
 * - `failed`: the method threw; the text is its own
 * - `crashed`: the other side is gone
 */
export type ProtocolErrorCode = 'bad-message' | 'unknown-method' | 'failed' | 'crashed';

/** The request was cancelled by whoever made it. */
export class CancelledError extends Error {
  override readonly name = 'CancelledError';

  constructor() {
    super('The request was cancelled.');
  }
}
