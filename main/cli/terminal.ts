/** What a command may touch of the world around it; the tests hand in their own. */
export interface Terminal {
  /** Standard output: the answer, nothing else. */
  out(text: string): void;
  /** Standard error: messages and progress. */
  err(text: string): void;
  /** The bytes of standard input. */
  stdin(): AsyncIterable<Uint8Array>;
  /** Whether somebody watches standard error, so that a line of progress may be written over. */
  watched: boolean;
  /** Columns of standard output, where it is a screen. */
  width?: number;
}
