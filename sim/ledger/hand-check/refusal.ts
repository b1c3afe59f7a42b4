/** Why there is no hand sum. Thrown inside this folder only, and caught where a check is made. */
export class NoHandSum extends Error {
  override name = 'NoHandSum';
}

/** @param reason one sentence */
export function refuse(reason: string): never {
  throw new NoHandSum(reason);
}
