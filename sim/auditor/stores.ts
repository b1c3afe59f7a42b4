import type { Assembly } from './assembly.js';

/** Gives every account with stored energy the function that tells it, for the recorder. */
export function connectStores({ system, gravity, springs, pairs, soft }: Assembly): void {
  const [gx, gy] = system.mechanism.gravity;
  gravity.forEach((account, i) => {
    account.stored = (q) => -system.mass[3 * i] * (gx * q[3 * i] + gy * q[3 * i + 1]);
  });
  for (const spring of springs) spring.force.account.stored = (q) => spring.energy(q);
  for (const pair of pairs) {
    if (!pair.spring) continue;
    pair.spring.stored = (q) => {
      let sum = 0;
      for (const point of soft) {
        if (point.point.pair !== pair || !point.isPressed) continue;
        point.point.locate(q);
        sum += point.energy();
      }
      return sum;
    };
  }
}
