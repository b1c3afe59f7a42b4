/** Lines of a fixed-width text, and the few things that set them. Widths count characters. */

/** Put a text at the left of a field, cut to it with an ellipsis where it is longer. */
export function left(text: string, width: number): string {
  return fit(text, width).padEnd(width);
}

/** Put a text at the right of a field. */
export function right(text: string, width: number): string {
  return fit(text, width).padStart(width);
}

/** A text at the left and one at the right of one line; the right one is kept whole. */
export function spread(start: string, end: string, width: number): string {
  const room = width - end.length;
  return room <= 0 ? fit(end, width) : left(start, room) + end;
}

export function fit(text: string, width: number): string {
  return text.length <= width ? text : `${text.slice(0, Math.max(0, width - 1))}…`;
}

/** Break a text into lines at spaces; a word longer than a line is broken where it must be. */
export function wrap(text: string, width: number): string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(/\s+/).flatMap((part) => pieces(part, width))) {
    if (line === '') line = word;
    else if (line.length + 1 + word.length <= width) line += ` ${word}`;
    else {
      lines.push(line);
      line = word;
    }
  }
  return [...lines, line];
}

function pieces(word: string, width: number): string[] {
  if (word.length <= width) return [word];
  return [word.slice(0, width), ...pieces(word.slice(width), width)];
}

/** Wrap a text behind a label, continued under itself. */
export function hanging(label: string, text: string, width: number): string[] {
  return wrap(text, width - label.length).map((line, i) => (i === 0 ? label : ' '.repeat(label.length)) + line);
}

/** A column of a table: its heading, how wide, to which side, and its cells. */
export interface Column {
  head: string;
  cells: string[];
  align: 'left' | 'right';
}

const GAP = 2;

/** The width a column needs. */
export function columnWidth({ head, cells }: Column): number {
  return Math.max(head.length, ...cells.map((cell) => cell.length));
}

/**
 * Set columns side by side under a ruled heading. Columns that do not fit the width go into further blocks below, each
 * of which repeats the first columns.
 *
 * @param repeat how many of the first columns name the rows
 */
export function table(columns: readonly Column[], repeat: number, width: number): string[] {
  const naming = columns.slice(0, repeat);
  const blocks: Column[][] = [];
  let block: Column[] = [];
  for (const column of columns.slice(repeat)) {
    if (block.length > 0 && totalWidth([...naming, ...block, column]) > width) {
      blocks.push(block);
      block = [];
    }
    block.push(column);
  }
  blocks.push(block);
  return blocks.flatMap((rest, i) => [...(i > 0 ? [''] : []), ...tableBlock([...naming, ...rest], width)]);
}

function totalWidth(columns: readonly Column[]): number {
  return columns.reduce((sum, column) => sum + columnWidth(column) + GAP, -GAP);
}

function tableBlock(columns: readonly Column[], width: number): string[] {
  const rows = columns[0].cells.map((_, row) => tableLine(columns, ({ cells }) => cells[row]));
  return [tableLine(columns, ({ head }) => head), '─'.repeat(width), ...rows];
}

function tableLine(columns: readonly Column[], text: (column: Column) => string): string {
  const cells = columns.map((column) => {
    const width = columnWidth(column);
    return column.align === 'left' ? left(text(column), width) : right(text(column), width);
  });
  return cells.join(' '.repeat(GAP)).trimEnd();
}
