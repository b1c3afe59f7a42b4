import type { Problem } from '../../sim/core/problem.js';
import { numberItems, type Item } from '../../sim/drawing/items.js';
import type { ReadResult } from '../../sim/mechanism/index.js';
import type { Mechanism } from '../../sim/mechanism/model.js';

/** The fields of a title block, as the document's `sheet` has them. */
export type SheetField =
  'drawingNumber' | 'revision' | 'owner' | 'date' | 'drawnBy' | 'checkedBy' | 'approvedBy' | 'scale';

/** The document on the sheet: what was read, and what was found about it. */
export class Drawing {
  /** Name of the file or demo; null while the sheet is empty. */
  name = $state<string | null>(null);
  reading = $state(false);
  private result = $state.raw<ReadResult | null>(null);
  /** Index of the problem shown. */
  shown = $state(0);
  /** Id of the item picked for the item card. */
  picked = $state<string | null>(null);

  readonly mechanism: Mechanism | null = $derived(this.result?.mechanism ?? null);
  readonly problems: readonly Problem[] = $derived(sorted(this.result?.problems ?? []));
  readonly errors = $derived(this.problems.filter(({ severity }) => severity === 'error').length);
  readonly items: readonly Item[] = $derived(this.mechanism ? numberItems(this.mechanism) : []);
  readonly item: Item | null = $derived(this.items.find(({ id }) => id === this.picked) ?? this.items[0] ?? null);
  readonly problem: Problem | null = $derived(this.problems[this.shown] ?? null);

  show(name: string, result: ReadResult): void {
    this.name = name;
    this.result = result;
    this.shown = 0;
    this.picked = null;
  }

  get title(): string {
    return this.mechanism?.title ?? textOf(this.result?.document?.['title']) ?? '';
  }

  get notes(): string[] {
    const notes = textOf(this.result?.document?.['notes']) ?? '';
    return notes.split(/\n+|(?<=[.!?])\s+(?=[A-ZÄÖÜ])/).filter((note) => note.trim() !== '');
  }

  sheetField(field: SheetField): string {
    const sheet = this.result?.document?.['sheet'];
    const isRecord = typeof sheet === 'object' && sheet !== null && !Array.isArray(sheet);
    return (isRecord ? textOf(sheet[field]) : undefined) ?? '';
  }

  stepProblem(by: number): void {
    const count = this.problems.length;
    if (count > 0) this.shown = (this.shown + by + count) % count;
  }
}

function textOf(value: unknown): string | undefined {
  return typeof value === 'string' ? value : undefined;
}

const order = { error: 0, warning: 1, note: 2 };

function sorted(problems: readonly Problem[]): Problem[] {
  return [...problems].sort((a, b) => order[a.severity] - order[b.severity]);
}
