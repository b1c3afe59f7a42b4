import type { Problem } from '../../sim/core/problem.js';
import { numberItems, type Item } from '../../sim/drawing/items.js';
import type { ReadResult } from '../../sim/mechanism/index.js';
import type { Sheet } from '../../sim/mechanism/kinds/sheet.js';
import type { Mechanism } from '../../sim/mechanism/model.js';

/** The fields of a title block, as the document's `sheet` has them. */
export type SheetField = keyof Sheet;

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
  /** Names given in the document, by id. */
  readonly names: ReadonlyMap<string, string> = $derived(namesIn(this.result?.document ?? {}));
  readonly items: readonly Item[] = $derived(this.mechanism ? numberItems(this.mechanism, this.names) : []);
  readonly item: Item | null = $derived(this.items.find(({ id }) => id === this.picked) ?? this.items[0] ?? null);
  readonly problem: Problem | null = $derived(this.problems[this.shown] ?? null);

  show(name: string, result: ReadResult): void {
    this.name = name;
    this.result = result;
    this.shown = 0;
    this.picked = null;
  }

  get title(): string {
    return this.mechanism?.title ?? textOf(this.result?.document?.title) ?? '';
  }

  /** The document's notes, a line each; a line that begins with a number keeps it. */
  get notes(): { number: string; text: string }[] {
    const lines = (textOf(this.result?.document?.notes) ?? '').split('\n').filter((line) => line.trim() !== '');
    return lines.map((line) => {
      const [, number = '', text = line] = /^\s*(\d+)[.)]?\s+(.*)$/.exec(line) ?? [];
      return { number, text };
    });
  }

  sheetField(field: SheetField): string {
    const sheet = this.result?.document?.sheet;
    const isRecord = typeof sheet === 'object' && sheet !== null && !Array.isArray(sheet);
    return (isRecord ? textOf(sheet[field]) : undefined) ?? '';
  }

  stepProblem(by: number): void {
    const count = this.problems.length;
    if (count > 0) this.shown = (this.shown + by + count) % count;
  }
}

/** Every `id` with its `name` in the document's lists; ids are unique in a document. */
function namesIn(document: Record<string, unknown>): Map<string, string> {
  const elements = Object.values(document).flatMap((value): unknown[] => (Array.isArray(value) ? value : []));
  return new Map(
    elements.flatMap((element): [string, string][] => {
      if (typeof element !== 'object' || element === null) return [];
      const { id, name } = element as { id?: unknown; name?: unknown };
      return typeof id === 'string' && typeof name === 'string' ? [[id, name]] : [];
    }),
  );
}

function textOf(value: unknown): string | undefined {
  return typeof value === 'string' ? value : undefined;
}

const order = { error: 0, warning: 1, note: 2 };

function sorted(problems: readonly Problem[]): Problem[] {
  return [...problems].sort((a, b) => order[a.severity] - order[b.severity]);
}
