import type { JsonValue } from './value.js';

/** A line is no longer than this where it can be helped. */
const WIDTH = 120;

/** JSON for people: what fits on a line is on one line, what does not is one item a line, two spaces deeper. */
export function layOut(value: JsonValue, indent = '', used = 0): string {
  const flat = onOneLine(value, WIDTH - indent.length - used);
  if (flat !== undefined) return flat;
  const deeper = `${indent}  `;
  if (Array.isArray(value)) {
    return `[\n${value.map((item) => deeper + layOut(item, deeper, 1)).join(',\n')}\n${indent}]`;
  }
  if (typeof value !== 'object' || value === null) return JSON.stringify(value);
  const lines = Object.entries(value).map(([key, item]) => {
    const name = `${JSON.stringify(key)}: `;
    return deeper + name + layOut(item, deeper, name.length + 1);
  });
  return `{\n${lines.join(',\n')}\n${indent}}`;
}

/** The value on one line of at most `room` characters; undefined where it does not fit. A document never does. */
function onOneLine(value: JsonValue, room: number): string | undefined {
  if (typeof value !== 'object' || value === null) return JSON.stringify(value);
  const parts: string[] = [];
  let length = Array.isArray(value) ? 2 : 4;
  const items = Array.isArray(value) ? value.map((item) => ['', item] as const) : Object.entries(value);
  for (const [key, item] of items) {
    const name = Array.isArray(value) ? '' : `${JSON.stringify(key)}: `;
    const part = onOneLine(item, room - length - name.length);
    if (part === undefined) return undefined;
    length += name.length + part.length + (parts.length > 0 ? 2 : 0);
    if (length > room) return undefined;
    parts.push(name + part);
  }
  if (Array.isArray(value)) return `[${parts.join(', ')}]`;
  return parts.length === 0 ? '{}' : `{ ${parts.join(', ')} }`;
}
