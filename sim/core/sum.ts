/**
 * The sum of many numbers with the rounding of each addition carried along: the error does not grow with their number
 * and stays near one rounding of the result plus a second-order term in Σ|x|. Order of addition hardly matters.
 *
 * Source: A. Neumaier, Rundungsfehleranalyse einiger Verfahren zur Summation endlicher Summen, ZAMM 54 (1974) 39–51.
 */
export class CompensatedSum {
  private sum = 0;
  private lost = 0;

  add(value: number): void {
    const next = this.sum + value;
    this.lost += Math.abs(this.sum) >= Math.abs(value) ? this.sum - next + value : value - next + this.sum;
    this.sum = next;
  }

  get value(): number {
    return this.sum + this.lost;
  }
}

/** Compensated sum of a list. */
export function compensatedSum(values: Iterable<number>): number {
  const sum = new CompensatedSum();
  for (const value of values) sum.add(value);
  return sum.value;
}
