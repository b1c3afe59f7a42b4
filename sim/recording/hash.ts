import type { Recording } from './recording.js';

/**
 * A hash of everything a run recorded: every bit of every number, the layout, the events, the findings and the end. Two
 * runs of one document with one step have the same hash, in Node, in a window and in a worker, or they are not the same
 * run. 64 bits as 16 hexadecimal digits; it finds differences, it does not resist forgery.
 */
export function hashRecording(recording: Recording): string {
  const hash = new Hash64();
  const { solver, layout, rows, rowCount, events, findings, end, step } = recording;
  hash.text(JSON.stringify({ solver, layout, rowCount, events, findings, end, step }));
  hash.numbers(rows.subarray(0, rowCount * layout.width));
  return hash.digits();
}

/**
 * Two 32-bit lanes of multiply–rotate mixing with the constants of MurmurHash3 (Appleby, public domain), started apart
 * so that they do not run alike.
 */
class Hash64 {
  private a = 0x9e3779b9;
  private b = 0x7f4a7c15;

  text(text: string): void {
    for (let i = 0; i < text.length; i++) this.word(text.charCodeAt(i));
  }

  numbers(values: Float64Array): void {
    const view = new DataView(values.buffer, values.byteOffset, values.byteLength);
    for (let offset = 0; offset < values.byteLength; offset += 8) {
      // One quiet NaN stands for all: the language leaves its bits open.
      const isNaN = Number.isNaN(values[offset >> 3]);
      this.word(isNaN ? 0x7ff80000 : view.getInt32(offset + (LITTLE_ENDIAN ? 4 : 0), LITTLE_ENDIAN));
      this.word(isNaN ? 0 : view.getInt32(offset + (LITTLE_ENDIAN ? 0 : 4), LITTLE_ENDIAN));
    }
  }

  digits(): string {
    return [finalMix(this.a ^ rotate(this.b, 7)), finalMix(this.b ^ rotate(this.a, 19))]
      .map((lane) => (lane >>> 0).toString(16).padStart(8, '0'))
      .join('');
  }

  private word(value: number): void {
    const mixed = Math.imul(rotate(Math.imul(value, 0xcc9e2d51), 15), 0x1b873593);
    this.a = (Math.imul(rotate(this.a ^ mixed, 13), 5) + 0xe6546b64) | 0;
    this.b = (Math.imul(rotate(this.b ^ rotate(mixed, 11), 17), 9) + 0x38495ab5) | 0;
  }
}

/** The byte order of this machine, which is that of a `Float64Array`. */
const LITTLE_ENDIAN = new Uint8Array(new Uint32Array([1]).buffer)[0] === 1;

function rotate(value: number, by: number): number {
  return (value << by) | (value >>> (32 - by));
}

function finalMix(value: number): number {
  let mixed = Math.imul(value ^ (value >>> 16), 0x85ebca6b);
  mixed = Math.imul(mixed ^ (mixed >>> 13), 0xc2b2ae35);
  return mixed ^ (mixed >>> 16);
}
