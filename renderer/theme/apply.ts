import { blend, markerTint, palettes, tones, type Palette, type Theme } from '../../sim/drawing/palette.js';

/** Colours of a theme as the canvas takes them: the tones, and the marker as it looks on paper. */
export interface Colours extends Palette {
  marked: string;
}

export function coloursOf(theme: Theme): Colours {
  const palette = palettes[theme];
  return { ...palette, marked: blend(palette.marker, palette.paper, markerTint[theme]) };
}

/** Puts a theme's tokens on the document, so that the style sheets and the canvases share one table. */
export function applyTheme(theme: Theme, root: HTMLElement = document.documentElement): void {
  const colours = coloursOf(theme);
  for (const tone of tones) root.style.setProperty(`--${tone}`, colours[tone]);
  root.style.setProperty('--marked', colours.marked);
  root.style.setProperty('color-scheme', theme);
  root.dataset.theme = theme;
}
