import type { Terminal } from '../../../main/cli/terminal.js';

/** A terminal that keeps what was written to it. */
export interface RecordedTerminal extends Terminal {
  written: { out: string; err: string };
}

export function recordedTerminal(input: Uint8Array | string = '', watched = false): RecordedTerminal {
  const written = { out: '', err: '' };
  return {
    written,
    out: (text) => (written.out += text),
    err: (text) => (written.err += text),
    // eslint-disable-next-line @typescript-eslint/require-await -- the bytes are at hand
    stdin: async function* () {
      yield Buffer.from(input);
    },
    watched,
  };
}
