/** Colour tokens of the sheet; fills are the Okabe–Ito set and are always edged in ink. */
export const tones = [
  'paper', 'surround', 'chart', 'active', 'ink', 'second', 'control', 'hair', 'marker',
  'gravity', 'motion', 'spring', 'friction', 'impact', 'damper',
] as const; // prettier-ignore
export type Tone = (typeof tones)[number];
export type Palette = Readonly<Record<Tone, string>>;
export type Theme = 'light' | 'dark';

const light: Palette = {
  paper: '#F7F4EC',
  surround: '#E3DFD3',
  chart: '#FBF8F0',
  active: '#FFFDF8',
  ink: '#1F201D',
  second: '#50514A',
  control: '#6E6D65',
  hair: '#CFCABC',
  marker: '#F0E442',
  gravity: '#0072B2',
  motion: '#E69F00',
  spring: '#009E73',
  friction: '#D55E00',
  impact: '#CC79A7',
  damper: '#F0E442',
};

const dark: Palette = {
  ...light,
  paper: '#1E1F20',
  surround: '#141516',
  chart: '#232425',
  active: '#292A2B',
  ink: '#ECE9E1',
  second: '#BBB8AF',
  control: '#8F8D86',
  hair: '#434345',
  gravity: '#56B4E9',
};

export const palettes: Readonly<Record<Theme, Palette>> = { light, dark };

/** Share of the checker's marker over the paper. */
export const markerTint: Readonly<Record<Theme, number>> = { light: 0.62, dark: 0.26 };

type Channels = [red: number, green: number, blue: number];

function channels(colour: string): Channels {
  return [1, 3, 5].map((i) => parseInt(colour.slice(i, i + 2), 16)) as Channels;
}

/** `over` laid on `under` with the share `tint`, as #RRGGBB. */
export function blend(over: string, under: string, tint: number): string {
  const [a, b] = [channels(over), channels(under)];
  const mixed = a.map((value, i) => Math.round(value * tint + b[i] * (1 - tint)));
  return `#${mixed.map((value) => value.toString(16).padStart(2, '0')).join('')}`.toUpperCase();
}

/** Relative luminance (WCAG 2.2, "relative luminance"). */
function luminance(colour: string): number {
  const linear = channels(colour).map((value) => {
    const v = value / 255;
    return v <= 0.04045 ? v / 12.92 : ((v + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * linear[0] + 0.7152 * linear[1] + 0.0722 * linear[2];
}

/** Contrast ratio of two colours, 1 to 21 (WCAG 2.2, success criterion 1.4.3). */
export function contrast(a: string, b: string): number {
  const [high, low] = [luminance(a), luminance(b)].sort((p, q) => q - p);
  return (high + 0.05) / (low + 0.05);
}
