export type JsonValue = null | boolean | number | string | JsonValue[] | JsonObject;
export interface JsonObject {
  [key: string]: JsonValue;
}

export const isObject = (value: JsonValue | undefined): value is JsonObject =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

/** The object's own value under a key; never an inherited one such as `toString`. */
export const own = (object: JsonObject, key: string): JsonValue | undefined =>
  Object.hasOwn(object, key) ? object[key] : undefined;

/** One step further in a JSON pointer (RFC 6901). */
export const step = (pointer: string, key: string | number): string =>
  `${pointer}/${String(key).replace(/~/g, '~0').replace(/\//g, '~1')}`;

/** The keys of a JSON pointer, unescaped. */
export const pointerKeys = (pointer: string): string[] =>
  pointer
    .split('/')
    .slice(1)
    .map((key) => key.replace(/~1/g, '/').replace(/~0/g, '~'));

/** The value a JSON pointer leads to; undefined where there is none. */
export function valueAt(root: JsonValue, pointer: string): JsonValue | undefined {
  let value: JsonValue | undefined = root;
  for (const key of pointerKeys(pointer)) {
    if (Array.isArray(value)) value = /^(0|[1-9]\d*)$/.test(key) ? value[Number(key)] : undefined;
    else value = isObject(value) ? own(value, key) : undefined;
  }
  return value;
}

/** What kind of value was found, for messages: "the text "abc"", "a list of 3", "nothing". */
export function describe(value: JsonValue | undefined): string {
  if (value === undefined) return 'nothing';
  if (value === null) return 'null';
  if (Array.isArray(value)) return `a list of ${value.length}`;
  if (typeof value === 'object') {
    const keys = Object.keys(value);
    return keys.length === 0 ? 'an empty object' : `an object with ${keys.slice(0, 4).join(', ')}`;
  }
  if (typeof value === 'string') return `"${value.length > 60 ? `${value.slice(0, 57)}…` : value}"`;
  return String(value);
}
