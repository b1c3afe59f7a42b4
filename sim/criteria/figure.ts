/** A figure in running text: four significant digits, with a true minus. */
export function figure(value: number): string {
  return String(Number(value.toPrecision(4))).replace('-', '−');
}

export const percent = (share: number): string => `${figure(100 * share)} %`;

/** "a", "a and b", "a, b and c". */
export function listed(items: readonly string[]): string {
  if (items.length < 2) return items.join('');
  return `${items.slice(0, -1).join(', ')} and ${items[items.length - 1]}`;
}
