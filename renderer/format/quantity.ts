/** A number with its unit, as two texts: the unit is set smaller. */
export interface Shown {
  value: string;
  unit: string;
}

/** Fixed decimals with a true minus; −0 is 0. */
export function fixed(value: number, decimals: number): string {
  const text = Math.abs(value).toFixed(decimals);
  return value < 0 && Number(text) !== 0 ? `−${text}` : text;
}

/** Up to `digits` significant figures without trailing zeros, never in powers of ten between 1e-4 and 1e7. */
export function figures(value: number, digits = 4): string {
  if (value === 0 || !Number.isFinite(value)) return value === 0 ? '0' : '–';
  const size = Math.floor(Math.log10(Math.abs(value)));
  if (size < -4 || size > 6)
    return value
      .toExponential(digits - 1)
      .replace('-', '−')
      .replace('e', ' × 10^');
  const rounded = Number(value.toPrecision(digits));
  return fixed(rounded, Math.max(0, digits - 1 - size))
    .replace(/(\.\d*?)0+$/, '$1')
    .replace(/\.$/, '');
}

/** Lengths on the sheet are in millimetres up to ten metres of extent, in metres beyond. */
export function lengthUnit(extent: number): { unit: 'mm' | 'm'; metres: number } {
  return extent < 10 ? { unit: 'mm', metres: 1e-3 } : { unit: 'm', metres: 1 };
}

export const millimetres = (metres: number): Shown => ({ value: figures(metres * 1e3), unit: 'mm' });
export const degrees = (radians: number): Shown => ({ value: figures((radians * 180) / Math.PI), unit: '°' });

/** Energy in the unit that keeps its figure between 1 and 1000. */
export function energy(joules: number, scale = energyScale(joules)): Shown {
  return { value: fixed(joules / scale.joules, 3), unit: scale.unit };
}

export function energyScale(joules: number): { unit: string; joules: number } {
  const size = Math.abs(joules);
  if (size >= 1e3) return { unit: 'kJ', joules: 1e3 };
  if (size >= 1 || size === 0) return { unit: 'J', joules: 1 };
  return size >= 1e-3 ? { unit: 'mJ', joules: 1e-3 } : { unit: 'µJ', joules: 1e-6 };
}
