import type { Vec } from '../../sim/core/vec.js';
import type { StationRow } from '../../sim/ledger/index.js';
import { zoneAt } from '../frame/geometry.js';
import { bodyOf, valueAt } from '../../sim/recording/reader.js';
import type { Recording } from '../../sim/recording/recording.js';
import { Account } from './account.svelte.js';
import { Audit } from './audit.svelte.js';
import { Drawing } from './drawing.svelte.js';
import { Playback } from './playback.svelte.js';
import { Run } from './run.svelte.js';
import type { Solver } from './solver.js';
import { View } from './view.svelte.js';

/** A time [s] too short for anything to happen in. */
const instant = 1e-9;

/** A file's name and text, from wherever it was opened. */
export interface OpenedFile {
  name: string;
  text: string;
  size: number;
}

/** Whether a body's mass centre goes anywhere in a run: further than a thousandth of the mechanism's extent. */
function travels(recording: Recording, id: string, extent: number): boolean {
  const columns = bodyOf(recording, id)?.columns;
  if (!columns) return false;
  const far = (column: number) => {
    let [least, most] = [Infinity, -Infinity];
    for (let row = 0; row < recording.rowCount; row++) {
      const value = valueAt(recording, row, column);
      [least, most] = [Math.min(least, value), Math.max(most, value)];
    }
    return most - least > 1e-3 * extent;
  };
  return far(columns.x) || far(columns.y);
}

/** Where the sheet's origin is in the window [px], and the scale of the drawing. */
export interface LaidDrawing {
  left: number;
  top: number;
  pixels: number;
  scale: string;
}

/** Everything the window holds; commands and panels work on it. */
export class Workbench {
  readonly view = new View();
  readonly drawing = new Drawing();
  readonly run = new Run();
  /** The auditor's run of the same mechanism, beside the first. */
  readonly second = new Run('audit');
  readonly playback = new Playback(() => this.run.recording);
  readonly account = new Account(
    () => (this.run.status === 'running' ? null : this.run.recording),
    () => this.drawing.mechanism,
    () => this.drawing.names,
  );
  readonly audit = new Audit(this.run, this.second, this.account, () => this.drawing.mechanism);
  /** Whether either solver is at work. */
  readonly isRunning = $derived(this.run.status === 'running' || this.second.status === 'running');
  /** Something that went wrong outside the document: one sentence. */
  trouble = $state('');
  private stepper: Solver;
  private auditor: Solver;
  /** How many files were opened. */
  private opened = 0;

  /** How the drawing lies in the window, once it does: set by the sheet's field. */
  laid = $state.raw<LaidDrawing | null>(null);
  /** The body that readings, trail and speed are of: the picked one, else the first inside the boundary. */
  readonly subject: string | null = $derived.by(() => {
    const { mechanism, picked } = this.drawing;
    const isBody = mechanism?.bodies.some(({ id }) => id === picked);
    if (isBody || !mechanism) return isBody ? picked : null;
    const { recording, status } = this.run;
    // A wheel on its own axle goes nowhere: of the bodies inside, the first that does tells more.
    const moving =
      recording && status !== 'running'
        ? mechanism.system.find((id) => travels(recording, id, mechanism.extent))
        : null;
    return moving ?? mechanism.system[0] ?? mechanism.bodies[0]?.id ?? null;
  });

  constructor(private readonly startSolver: () => Solver) {
    this.stepper = startSolver();
    this.auditor = startSolver();
  }

  /** Reads a file and puts it on the sheet; errors of the file are shown with their places. */
  async open({ name, text, size }: OpenedFile): Promise<void> {
    const ticket = ++this.opened;
    this.run.reset();
    this.second.reset();
    this.playback.feeding = false;
    this.playback.time = 0;
    this.account.reset();
    this.trouble = '';
    this.drawing.reading = true;
    const result = await this.stepper.client
      .request('read', { text, fileSize: size })
      .result.catch((error: unknown) => {
        this.trouble = error instanceof Error ? error.message : String(error);
        this.replaceStepper();
        return null;
      });
    // Another file was opened meanwhile: it is that one that is wanted.
    if (ticket !== this.opened) return;
    this.drawing.reading = false;
    if (!result) return;
    this.drawing.show(name, result);
    this.view.sheet = 1;
  }

  /** Runs what is on the sheet on both solvers, each in its thread, and turns to the run's sheet. */
  async start(): Promise<void> {
    const { mechanism } = this.drawing;
    if (!mechanism || this.isRunning) return;
    const ticket = this.opened;
    this.trouble = '';
    this.view.sheet = 2;
    this.playback.feeding = false;
    this.playback.time = 0;
    this.account.pickedKey = null;
    const auditing = this.second.start(this.auditor.client, mechanism);
    await this.run.start(this.stepper.client, mechanism);
    if (ticket === this.opened) this.showRun();
    await auditing;
    if (ticket === this.opened) this.showAudit();
  }

  /** Halts both solvers. */
  halt(): void {
    this.run.halt();
    this.second.halt();
  }

  private showRun(): void {
    const { status, failure } = this.run;
    if (status === 'failed' || status === 'refused') this.trouble = failure;
    if (status === 'failed') this.replaceStepper();
    this.playback.fitRate();
    this.showStation(this.account.page?.to ?? null);
  }

  /** Where the runs part, the account is opened there. */
  private showAudit(): void {
    if (this.second.status === 'failed') {
      this.auditor.stop();
      this.auditor = this.startSolver();
    }
    if (this.audit.verdict === 'differs') this.goToParting();
  }

  /** Opens the account at the entry that differs most, and goes to the station from which on the runs are not the same. */
  goToParting(): void {
    const { comparison, partingStation } = this.audit;
    const entry = comparison?.parting?.account;
    const page = this.account.pages.find(({ to }) => to.id === partingStation);
    if (entry) this.account.open(entry.from, entry.to);
    else if (page) this.account.open(page.from.id, page.to.id);
    if (entry) this.account.pickAccount(entry.account, entry.of);
    this.playback.feeding = false;
    const station = this.account.stations.find(({ id }) => id === partingStation);
    if (station) this.showStation(station);
    else this.playback.moveTo(comparison?.oneSided[0]?.time ?? this.playback.time);
  }

  goToStation(mark: string): void {
    const station = this.account.stationMarked(mark);
    this.playback.feeding = false;
    this.showStation(station);
  }

  goToMoment(time: number): void {
    this.view.sheet = 2;
    this.playback.feeding = false;
    this.playback.moveTo(time);
  }

  /** A station on an impact is the instant just before it; the row after it has the same time. */
  private showStation(station: StationRow | null): void {
    if (station) this.playback.moveTo(station.time - (station.touch ? instant : 0));
  }

  /** Zone of the sheet that a point [m] lies in, such as "C5". */
  readonly zoneOf = ([x, y]: Vec): string | null => {
    if (!this.laid) return null;
    const { left, top, pixels } = this.laid;
    return zoneAt(this.view.geometry, left + x * pixels, top - y * pixels);
  };

  /** A solver that broke down is replaced, so that the next request has one. */
  private replaceStepper(): void {
    this.stepper.stop();
    this.stepper = this.startSolver();
  }
}
