import { describe, expect, it } from 'vitest';
import { blend, contrast, markerTint, palettes } from '../../../sim/drawing/palette.js';
import { patternFill, patternNames, patternOf, patterns } from '../../../sim/drawing/patterns.js';
import type { AccountName } from '../../../sim/recording/recording.js';

describe.each(['light', 'dark'] as const)('the %s palette', (theme) => {
  const palette = palettes[theme];
  const grounds = ['paper', 'chart', 'surround', 'active'] as const;

  it('sets ink and second ink 4.5 : 1 and more off every ground (WCAG 2.2 AA)', () => {
    for (const ground of grounds) {
      expect(contrast(palette.ink, palette[ground])).toBeGreaterThanOrEqual(7);
      expect(contrast(palette.second, palette[ground])).toBeGreaterThanOrEqual(4.5);
    }
  });

  it('sets control lines 3 : 1 off the paper, and text on a marked row 4.5 : 1', () => {
    expect(contrast(palette.control, palette.paper)).toBeGreaterThanOrEqual(3);
    const marked = blend(palette.marker, palette.paper, markerTint[theme]);
    expect(contrast(palette.ink, marked)).toBeGreaterThanOrEqual(4.5);
  });

  it('has the ratios that were measured when it was chosen', () => {
    const expected = theme === 'light' ? [14.9, 7.3, 4.7] : [13.6, 8.3, 5.0];
    const tones = ['ink', 'second', 'control'] as const;
    tones.forEach((tone, i) => expect(contrast(palette[tone], palette.paper)).toBeCloseTo(expected[i], 0));
  });
});

describe('patterns', () => {
  const accounts: AccountName[] = ['gravity', 'spring', 'friction', 'reaction', 'damper', 'load', 'drive', 'joint-friction', 'rolling-resistance', 'impact', 'rope', 'numerical']; // prettier-ignore

  it('give every account a look, and neighbouring friction accounts two different ones', () => {
    for (const account of accounts) expect(patternNames).toContain(patternOf(account));
    expect(patternOf('friction', 0)).not.toBe(patternOf('friction', 1));
  });

  it('differ in more than colour: no two have the same lines and marks', () => {
    const looks = patternNames.map((name) => JSON.stringify([patterns[name].lines, patterns[name].mark ?? null, patterns[name].width])); // prettier-ignore
    expect(new Set(looks).size).toBe(patternNames.length);
  });

  it('fill a polygon over paper and edge it in ink', () => {
    const operations = patternFill([[0, 0], [40, 0], [40, 20], [0, 20]], 'friction'); // prettier-ignore
    const last = operations[operations.length - 1];
    expect(operations[0]).toMatchObject({ kind: 'line', fill: { tone: 'paper' } });
    expect(last).toMatchObject({ kind: 'line', closed: true, stroke: { tone: 'ink' } });
    expect(operations.some((each) => each.kind === 'segments' && each.ends.length > 0)).toBe(true);
  });

  it('blend by share, end to end', () => {
    expect(blend('#FF0000', '#0000FF', 1)).toBe('#FF0000');
    expect(blend('#FF0000', '#0000FF', 0)).toBe('#0000FF');
    expect(contrast('#000000', '#FFFFFF')).toBeCloseTo(21, 9);
  });
});
