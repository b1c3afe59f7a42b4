import { suggest } from '../../core/suggest.js';
import { step } from '../json/value.js';
import { placeOf, type Checked } from './checked.js';

/** A name that the table of materials does not have, and a pair it has twice. */
export function checkMaterials(checked: Checked): void {
  const { mechanism, draft, reading } = checked;
  const table = draft.materials;
  if (!table) return;
  const names = new Set(Object.entries(table).flatMap(([name, row]) => [name, ...Object.keys(row)]));
  for (const { id, material } of [...mechanism.bodies, ...mechanism.tracks]) {
    if (material === undefined || names.has(material)) continue;
    const near = suggest(material, names);
    const accepted = `a name of the table${near ? `; did you mean "${near}"?` : ''}`;
    reading.report('unknown-material', placeOf(checked, id, 'material'), { found: `"${material}"`, accepted });
  }
  const seen = new Set<string>();
  for (const [a, row] of Object.entries(table)) {
    for (const b of Object.keys(row)) {
      const pair = JSON.stringify([a, b].sort());
      const place = { pointer: step(step('/materials', a), b), of: [] };
      const values = { found: `${a} on ${b}`, accepted: 'one entry in either order' };
      if (seen.has(pair)) reading.report('duplicate-materials', place, values);
      seen.add(pair);
    }
  }
}
