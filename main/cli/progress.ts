import type { Terminal } from './terminal.js';

/** One line on standard error that says how far a run is, written over itself; nothing where nobody watches. */
export class Progress {
  private shown = false;

  /** @param label what is running */
  constructor(
    private readonly terminal: Terminal,
    private readonly label = '',
  ) {}

  /** @param time reached [s] @param duration of the run [s] */
  show(time: number, duration: number): void {
    if (!this.terminal.watched) return;
    const percent = Math.min(100, Math.floor((100 * time) / duration));
    const line = `${percent.toString().padStart(3)} %  ${time.toFixed(3)} s of ${duration.toFixed(3)} s  ${this.label}`;
    this.terminal.err(`\r${line.trimEnd()}`);
    this.shown = true;
  }

  clear(): void {
    if (this.shown) this.terminal.err('\r\u001b[K');
    this.shown = false;
  }
}
