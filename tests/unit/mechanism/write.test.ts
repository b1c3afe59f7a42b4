import { describe, expect, it } from 'vitest';
import { readMechanism, writeDocument, type MechanismDocument } from '../../../sim/mechanism/index.js';
import { migrate } from '../../../sim/mechanism/migrate.js';
import { fieldAt } from '../../../sim/mechanism/fields/lookup.js';
import { documentFields } from '../../../sim/mechanism/document.js';
import type { JsonObject } from '../../../sim/mechanism/json/value.js';
import { full } from './full.js';
import { ramp } from './samples.js';

describe('Writing a document', () => {
  it('puts keys in the order of the contract, unknown ones last, and short things on one line', () => {
    const typed: JsonObject = {
      zebra: { b: 1, a: 2 },
      run: { atMost: '5 s', until: '3 s' },
      bodies: [
        {
          mass: '2 kg',
          colour: 'red',
          at: ['3,5 mm', 0],
          shape: { radius: '1 1/2 in', kind: 'disc' },
          name: 'A disc with a name that makes its element longer than one line of text',
          id: 'disc',
        },
      ],
      format: 'joulewright/1',
    };
    expect(writeDocument(typed as MechanismDocument)).toBe(
      [
        '{',
        '  "format": "joulewright/1",',
        '  "bodies": [',
        '    {',
        '      "id": "disc",',
        '      "name": "A disc with a name that makes its element longer than one line of text",',
        '      "shape": { "kind": "disc", "radius": "1 1/2 in" },',
        '      "mass": "2 kg",',
        '      "at": ["3,5 mm", 0],',
        '      "colour": "red"',
        '    }',
        '  ],',
        '  "run": { "until": "3 s", "atMost": "5 s" },',
        '  "zebra": { "a": 2, "b": 1 }',
        '}',
        '',
      ].join('\n'),
    );
  });

  it('keeps units as typed', () => {
    const { document } = readMechanism(JSON.stringify(full()));
    expect(document && writeDocument(document)).toContain('"rate": "0.5 lbf/in"');
  });

  it('writes a document with errors too', () => {
    const { document, mechanism } = readMechanism('{"format": "joulewright/1", "bodies": 7, "run": []}');
    expect(mechanism).toBeNull();
    expect(document && JSON.parse(writeDocument(document))).toEqual({ format: 'joulewright/1', bodies: 7, run: [] });
  });
});

describe('Migration', () => {
  const steps = {
    'joulewright/0': (tree: JsonObject): JsonObject => ({ ...tree, format: 'joulewright/1', title: 'Was 0' }),
    'joulewright/00': (tree: JsonObject): JsonObject => ({ ...tree, format: 'joulewright/0' }),
  };

  it('leaves a document of this version alone', () => {
    const document = ramp();
    expect(migrate(document)).toBe(document);
  });

  it('takes an older one through every version since', () => {
    expect(migrate({ format: 'joulewright/00' }, steps)).toEqual({ format: 'joulewright/1', title: 'Was 0' });
  });

  it('knows no other', () => {
    expect(migrate({ format: 'joulewright/9' }, steps)).toBeUndefined();
    expect(migrate({ format: 'toString' }, steps)).toBeUndefined();
    expect(migrate({ format: 1 }, steps)).toBeUndefined();
    expect(migrate({ format: 'loop' }, { loop: (tree) => tree })).toBeUndefined();
  });
});

describe('Looking up what a JSON pointer leads to', () => {
  const kindAt = (pointer: string): string | undefined => {
    const spec = fieldAt(documentFields, full(), pointer, null);
    return spec?.type === 'quantity' ? spec.kind : spec?.type;
  };

  it('goes through lists, tags, options and pairs', () => {
    expect(kindAt('/bodies/0/mass')).toBe('mass');
    expect(kindAt('/bodies/0/shape/width')).toBe('length');
    expect(kindAt('/springs/0/wire/shearModulus')).toBe('stress');
    expect(kindAt('/tracks/0/from/1')).toBe('length');
    expect(kindAt('/tracks/0/to/1/bulge')).toBe('number');
    expect(kindAt('/materials/steel/nylon/restitution')).toBe('number');
    expect(kindAt('/joints/0/limits/from')).toBe('angle');
    expect(kindAt('/loads/0/force/0')).toBe('force');
    expect(kindAt('/springs/0')).toBe('record');
  });

  it('ends where the contract knows nothing', () => {
    expect(kindAt('/bodies/0/colour')).toBeUndefined();
    expect(kindAt('/bodies/99/mass')).toBeUndefined();
    expect(kindAt('/title/length')).toBeUndefined();
  });
});
