import { problem, type Problem } from '../../core/problem.js';
import { step, type JsonObject, type JsonValue } from './value.js';

/** Deeper nesting than any document needs is refused, so that no later pass can run out of stack. */
export const DEEPEST = 100;

/** Keys that name parts of every JavaScript object; a document has no use for them. */
const forbiddenKeys = new Set(['__proto__', 'constructor', 'prototype']);

export interface ParsedJson {
  /** Undefined where the text is no JSON. */
  value: JsonValue | undefined;
  problems: Problem[];
}

/**
 * Reads JSON (RFC 8259) without recursion. What `JSON.parse` passes over in silence is a problem with its pointer:
 * a key given twice, a number no double holds (1e400), a key such as `__proto__`, nesting deeper than `DEEPEST`.
 */
export function parseJson(text: string): ParsedJson {
  return new JsonReader(text).read();
}

/** What is noted without ending the reading. */
type NotedCode = 'not-finite' | 'number-range' | 'forbidden-key' | 'duplicate-key';

interface Frame {
  list: JsonValue[] | null;
  object: JsonObject | null;
  key: string;
}

/** Ends the reading of one text; its problem is already noted. */
class Unreadable extends Error {}

const literals: [string, JsonValue][] = [
  ['true', true],
  ['false', false],
  ['null', null],
];
const numberAt = /-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?/y;
const nonFiniteAt = /[+-]?(?:NaN|Infinity)\b/y;

class JsonReader {
  private at = 0;
  private readonly stack: Frame[] = [];
  private readonly problems: Problem[] = [];

  constructor(private readonly text: string) {
    if (text.startsWith('\uFEFF')) this.at = 1;
  }

  read(): ParsedJson {
    try {
      const value = this.document();
      return { value, problems: this.problems };
    } catch (error) {
      if (error instanceof Unreadable) return { value: undefined, problems: this.problems };
      throw error;
    }
  }

  /** One turn of the loop reads one value, puts it in place and closes what ends with it. */
  private document(): JsonValue {
    for (;;) {
      let value = this.startValue();
      if (value === undefined) continue;
      for (;;) {
        const frame = this.stack.at(-1);
        if (!frame) return this.finish(value);
        this.place(frame, value);
        if (this.continues(frame)) break;
        value = this.close();
      }
    }
  }

  /** A scalar or an empty container; undefined where a container was opened and its first value comes next. */
  private startValue(): JsonValue | undefined {
    const c = this.peek();
    if (c === '{' || c === '[') return this.open(c);
    if (c === '"') return this.string();
    for (const [word, value] of literals) {
      if (this.text.startsWith(word, this.at)) {
        this.at += word.length;
        return value;
      }
    }
    return this.number();
  }

  private open(bracket: '{' | '['): JsonValue | undefined {
    if (this.stack.length >= DEEPEST) this.fail('json-depth');
    this.at += 1;
    const frame: Frame = bracket === '{' ? { list: null, object: {}, key: '' } : { list: [], object: null, key: '0' };
    if (this.peek() === (frame.object ? '}' : ']')) {
      this.at += 1;
      return frame.object ?? frame.list ?? undefined;
    }
    this.stack.push(frame);
    if (frame.object) this.readKey(frame);
    return undefined;
  }

  private readKey(frame: Frame): void {
    if (this.peek() !== '"') this.syntax('a key in double quotes');
    frame.key = this.string();
    if (this.peek() !== ':') this.syntax('a colon after the key');
    this.at += 1;
  }

  private place(frame: Frame, value: JsonValue): void {
    if (frame.list) {
      frame.list.push(value);
      return;
    }
    if (!frame.object) return;
    if (forbiddenKeys.has(frame.key)) {
      this.note('forbidden-key', frame.key, 'any key but __proto__, constructor and prototype');
      return;
    }
    if (Object.hasOwn(frame.object, frame.key)) this.note('duplicate-key', frame.key, 'each key once');
    frame.object[frame.key] = value;
  }

  /** After a value: true where another follows in the same container. */
  private continues(frame: Frame): boolean {
    const c = this.peek();
    if (c === ',') {
      this.at += 1;
      if (frame.object) this.readKey(frame);
      else frame.key = String(frame.list?.length ?? 0);
      return true;
    }
    if (c !== (frame.object ? '}' : ']')) this.syntax(frame.object ? 'a comma or }' : 'a comma or ]');
    this.at += 1;
    return false;
  }

  private close(): JsonValue {
    const frame = this.stack.pop();
    return frame?.object ?? frame?.list ?? null;
  }

  private finish(value: JsonValue): JsonValue {
    if (this.peek() !== '') this.syntax('nothing after the document');
    return value;
  }

  private string(): string {
    const from = this.at;
    let end = from + 1;
    while (this.text[end] !== '"') {
      if (end >= this.text.length) this.syntax('a closing quote');
      end += this.text[end] === '\\' ? 2 : 1;
    }
    this.at = end + 1;
    try {
      return JSON.parse(this.text.slice(from, this.at)) as string;
    } catch {
      this.at = from;
      return this.syntax('a text without line breaks, and \\ only before " \\ / b f n r t or u');
    }
  }

  private number(): number | null {
    nonFiniteAt.lastIndex = this.at;
    const word = nonFiniteAt.exec(this.text)?.[0];
    if (word) {
      this.at = nonFiniteAt.lastIndex;
      this.note('not-finite', word, 'a finite number');
      return null;
    }
    numberAt.lastIndex = this.at;
    const digits = numberAt.exec(this.text)?.[0];
    if (!digits) return this.syntax('a value: a text in double quotes, a number, {, [, true, false or null');
    this.at = numberAt.lastIndex;
    const value = Number(digits);
    const isLost = !Number.isFinite(value) || (value === 0 && /[1-9]/.test(digits.split(/e/i)[0]));
    if (!isLost) return value;
    this.note('number-range', digits.slice(0, 40), 'a size between 5e-324 and 1.8e308');
    return null;
  }

  /** The next character that is no white space, without taking it; '' at the end. */
  private peek(): string {
    let c = this.text[this.at];
    while (c === ' ' || c === '\n' || c === '\t' || c === '\r') c = this.text[(this.at += 1)];
    return c ?? '';
  }

  private pointer(): string {
    return this.stack.reduce((pointer, frame) => step(pointer, frame.key), '');
  }

  private note(code: NotedCode, found: string, accepted: string): void {
    this.problems.push(problem(code, { pointer: this.pointer(), of: [] }, { found, accepted }));
  }

  private fail(code: 'json-depth'): never {
    const values = { found: `more than ${DEEPEST} levels`, accepted: `at most ${DEEPEST}` };
    this.problems.push(problem(code, { pointer: this.pointer(), of: [] }, values));
    throw new Unreadable();
  }

  private syntax(accepted: string): never {
    const before = this.text.slice(0, this.at).split('\n');
    const found = this.at >= this.text.length ? 'the end of the file' : `"${this.text.slice(this.at, this.at + 12)}"`;
    const values = { found, line: before.length, column: (before.at(-1)?.length ?? 0) + 1, accepted };
    this.problems.push(problem('json-syntax', { pointer: this.pointer(), of: [] }, values));
    throw new Unreadable();
  }
}
