import { fixed } from '../format/quantity.js';

/** "2.6153 against 2.6158": both to the decimals that give the greater five figures; a dash where a run has none. */
export function bothFigures(values: readonly (number | null)[]): string {
  const most = Math.max(...values.map((value) => Math.abs(value ?? 0)));
  const decimals = most > 0 ? Math.min(9, Math.max(0, 4 - Math.floor(Math.log10(most)))) : 4;
  return against(values, decimals);
}

export function against(values: readonly (number | null)[], decimals: number): string {
  return values.map((value) => (value === null ? '–' : fixed(value, decimals))).join(' against ');
}
