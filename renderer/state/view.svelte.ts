import type { Theme } from '../../sim/drawing/palette.js';
import { frameGeometry } from '../frame/geometry.js';

export type SheetNumber = 1 | 2;
export type ThemeChoice = Theme | 'system';

export const tracings = ['trail', 'forces', 'lossMap', 'balloons'] as const;
export type Tracing = (typeof tracings)[number];

const themeKey = 'theme';

/** What is shown and how; nothing of it is in the document. */
export class View {
  sheet = $state<SheetNumber>(1);
  width = $state(1440);
  height = $state(900);
  themeChoice = $state<ThemeChoice>('system');
  systemDark = $state(false);
  keyOpen = $state(false);
  help = $state(false);
  shown = $state<Record<Tracing, boolean>>({ trail: true, forces: true, lossMap: true, balloons: true });
  /** Pointer on the sheet [m]; null when it is elsewhere. */
  pointer = $state.raw<readonly [number, number] | null>(null);

  readonly geometry = $derived(frameGeometry(this.width, this.height));
  readonly theme: Theme = $derived(
    this.themeChoice === 'system' ? (this.systemDark ? 'dark' : 'light') : this.themeChoice,
  );

  constructor() {
    const stored = localStorage.getItem(themeKey);
    if (stored === 'light' || stored === 'dark') this.themeChoice = stored;
  }

  chooseTheme(choice: ThemeChoice): void {
    this.themeChoice = choice;
    localStorage.setItem(themeKey, choice);
  }

  toggle(tracing: Tracing): void {
    this.shown[tracing] = !this.shown[tracing];
  }
}
