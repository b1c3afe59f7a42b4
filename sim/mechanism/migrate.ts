import { FORMAT } from './document.js';
import { own, type JsonObject } from './json/value.js';

/** Opens a document of one older version as the next one. */
export type Migration = (tree: JsonObject) => JsonObject;

/** From each older version to the one after it. Version 1 is the first, so there is none yet. */
export const migrations: Readonly<Record<string, Migration>> = {};

/**
 * The document in the newest version of the format; undefined where its version is not known.
 *
 * @param steps migrations by the version they start from
 */
export function migrate(
  tree: JsonObject,
  steps: Readonly<Record<string, Migration>> = migrations,
): JsonObject | undefined {
  let now = tree;
  for (let left = Object.keys(steps).length; left >= 0; left -= 1) {
    const format = own(now, 'format');
    if (format === FORMAT) return now;
    if (typeof format !== 'string' || !Object.hasOwn(steps, format)) return undefined;
    now = steps[format](now);
  }
  return undefined;
}
