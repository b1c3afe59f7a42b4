import { problem, type Problem } from '../core/problem.js';
import { documentFields, FORMAT, type MechanismDocument } from './document.js';
import { collectIds } from './fields/ids.js';
import { readRecord } from './fields/read-record.js';
import { Reading, TooManyErrors, type AppliedDefault } from './fields/reading.js';
import { parseJson } from './json/parse.js';
import { describe, isObject, own, type JsonObject } from './json/value.js';
import { migrate } from './migrate.js';
import type { Mechanism } from './model.js';
import { resolveMechanism } from './resolve/mechanism.js';

/** What reading a mechanism file gives. */
export interface ReadResult {
  /** The document as typed; null where the text is no document of a known version. */
  document: MechanismDocument | null;
  /** What it means, in SI; null where there is an error. */
  mechanism: Mechanism | null;
  problems: Problem[];
  defaults: AppliedDefault[];
}

/** A file of this size or more is refused [byte]. */
export const LARGEST_FILE = 50_000_000;

/**
 * Reads a mechanism file: JSON, version, every key by its field table, then what the elements mean together. All that is
 * wrong is told at once, each with its code, place, what was found and what is accepted.
 *
 * @param options.fileSize size of the file in bytes, where the caller knows it; the text need not be read then
 */
export function readMechanism(text: string, options: { fileSize?: number } = {}): ReadResult {
  const size = Math.max(options.fileSize ?? 0, text.length);
  if (size >= LARGEST_FILE) {
    const values = { found: `${(size / 1e6).toFixed(1)} MB`, accepted: `less than ${LARGEST_FILE / 1e6} MB` };
    return refused([problem('file-too-large', { pointer: '', of: [] }, values)]);
  }
  const { value, problems } = parseJson(text);
  if (value === undefined) return refused(problems);
  if (!isObject(value)) {
    const values = { found: describe(value), accepted: 'one object' };
    return refused([...problems, problem('not-a-document', { pointer: '', of: [] }, values)]);
  }
  const tree = migrate(value);
  return tree ? readTree(tree as MechanismDocument, problems) : refused([...problems, wrongFormat(value)]);
}

const refused = (problems: Problem[]): ReadResult => ({ document: null, mechanism: null, problems, defaults: [] });

function wrongFormat(tree: JsonObject): Problem {
  const format = own(tree, 'format');
  const found = format === undefined ? 'missing' : describe(format);
  return problem('wrong-format', { pointer: '/format', of: [] }, { found, accepted: `"${FORMAT}"` });
}

function readTree(tree: MechanismDocument, found: Problem[]): ReadResult {
  const { ids, problems } = collectIds(tree);
  const reading = new Reading(ids);
  const mechanism = untilTooMany(() => {
    for (const each of [...found, ...problems]) reading.add(each);
    const { draft } = readRecord(documentFields, tree, { pointer: '', of: [] }, reading);
    return resolveMechanism(draft, tree, reading);
  });
  reading.finish();
  return {
    document: tree,
    mechanism: reading.errorCount === 0 ? mechanism : null,
    problems: reading.problems,
    defaults: reading.defaults,
  };
}

/** What `read` gives; null where it gave up. */
function untilTooMany(read: () => Mechanism): Mechanism | null {
  try {
    return read();
  } catch (error) {
    if (error instanceof TooManyErrors) return null;
    throw error;
  }
}
